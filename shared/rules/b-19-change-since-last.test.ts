import { expect, it } from 'vitest';
import { changeSinceLast } from './b-19-change-since-last.ts';
import { historyFacts, judgedBy, valueFacts, WEIGHT } from './example-facts.ts';
import type { HistoryFacts, ValueFacts } from './facts.ts';

/** U is 0.30 mg on both sides: U of the change 0.424 mg. */
const past = (deviation: string, year = 2023, changes: Partial<HistoryFacts> = {}) =>
  historyFacts({
    uid: `value-${year}`,
    deviation,
    performedEnd: `${year}-02-02`,
    certificateNo: `RL-${year}`,
    ...changes,
  });
const judge = (deviation: string, history: HistoryFacts[], changes: Partial<ValueFacts> = {}) =>
  judgedBy(changeSinceLast, valueFacts({ deviation, history, ...changes }));

it('holds for a change within its U', () => {
  expect(judge('0.0002', [past('0.0006')])).toMatchObject({ outcome: 'holds', sentence: 'small' });
  expect(judge('0.0002', [past('0.0006')]).text).toContain('0.94 of its U');
});

it('only asks between 1 and 1.5', () => {
  expect(judge('0.0002', [past('0.00081')])).toMatchObject({
    outcome: 'holds',
    severity: 'information',
    sentence: 'question',
  });
});

it('fails beyond 1.5', () => {
  const found = judge('0.0002', [past('0.0009')]);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain(
    'from +0.90\u2009mg (certificate RL-2023, 2023-02-02) to +0.20\u2009mg (certificate RL-2025-031): 1.6 of its U',
  );
});

it('counts a known covariance: the same change is larger against what is not shared', () => {
  const shared = 0.0001 ** 2;
  expect(judge('0.0002', [past('0.0006', 2023, { covariance: shared })]).sentence).toBe('question');
});

it('compares with the newest earlier value, and leaves later ones to theirs', () => {
  expect(judge('0.0002', [past('0.0009', 2021), past('0.0003', 2023)]).sentence).toBe('small');
  expect(judge('0.0002', [past('0.0009', 2027)]).sentence).toBe('first');
});

it('leaves the question to the value before, where an older one agrees', () => {
  expect(judge('0.0002', [past('0.00021', 2021), past('0.0009', 2023)])).toMatchObject({
    outcome: 'holds',
    sentence: 'returned',
  });
  expect(judge('0.0002', [past('0.0002', 2021, { expandedU: null }), past('0.0009', 2023)]).outcome).toBe(
    'fails',
  );
});

it('weighs a large change against the drift declared for the weight', () => {
  // 0.7 mg in 2.1 years, U of the change 0.424 mg; a drift of u 0.15 mg a year brings U 0.63 mg in that time.
  const drifting = (u: number, determinedOn: string | null = null) =>
    judge('0.0002', [past('0.0009')], { weight: { ...WEIGHT, driftRates: [{ u, determinedOn }] } });
  const within = drifting(0.00015);
  expect(within).toMatchObject({ outcome: 'holds', severity: 'information', sentence: 'within drift' });
  expect(within.text).toContain(
    '1.6 of its U, and 0.92 of it with the drift declared for MI 0007, 0.63\u2009mg',
  );
  expect(drifting(0.00001)).toMatchObject({ outcome: 'fails', sentence: 'beyond drift' });
  expect(drifting(0.00015, '2026-01-01').sentence).toBe('large');
});

it('lets an M weight wear by its maximum permissible error', () => {
  const coarse = { expandedU: '0.003', reportedDecimals: 1 };
  expect(judge('-0.03', [past('0.01', 2023, coarse)], { class: 'M1', ...coarse }).sentence).toBe('wear');
  expect(judge('-0.05', [past('0.01', 2023, coarse)], { class: 'M1', ...coarse }).outcome).toBe('fails');
});

it('does not apply to the first value, nor where sign, unit or identity are asked about', () => {
  expect(judge('0.0002', []).outcome).toBe('does not apply');
  expect(judge('-0.0006', [past('0.0006')]).sentence).toBe('asked elsewhere');
  expect(judge('0.21', [past('0.0002')], { expandedU: '0.3' }).sentence).toBe('asked elsewhere');
  const duplicate = {
    registryNo: 'MI 0008',
    marking: '1 kg*',
    result: historyFacts({ deviation: '0.0012' }),
    history: [historyFacts({ deviation: '0.0002', performedEnd: '2023-02-02' })],
  };
  expect(judge('0.0002', [past('0.0012')], { duplicates: [duplicate] }).sentence).toBe('asked elsewhere');
});

it('does not compare with a value whose own sign or unit is the odd one', () => {
  const history = [past('0.0006', 2021), past('-0.00059', 2023)];
  expect(judge('0.00062', history).text).toContain('certificate RL-2021');
  const slipped = past('0.6', 2023, { expandedU: '0.3' });
  expect(judge('0.00062', [past('0.0006', 2021), slipped]).text).toContain('certificate RL-2021');
});

it('cannot be judged where U is not stated, and names the certificate', () => {
  expect(judge('0.0002', [past('0.0002')], { expandedU: null }).text).toContain('RL-2025-031 states no U');
  expect(judge('0.0002', [past('0.0002', 2023, { expandedU: null })]).text).toContain('RL-2023 states no U');
});

it('does not compare with a value that was exchanged with the duplicate', () => {
  const partner = {
    registryNo: 'MI 0008',
    marking: '1 kg*',
    result: historyFacts({ uid: 'partner', deviation: '0.0012' }),
    history: [past('0.0002', 2023), past('0.00121', 2027)],
  };
  const history = [past('0.0012', 2023), past('0.00021', 2027)];
  expect(judge('0.0002', history, { duplicates: [partner] }).sentence).toBe('first');
  const elsewhere = { ...partner, history: [past('0.00121', 2027)] };
  expect(judge('0.0002', history, { duplicates: [elsewhere] }).outcome).toBe('fails');
});

it('leaves a change that was found and adjusted in the same calibration', () => {
  const nextEpoch = {
    reason: 'adjusted',
    beginsOn: '2025-02-17',
    lastGoodOn: null,
    recordedAt: '2025-02-17T08:00:00.000000Z',
  };
  const found = { stage: 'as found', nextEpoch, performedEnd: '2025-02-19' } as const;
  expect(judge('0.0002', [past('0.0009')], found)).toMatchObject({
    outcome: 'holds',
    severity: 'information',
    sentence: 'adjusted',
  });
  expect(judge('0.0002', [past('0.0009')], { ...found, stage: null }).outcome).toBe('fails');
  const later = { ...nextEpoch, beginsOn: '2025-06-02' };
  expect(judge('0.0002', [past('0.0009')], { ...found, nextEpoch: later }).outcome).toBe('fails');
});
