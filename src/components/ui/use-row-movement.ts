import { useEffect, useRef, type RefObject } from 'react';

const STEPS: Record<string, number> = { ArrowDown: 1, ArrowUp: -1, PageDown: 10, PageUp: -10 };

/**
 * Keyboard movement between the rows of a table. Exactly one element marked `data-row` can be reached by Tab;
 * the arrow keys, Page Up and Down, Home and End move from there. It watches the table itself, so that rows
 * which come and go keep their one tab stop.
 */
export function useRowMovement(): RefObject<HTMLTableElement | null> {
  const ref = useRef<HTMLTableElement>(null);
  useEffect(() => {
    const table = ref.current;
    if (!table) return undefined;
    const onFocus = (event: FocusEvent): void => {
      if (event.target instanceof HTMLElement && event.target.matches('[data-row]'))
        makeTabStop(table, event.target);
    };
    const onKey = (event: KeyboardEvent): void => moveFrom(table, event);
    const watcher = new MutationObserver(() => keepTabStop(table));
    watcher.observe(table, { childList: true, subtree: true });
    table.addEventListener('focusin', onFocus);
    table.addEventListener('keydown', onKey);
    keepTabStop(table);
    return () => {
      watcher.disconnect();
      table.removeEventListener('focusin', onFocus);
      table.removeEventListener('keydown', onKey);
    };
  }, []);
  return ref;
}

function rowsOf(table: HTMLTableElement): HTMLElement[] {
  return Array.from(table.querySelectorAll<HTMLElement>('[data-row]'));
}

function makeTabStop(table: HTMLTableElement, chosen: HTMLElement): void {
  for (const row of rowsOf(table)) row.tabIndex = row === chosen ? 0 : -1;
}

function keepTabStop(table: HTMLTableElement): void {
  const rows = rowsOf(table);
  const chosen = rows.find((row) => row.tabIndex === 0) ?? rows[0];
  if (chosen) makeTabStop(table, chosen);
}

function moveFrom(table: HTMLTableElement, event: KeyboardEvent): void {
  const from = event.target instanceof Element ? event.target.closest<HTMLElement>('[data-row]') : null;
  if (!from || event.altKey || event.ctrlKey || event.metaKey) return;
  const rows = rowsOf(table);
  const last = rows.length - 1;
  const step = STEPS[event.key];
  let index: number | undefined;
  if (step !== undefined) index = Math.min(last, Math.max(0, rows.indexOf(from) + step));
  if (event.key === 'Home') index = 0;
  if (event.key === 'End') index = last;
  const to = index === undefined ? undefined : rows[index];
  if (!to) return;
  event.preventDefault();
  to.focus();
  to.scrollIntoView({ block: 'nearest' });
}
