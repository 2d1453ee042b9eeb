import { expect, it } from 'vitest';
import { failingCount, failingText, subjectText } from './words.ts';

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
