import { expect, it } from 'vitest';
import { dayProblem } from './day-problem.ts';

it('takes a day of the calendar and says of anything else how a day is written', () => {
  expect(dayProblem('2024-02-29')).toBeUndefined();
  expect(dayProblem('2025-02-29')).toContain('"2025-02-29" is no day');
  expect(dayProblem('abc')).toContain('"abc" is no day');
  expect(dayProblem('')).toContain('Name a day');
});
