import { ApiProblem } from './api-problem.ts';

/** How far the server has come in reading its register after a start. */
export interface ReadingProgress {
  done: number;
  total: number;
}

/** The progress in a refusal "not ready, the register is being read"; null for any other error. */
export function readingProgress(error: Error | null): ReadingProgress | null {
  if (!(error instanceof ApiProblem) || error.id !== 'unavailable') return null;
  const progress = error.document.progress as Partial<ReadingProgress> | undefined;
  if (typeof progress?.done !== 'number' || typeof progress.total !== 'number') return null;
  return { done: progress.done, total: progress.total };
}
