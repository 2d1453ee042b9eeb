import { describe, expect, it } from 'vitest';
import type { HistoryEntry } from './history.ts';
import { stepQuestion } from './step-question.ts';

/** Yearly calibrations from 2015 on. */
function yearly(values: number[], standardUncertainty = 5): HistoryEntry[] {
  return values.map((value, i) => ({ date: `${2015 + i}-05-01`, value, standardUncertainty }));
}

describe('stepQuestion', () => {
  it('asks where a step lies in an otherwise steady drift', () => {
    const answer = stepQuestion(yearly([0, 2, 4, 6, 58, 60, 62, 64]));
    expect(answer).toMatchObject({
      outcome: 'question',
      question: { between: ['2018-05-01', '2019-05-01'] },
    });
    if (answer.outcome !== 'question') throw new Error('no question');
    expect(answer.question.step).toBeCloseTo(50, 1);
    expect(answer.question.standardUncertainty).toBeGreaterThan(5);
    expect(answer.question.question).toMatch(/Did something happen to the standard\?$/);
  });

  it('is the same for a history in any order', () => {
    const values = yearly([0, 2, 4, 6, 58, 60, 62, 64]);
    const forward = stepQuestion(values);
    const backward = stepQuestion([...values].reverse());
    if (forward.outcome !== 'question' || backward.outcome !== 'question') throw new Error('no question');
    expect(backward.question.between).toEqual(forward.question.between);
    expect(backward.question.step).toBeCloseTo(forward.question.step, 6);
  });

  it('is silent about drift and about scatter within the uncertainty', () => {
    expect(stepQuestion(yearly([0, 20, 40, 60, 80]))).toEqual({ outcome: 'no question' });
    expect(stepQuestion(yearly([3, -4, 2, -1, 4, -3]))).toEqual({ outcome: 'no question' });
  });

  it('counts the places it tried and obeys the level', () => {
    const values = yearly([0, 0, 0, 24, 24, 24]);
    const asked = stepQuestion(values, { level: 0.2 });
    if (asked.outcome !== 'question') throw new Error('no question');
    // Step and its uncertainty by a line plus a step: five places, so five times the two-sided normal tail.
    const z = asked.question.step / asked.question.standardUncertainty;
    expect(z).toBeCloseTo(24 / (5 * Math.sqrt(1 / (1.5 - 4.5 ** 2 / 17.5))), 2);
    expect(asked.question.pValue).toBeCloseTo(5 * 0.004945, 3);
    expect(stepQuestion(values)).toEqual({ outcome: 'no question' });
  });

  it('weighs a covariance: a shared part hides no step', () => {
    const values = yearly([0, 1, 0, 1, 60, 61, 60, 61]);
    const covariance = values.map((_, i) => values.map((__, j) => 100 ** 2 + (i === j ? 25 : 0)));
    expect(stepQuestion(values, { covariance }).outcome).toBe('question');
  });

  it('says where it cannot judge', () => {
    expect(stepQuestion(yearly([0, 50, 100])).outcome).toBe('cannot be judged');
    const twoDates = yearly([0, 50]).flatMap((one) => [one, one]);
    expect(stepQuestion(twoDates)).toMatchObject({
      outcome: 'cannot be judged',
      reason: expect.stringContaining('four'),
    });
  });

  it('refuses nonsense', () => {
    expect(() => stepQuestion([])).toThrow(expect.objectContaining({ code: 'too-few-values' }));
    expect(() => stepQuestion(yearly([1, 2, 3, 4]), { level: 2 })).toThrow(
      expect.objectContaining({ code: 'out-of-range' }),
    );
    expect(() => stepQuestion(yearly([1, 2, 3, 4]), { covariance: [[1]] })).toThrow(
      expect.objectContaining({ code: 'size-mismatch' }),
    );
  });
});
