import { describe, expect, it } from 'vitest';
import { ApiProblem } from './api-problem.ts';
import { readingProgress } from './register-being-read.ts';

function problem(id: string, members: Record<string, unknown>): ApiProblem {
  return new ApiProblem({ type: `/problems/${id}`, title: 'Not ready', status: 503, ...members });
}

describe('readingProgress', () => {
  it('finds how far the server has come', () => {
    const progress = { done: 430, total: 2_800 };
    expect(readingProgress(problem('unavailable', { progress }))).toEqual(progress);
  });

  it('finds none in other errors', () => {
    expect(readingProgress(null)).toBeNull();
    expect(readingProgress(new Error('lost'))).toBeNull();
    expect(readingProgress(problem('unavailable', {}))).toBeNull();
    expect(readingProgress(problem('internal', { progress: { done: 1, total: 2 } }))).toBeNull();
  });
});
