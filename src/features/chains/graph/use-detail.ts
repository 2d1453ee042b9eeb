import { useCallback, useEffect, useRef, useState } from 'react';
import type { Plate, Ribbon } from '#shared/drawing/display-list.ts';

/** What is pointed at, or has the focus. */
export type Pointed = { plate: Plate } | { ribbon: Ribbon };

const PAUSE_MS = { before: 180, after: 220 } as const;

/**
 * Which plate or link the card tells about. It comes after a short rest of the pointer, stays while the pointer is
 * on the card itself, and goes with Escape.
 */
export function useDetail() {
  const [pointed, setPointed] = useState<Pointed | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const after = useCallback((pause: number, next: Pointed | null) => {
    clearTimeout(timer.current);
    timer.current = setTimeout(() => setPointed(next), pause);
  }, []);
  useEffect(() => () => clearTimeout(timer.current), []);
  const show = useCallback((next: Pointed) => after(PAUSE_MS.before, next), [after]);
  const leave = useCallback(() => after(PAUSE_MS.after, null), [after]);
  const hold = useCallback(() => clearTimeout(timer.current), []);
  const hide = useCallback(() => {
    clearTimeout(timer.current);
    setPointed(null);
  }, []);
  return { pointed, show, leave, hold, hide };
}
