import { expect, it } from 'vitest';
import { referenceNamed } from './b-10-reference-named.ts';
import { CUSTOMER, judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (changes: Partial<ValueFacts>) => judgedBy(referenceNamed, valueFacts(changes));

it('holds where references are named', () => {
  expect(judge({ references: 1 }).text).toContain('names one reference for MI 0007');
  expect(judge({ references: 2 }).text).toContain('names 2 references');
});

it("fails without any: blocks the issuer's own calibration, is critical for a certificate received", () => {
  const own = judge({ references: 0 });
  expect(own).toMatchObject({ outcome: 'fails', severity: 'block' });
  expect(own.text).toContain('Certificate RL-2025-031 names no reference for MI 0007');
  const received = { references: 0, registeredByIssuer: false, recognitions: [], holder: CUSTOMER };
  expect(judge(received)).toMatchObject({ outcome: 'fails', severity: 'critical' });
});

it('does not apply to a stated reference, nor to a recognized issuer that discloses none', () => {
  expect(judge({ references: 0, rootKind: 'consensus value' }).outcome).toBe('does not apply');
  expect(judge({ references: 0, registeredByIssuer: false })).toMatchObject({
    outcome: 'does not apply',
    sentence: 'recognized stop',
  });
});

it('cannot be judged where the recognition changed within a year known only as a year', () => {
  const [recognition] = valueFacts().recognitions;
  const found = judge({
    references: 0,
    registeredByIssuer: false,
    datePrecision: 'year',
    recognitions: [{ ...recognition!, validFrom: '2025-06-01' }],
  });
  expect(found.outcome).toBe('cannot be judged');
  expect(found.text).toContain('within 2025');
});
