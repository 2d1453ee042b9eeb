import { useSyncExternalStore } from 'react';

/** Since when the register cannot be reached, milliseconds since 1970; null while it can. */
let lostSince: number | null = null;
const listeners = new Set<() => void>();

/** A request got no answer. */
export function noteLost(): void {
  if (lostSince !== null) return;
  lostSince = Date.now();
  listeners.forEach((listener) => listener());
}

/** A request was answered, whatever the answer. */
export function noteReached(): void {
  if (lostSince === null) return;
  lostSince = null;
  listeners.forEach((listener) => listener());
}

/** Since when the register cannot be reached; null while it can. */
export function useLostSince(): number | null {
  return useSyncExternalStore(subscribe, () => lostSince);
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}
