import { expect, it } from 'vitest';
import { statementOfU } from './b-28-statement-of-u.ts';
import { judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (changes: Partial<ValueFacts>) => judgedBy(statementOfU, valueFacts(changes));

it('holds for U with k and p, two digits, value to the same place', () => {
  expect(judge({}).outcome).toBe('holds');
  expect(
    judge({ deviation: '0.03', expandedU: '0.12', reportedDecimals: 0, reportedUDecimals: 0 }).outcome,
  ).toBe('holds');
});

it('fails without k, with three digits, or where value and U end at different places', () => {
  expect(judge({ k: null })).toMatchObject({ outcome: 'fails', severity: 'minor', sentence: 'no k' });
  expect(judge({ expandedU: '0.000305', reportedUDecimals: 3, reportedDecimals: 3 }).sentence).toBe('digits');
  expect(judge({ expandedU: '0.125', reportedUDecimals: 0, reportedDecimals: 0 }).sentence).toBe('digits');
  expect(judge({ reportedDecimals: 3 }).text).toContain(
    '+0.210\u2009mg and U 0.30\u2009mg: not to the same place',
  );
});

it('cannot be judged where U, its decimals or the probability are not on record', () => {
  expect(judge({ expandedU: null }).sentence).toBe('no uncertainty');
  expect(judge({ reportedUDecimals: null }).sentence).toBe('not printed');
  expect(judge({ coverage: null }).sentence).toBe('no probability');
});

it('does not apply to the earlier definition', () => {
  expect(judge({ rootKind: 'earlier definition', expandedU: null }).outcome).toBe('does not apply');
});
