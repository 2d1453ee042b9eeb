import { describe, expect, it } from 'vitest';
import type { DraftCheck } from '#shared/contracts/drafts.ts';
import { gatherChecks } from './gather-checks.ts';

const check = (line: number, rule: string, changes: Partial<DraftCheck> = {}): DraftCheck => ({
  line,
  referenceUid: null,
  rule,
  clause: 'C',
  severity: 'minor',
  verdict: 'conduct',
  outcome: 'holds',
  sentence: 'It is so.',
  ...changes,
});

describe('gatherChecks', () => {
  it('says once what came out alike, and begins with what fails hardest', () => {
    const gathered = gatherChecks([
      check(0, 'B-28', { outcome: 'cannot be judged' }),
      check(0, 'B-16'),
      check(1, 'B-28', { outcome: 'cannot be judged' }),
      check(1, 'B-29', { outcome: 'fails', severity: 'minor' }),
      check(1, 'B-10', { outcome: 'fails', severity: 'critical' }),
      check(1, 'B-16', { sentence: 'It is so, too.' }),
    ]);
    expect(gathered.map((one) => [one.check.rule, one.lines])).toEqual([
      ['B-10', [1]],
      ['B-29', [1]],
      ['B-28', [0, 1]],
      ['B-16', [0]],
      ['B-16', [1]],
    ]);
  });
});
