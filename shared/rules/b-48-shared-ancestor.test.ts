import { expect, it } from 'vitest';
import { sharedAncestor } from './b-48-shared-ancestor.ts';
import { judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/** U 0.30 mg at k = 2; two references that share an ancestor. */
const judge = (withCovariance: number | null, without: number | null, changes: Partial<ValueFacts> = {}) =>
  judgedBy(
    sharedAncestor,
    valueFacts({
      references: 2,
      sharedAncestors: ['IP 0001'],
      carriedVariance: withCovariance === null ? null : (withCovariance / 1000) ** 2,
      carriedVarianceIndependent: without === null ? null : (without / 1000) ** 2,
      ...changes,
    }),
  );

it('holds where U covers the covariance, or where it matters little', () => {
  expect(judge(0.14, 0.1).sentence).toBe('counted');
  expect(judge(0.16, 0.155).sentence).toBe('negligible');
  expect(judge(0.1, 0.14).sentence).toBe('negligible');
  expect(judge(0, 0).sentence).toBe('negligible');
});

it('fails where it was left out and matters', () => {
  const found = judge(0.17, 0.14);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain(
    'share IP 0001. With their covariance they carry 0.34\u2009mg, 18 % more than without',
  );
});

it('cannot be judged where what is carried or U is unknown', () => {
  expect(judge(null, null, { carriedMissing: ['X-1'] }).text).toContain('X-1 states no U');
  expect(judge(0.17, null).outcome).toBe('cannot be judged');
  expect(judge(0.17, 0.14, { expandedU: null }).sentence).toBe('no uncertainty');
  expect(judge(0.17, 0.14, { k: null }).sentence).toBe('no uncertainty');
});

it('does not apply to one reference, or to references that share nothing', () => {
  expect(judge(0.17, 0.14, { references: 1 }).outcome).toBe('does not apply');
  expect(judge(0.17, 0.14, { sharedAncestors: [] }).outcome).toBe('does not apply');
});
