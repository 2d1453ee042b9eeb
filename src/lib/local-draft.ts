import { useCallback, useEffect, useMemo, useState } from 'react';
import type { FieldValues, UseFormReturn } from 'react-hook-form';

interface LocalDraft {
  /** When what the form was filled with was typed, milliseconds since 1970; null for a fresh form. */
  restoredFrom: number | null;
  /** Forgets what is kept; call it once the server has the entries. */
  clear: () => void;
  /** Forgets what is kept and empties the form to its defaults. */
  discard: () => void;
}

const WRITE_AFTER_MS = 300;

/**
 * Keeps what is typed into a form in this browser, so that a closed tab loses nothing. On the next visit the
 * form is filled again and the screen says so.
 * @param owner account id: one person's entries never appear to another at the same browser
 * @param name which form, with the id of the thing it is about: `standard-new`, `draft:<id>`
 */
export function useLocalDraft<Input extends FieldValues, Context, Output extends FieldValues>(
  owner: string,
  name: string,
  form: UseFormReturn<Input, Context, Output>,
): LocalDraft {
  const key = `exagium.draft.${owner}.${name}`;
  const kept = useMemo(() => readKept<Input>(key), [key]);
  const [clearedKey, setClearedKey] = useState<string | null>(null);
  const { reset, subscribe } = form;

  useEffect(() => {
    if (kept) reset(kept.values, { keepDefaultValues: true });
  }, [kept, reset]);

  useEffect(() => {
    let pending: Input | null = null;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const write = (): void => {
      clearTimeout(timer);
      if (pending) keep(key, pending);
      pending = null;
    };
    const stop = subscribe({
      formState: { values: true, isDirty: true },
      callback: ({ values, isDirty }) => {
        if (!isDirty) return;
        pending = values;
        clearTimeout(timer);
        timer = setTimeout(write, WRITE_AFTER_MS);
      },
    });
    // A tab that is hidden may never be shown again.
    document.addEventListener('visibilitychange', write);
    window.addEventListener('pagehide', write);
    return () => {
      write();
      stop();
      document.removeEventListener('visibilitychange', write);
      window.removeEventListener('pagehide', write);
    };
  }, [key, subscribe]);

  const clear = useCallback(() => {
    forget(key);
    setClearedKey(key);
  }, [key]);
  const discard = useCallback(() => {
    reset();
    clear();
  }, [reset, clear]);
  return { restoredFrom: clearedKey === key ? null : (kept?.at ?? null), clear, discard };
}

function keep(key: string, values: unknown): void {
  try {
    localStorage.setItem(key, JSON.stringify({ at: Date.now(), values }));
  } catch {
    // A full or closed store: the form itself still holds the entries.
  }
}

function readKept<Input>(key: string): { at: number; values: Input } | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(key) ?? 'null');
    return kept as { at: number; values: Input } | null;
  } catch {
    return null;
  }
}

function forget(key: string): void {
  try {
    localStorage.removeItem(key);
  } catch {
    // Nothing was kept where nothing can be stored.
  }
}
