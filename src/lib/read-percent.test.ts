import { describe, expect, it } from 'vitest';
import { percentProblem } from './read-percent.ts';

describe('percentProblem', () => {
  it.each(['0', '10', '0.5', '1000'])('takes %s', (text) => {
    expect(percentProblem(text, 1000)).toBeUndefined();
  });

  it.each(['', '-1', '1001', '1e1', '0x10', 'abc', 'Infinity'])(
    'refuses "%s" and says what belongs there',
    (text) => {
      const problem = percentProblem(text, 1000);
      expect(problem).toContain('from 0 to 1000 %, such as 10');
      expect(problem).toContain(text === '' ? 'nothing was written' : `received "${text}"`);
    },
  );
});
