import { useSyncExternalStore } from 'react';

/** What one reader prefers; kept in this browser only, and without effect on anything that is stored. */
export interface Preferences {
  /** `system` follows the browser's own light or dark setting. */
  theme: 'system' | 'paper' | 'lamp';
  decimalMark: '.' | ',';
  uncertainty: 'plus-minus' | 'concise';
}

const STORAGE_KEY = 'exagium.preferences';

/** What each preference may be; the first stands until somebody chooses. */
const CHOICES: { [Name in keyof Preferences]: readonly [Preferences[Name], ...Preferences[Name][]] } = {
  theme: ['system', 'paper', 'lamp'],
  decimalMark: ['.', ','],
  uncertainty: ['plus-minus', 'concise'],
};

const listeners = new Set<() => void>();
let current = read();

/** The preferences now in force, for code outside components. */
export function preferences(): Preferences {
  return current;
}

/** The preferences now in force; a component that reads them is drawn again when they change. */
export function usePreferences(): Preferences {
  return useSyncExternalStore(subscribe, preferences);
}

/** Changes some preferences, keeps them for the next visit and applies the theme. */
export function setPreferences(change: Partial<Preferences>): void {
  current = { ...current, ...change };
  try {
    localStorage.setItem(STORAGE_KEY, JSON.stringify(current));
  } catch {
    // A browser that keeps nothing still shows the choice until the tab is closed.
  }
  applyTheme();
  listeners.forEach((listener) => listener());
}

/** Sets the theme on the document and keeps it in step with the browser's; called once, before React draws. */
export function startTheme(): void {
  applyTheme();
  darkQuery()?.addEventListener('change', applyTheme);
}

function applyTheme(): void {
  const dark = current.theme === 'lamp' || (current.theme === 'system' && (darkQuery()?.matches ?? false));
  document.documentElement.dataset['theme'] = dark ? 'lamp' : 'paper';
}

function darkQuery(): MediaQueryList | undefined {
  return typeof matchMedia === 'function' ? matchMedia('(prefers-color-scheme: dark)') : undefined;
}

function read(): Preferences {
  const kept = readKept();
  const chosen = <Name extends keyof Preferences>(name: Name): Preferences[Name] =>
    CHOICES[name].find((choice) => choice === kept[name]) ?? CHOICES[name][0];
  return { theme: chosen('theme'), decimalMark: chosen('decimalMark'), uncertainty: chosen('uncertainty') };
}

function readKept(): Record<string, unknown> {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(STORAGE_KEY) ?? 'null');
    return typeof kept === 'object' && kept !== null ? { ...kept } : {};
  } catch {
    return {};
  }
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}
