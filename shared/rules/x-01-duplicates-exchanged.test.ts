import { expect, it } from 'vitest';
import { historyFacts, judgedBy, valueFacts } from './example-facts.ts';
import type { DuplicateFacts, HistoryFacts, ValueFacts } from './facts.ts';
import { duplicatesExchanged } from './x-01-duplicates-exchanged.ts';

/** Two weights, about +0.2 mg and +1.2 mg, U 0.30 mg: 3.3 U apart. */
const past = (deviation: string, year = 2023, changes: Partial<HistoryFacts> = {}) =>
  historyFacts({ deviation, performedEnd: `${year}-02-02`, ...changes });
const duplicate = (
  deviation: string,
  history: HistoryFacts[],
  expandedU: string | null = '0.0003',
): DuplicateFacts => ({
  registryNo: 'MI 0008',
  marking: '1 kg*',
  result: historyFacts({ deviation, expandedU }),
  history,
});
const judge = (
  deviation: string,
  history: HistoryFacts[],
  other: DuplicateFacts | null,
  changes: Partial<ValueFacts> = {},
) =>
  judgedBy(
    duplicatesExchanged,
    valueFacts({ deviation, history, duplicates: other ? [other] : [], ...changes }),
  );

it('holds where each fits its own history', () => {
  expect(judge('0.00021', [past('0.0002')], duplicate('0.0012', [past('0.00119')])).outcome).toBe('holds');
});

it('fails where each fits the history of the other, and names both', () => {
  const found = judge('0.0012', [past('0.0002')], duplicate('0.00021', [past('0.00119')]));
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('MI 0007 (1 kg) and MI 0008 (1 kg*) each fit the history of the other');
});

it('asks about the event at which they were exchanged, not about the one after it', () => {
  const own = [past('0.0002', 2021), past('0.0012', 2023)];
  const others = [past('0.00119', 2021), past('0.00022', 2023)];
  expect(judge('0.00021', own, duplicate('0.00121', others)).outcome).toBe('holds');
  const later = judge(
    '0.0012',
    [past('0.0002', 2027), past('0.00021', 2029)],
    duplicate('0.0002', [past('0.0012', 2027), past('0.0012', 2029)]),
  );
  expect(later.outcome).toBe('fails');
});

it('does not ask where only one of them crosses', () => {
  expect(judge('0.0012', [past('0.0002')], duplicate('0.00021', [past('0.00022')])).outcome).toBe('holds');
});

it('does not apply without a duplicate, without history, or below 3 U', () => {
  expect(judge('0.0012', [past('0.0002')], null).sentence).toBe('single');
  expect(judge('0.0012', [], duplicate('0.0002', [])).sentence).toBe('first');
  expect(judge('0.0010', [past('0.0002')], duplicate('0.00021', [past('0.00102')])).sentence).toBe('close');
});

it('cannot be judged without U', () => {
  expect(judge('0.0012', [past('0.0002')], duplicate('0.00021', [past('0.0012')], null)).sentence).toBe(
    'no uncertainty',
  );
  const silent = [past('0.0002', 2023, { expandedU: null })];
  expect(judge('0.0012', silent, duplicate('0.00021', silent)).sentence).toBe('others without uncertainty');
});
