import { useEffect, useState } from 'react';
import type { LayoutInput, Placement } from '#shared/drawing/layout-input.ts';

/** A placement and how long the worker took for it. */
export interface LaidOut {
  placement: Placement;
  milliseconds: number;
}

/** Placements already worked out, by what they were worked out from. */
const known = new Map<string, LaidOut>();
const LONGEST_MEMORY = 40;

let worker: Worker | null = null;
let asked = 0;

/** The placement of a chain, worked out in a worker; null until it is there. The same chain is asked once. */
export function useLayout(input: LayoutInput): LaidOut | null {
  const key = JSON.stringify(input);
  const [, drawAgain] = useState(0);
  useEffect(() => {
    if (known.has(key)) return;
    return askWorker(key, () => drawAgain((count) => count + 1));
  }, [key]);
  return known.get(key) ?? null;
}

function askWorker(key: string, done: () => void): () => void {
  worker ??= new Worker(new URL('./layout.worker.ts', import.meta.url), { type: 'module' });
  const current = worker;
  const ask = (asked += 1);
  const onAnswer = (event: MessageEvent<LaidOut & { ask: number }>) => {
    if (event.data.ask !== ask) return;
    current.removeEventListener('message', onAnswer);
    if (known.size >= LONGEST_MEMORY) known.delete(known.keys().next().value!);
    known.set(key, event.data);
    done();
  };
  current.addEventListener('message', onAnswer);
  current.postMessage({ ask, input: JSON.parse(key) as LayoutInput });
  return () => current.removeEventListener('message', onAnswer);
}
