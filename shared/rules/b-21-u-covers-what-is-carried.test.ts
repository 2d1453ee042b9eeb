import fc from 'fast-check';
import { expect, it } from 'vitest';
import { uCoversWhatIsCarried } from './b-21-u-covers-what-is-carried.ts';
import { judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/** U 0.30 mg at k = 2: the interval is (0.30 +/- 0.005)/2 mg. */
const judge = (carriedU: number | null, changes: Partial<ValueFacts> = {}) =>
  judgedBy(
    uCoversWhatIsCarried,
    valueFacts({ carriedVariance: carriedU === null ? null : (carriedU / 1000) ** 2, ...changes }),
  );

it('holds where U covers what is carried, and within its last digit', () => {
  expect(judge(0.06)).toMatchObject({ outcome: 'holds', sentence: 'covers' });
  expect(judge(0.1524)).toMatchObject({ outcome: 'holds', severity: 'information', sentence: 'rounding' });
});

it('fails below it, and names the certificate and both amounts', () => {
  const found = judge(0.1526);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(found.text).toContain(
    'RL-2025-031 states U 0.30\u2009mg for MI 0007, but its references alone carry 0.31\u2009mg',
  );
});

it('raises no alarm for a subdivided weight with a smaller absolute U than its reference', () => {
  // 100 g from 1 kg with U 0.12 mg: the reference brings a tenth, 0.012 mg.
  expect(judge(0.006, { nominal: '100', expandedU: '0.00003', reportedUDecimals: 3 }).outcome).toBe('holds');
});

it('judges in any unit', () => {
  const inKilograms = { reportedUnit: 'kg', reportedUDecimals: 8 } as const;
  expect(judge(0.1524, inKilograms).sentence).toBe('rounding');
  expect(judge(0.16, { reportedUnit: 'ug', reportedUDecimals: 0 }).outcome).toBe('fails');
});

it('cannot be judged without U, k, or the U of a reference, which it names', () => {
  expect(judge(0.06, { expandedU: null }).outcome).toBe('cannot be judged');
  expect(judge(0.06, { k: null }).outcome).toBe('cannot be judged');
  expect(judge(null, { carriedMissing: ['X-1', 'X-2'] }).text).toContain('certificate X-1; X-2 states no U');
  expect(judge(null).outcome).toBe('cannot be judged');
});

it('does not apply to a stated reference', () => {
  expect(judge(0.2, { rootKind: 'recognized certificate' }).outcome).toBe('does not apply');
  expect(judge(0.2, { references: 0 }).outcome).toBe('does not apply');
});

it('never fails an honest U, rounded to two digits, whatever is carried and added', () => {
  const part = fc.double({ min: 1e-8, max: 1e-2, noNaN: true });
  fc.assert(
    fc.property(part, fc.double({ min: 0, max: 1e-2, noNaN: true }), (carried, local) => {
      const U = 2 * Math.hypot(carried, local);
      const decimals = Math.min(12, 1 - Math.floor(Math.log10(U)));
      const { outcome } = judgedBy(
        uCoversWhatIsCarried,
        valueFacts({
          expandedU: U.toFixed(decimals),
          reportedUnit: 'g',
          reportedUDecimals: decimals,
          carriedVariance: carried ** 2,
        }),
      );
      expect(outcome).toBe('holds');
    }),
  );
});
