import fc from 'fast-check';
import { expect, it } from 'vitest';
import { referenceDeterminedFirst } from './b-12-reference-determined-first.ts';
import { judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';
import type { LinkFacts, ValueFacts } from './facts.ts';

const judge = (parent: Partial<ValueFacts>, changes: Partial<LinkFacts> = {}) =>
  judgedBy(referenceDeterminedFirst, linkFacts({ parent: referenceFacts(parent), ...changes }));

it('holds where the reference was determined before, or on the same day', () => {
  expect(judge({}).outcome).toBe('holds');
  expect(judge({ performedEnd: '2025-03-09' }).outcome).toBe('holds');
});

it('fails where it was determined later, and names certificate and dates', () => {
  const found = judge({ performedEnd: '2025-03-10' });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(found.text).toContain(
    'Certificate IP-2024-002 was determined on 2025-03-10, after its first use on 2025-03-09',
  );
});

it('accepts a declared bracketing whose later value was issued in time', () => {
  const later = { performedEnd: '2025-03-12' };
  expect(judge({ ...later, issuedOn: '2025-03-14' }, { usedAs: 'bracketing' }).sentence).toBe('bracketed');
  expect(judge({ ...later, issuedOn: '2025-03-15' }, { usedAs: 'bracketing' }).sentence).toBe(
    'bracketing too late',
  );
  expect(
    judge({ ...later, issuedOn: '2025-03-01', datePrecision: 'month' }, { usedAs: 'bracketing' }).outcome,
  ).toBe('cannot be judged');
});

it('blocks a calibration that leans on itself', () => {
  expect(judge({ calibrationId: valueFacts().calibrationId })).toMatchObject({
    outcome: 'fails',
    severity: 'block',
    sentence: 'same event',
  });
});

it('cannot be judged where years alone are known', () => {
  const found = judge({ performedEnd: '2025-01-01', datePrecision: 'year' });
  expect(found.outcome).toBe('cannot be judged');
  expect(found.text).toContain('IP-2024-002 (2025)');
});

it('does not apply to the earlier definition', () => {
  expect(judge({ rootKind: 'earlier definition' }).outcome).toBe('does not apply');
});

it('never fails for work of one calendar day, whatever the day', () => {
  const day = fc.date({ min: new Date('1890-01-01'), max: new Date('2090-01-01'), noInvalidDate: true });
  fc.assert(
    fc.property(day, (date) => {
      const same = date.toISOString().slice(0, 10);
      expect(judge({ performedEnd: same }, { usedBegin: same, usedEnd: same }).outcome).toBe('holds');
    }),
  );
});
