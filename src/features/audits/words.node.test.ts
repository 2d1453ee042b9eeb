import { expect, it } from 'vitest';
import { failingCount, failingText, progressText, subjectText } from './words.ts';

const FIGURES = { block: 1, critical: 2, major: 0, minor: 0, information: 3, notJudged: 9 };

it('tells failing findings, the gravest first', () => {
  expect(failingText(FIGURES)).toBe('1 blocking, 2 critical, 3 to be noted');
  expect(failingCount(FIGURES)).toBe(6);
});

it('names what was audited', () => {
  const laboratory = { id: 'l', code: 'L', name: 'Laboratory' };
  expect(subjectText({ subject: { scope: 'laboratory', laboratory } })).toBe('Laboratory');
  expect(subjectText({ subject: { scope: 'network' } })).toBe('The whole network');
  const value = { scope: 'value', valueUid: 'u', registryNo: 'AB 0001', certificateNo: 'C-1' } as const;
  expect(subjectText({ subject: value })).toBe('Chain of AB 0001');
});

it('sets counts in groups of three', () => {
  expect(failingText({ ...FIGURES, block: 1230 })).toContain('1\u2009230 blocking');
});

it('tells what comes before the first chain and after the last', () => {
  expect(progressText({ done: 0, total: null })).toBe('reading the register');
  expect(progressText({ done: 0, total: 589 })).toBe('judging the first of 589 chains');
  expect(progressText({ done: 32, total: 1589 })).toBe('32 of 1\u2009589 chains judged');
  expect(progressText({ done: 589, total: 589 })).toBe('recording what was found');
});
