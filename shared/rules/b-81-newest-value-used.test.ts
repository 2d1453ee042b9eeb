import { expect, it } from 'vitest';
import { newestValueUsed } from './b-81-newest-value-used.ts';
import { judgedBy, linkFacts, referenceFacts } from './example-facts.ts';
import type { LinkFacts, OtherValueFacts } from './facts.ts';

/** The value used was determined on 2024-01-15; the use began on 2025-03-09. */
const other = (changes: Partial<OtherValueFacts> = {}): OtherValueFacts => ({
  uid: 'value-other',
  certificateNo: 'IP-2025-001',
  revisionN: 1,
  performedBegin: '2025-01-08',
  performedEnd: '2025-01-10',
  issuedOn: '2025-01-15',
  datePrecision: 'day',
  sameEpoch: true,
  ends: [],
  ...changes,
});
const judge = (otherValues: OtherValueFacts[], changes: Partial<LinkFacts> = {}) =>
  judgedBy(newestValueUsed, linkFacts({ otherValues, ...changes }));

it('holds where no newer value was known before the use', () => {
  expect(judge([]).outcome).toBe('holds');
  expect(judge([other({ performedEnd: '2022-01-10', issuedOn: '2022-01-15' })]).outcome).toBe('holds');
  expect(judge([other({ issuedOn: '2025-03-09' })]).outcome).toBe('holds');
  expect(judge([other({ sameEpoch: false })]).outcome).toBe('holds');
});

it('fails where one was, and names the newest', () => {
  const middle = other({ certificateNo: 'IP-2024-090', performedEnd: '2024-08-10', issuedOn: '2024-08-15' });
  const found = judge([middle, other()]);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain(
    'Certificate IP-2024-002 (2024-01-15) was used from 2025-03-09, though IP-2025-001 (2025-01-10) had been issued on 2025-01-15',
  );
  expect(judge([other(), middle]).text).toContain('IP-2025-001');
});

it('does not ask for a newer value that had been withdrawn, and does for one re-issued unchanged', () => {
  const end = {
    kind: 'withdrawn',
    effectiveOn: '2025-02-01',
    madeKnownOn: '2025-02-01',
    recordedAt: '2025-02-01T00:00:00.000000Z',
    changed: 'value',
    replacedBy: null,
  } as const;
  expect(judge([other({ ends: [end] })]).outcome).toBe('holds');
  expect(judge([other({ ends: [{ ...end, kind: 'superseded', changed: 'text' }] })]).outcome).toBe('fails');
});

it('cannot be judged where a year does not decide', () => {
  expect(judge([other({ datePrecision: 'year', issuedOn: '2025-01-01' })]).outcome).toBe('cannot be judged');
  expect(
    judge([other({ datePrecision: 'year', performedEnd: '2024-06-01', issuedOn: '2024-12-01' })]).outcome,
  ).toBe('cannot be judged');
});

it('does not apply to a declared fit or bracketing, nor to the earlier definition', () => {
  expect(judge([other()], { usedAs: 'fit' }).outcome).toBe('does not apply');
  expect(judge([other()], { usedAs: 'bracketing' }).outcome).toBe('does not apply');
  expect(judge([other()], { parent: referenceFacts({ rootKind: 'earlier definition' }) }).outcome).toBe(
    'does not apply',
  );
});
