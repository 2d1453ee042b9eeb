import { expect, it } from 'vitest';
import { signatoryAuthorised } from './b-38-signatory-authorised.ts';
import { judgedBy, SHEET, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';
import type { AuthorisationFacts, SheetFacts } from './weight-facts.ts';

/** Issued and recorded on 2025-03-14. */
const judge = (sheet: Partial<SheetFacts>, changes: Partial<ValueFacts> = {}) =>
  judgedBy(signatoryAuthorised, valueFacts({ sheet: { ...SHEET, ...sheet }, ...changes }));
const authorisation = (changes: Partial<AuthorisationFacts>): AuthorisationFacts => ({
  ...SHEET.signatory![0]!,
  ...changes,
});

it('holds on the first and on the last day of the authorisation', () => {
  expect(judge({}).outcome).toBe('holds');
  const oneDay = authorisation({ validFrom: '2025-03-14', validTo: '2025-03-14' });
  expect(judge({ signatory: [oneDay] }).outcome).toBe('holds');
});

it('fails before, after, and once it was ended; and where somebody else alone is authorised', () => {
  expect(judge({ signatory: [authorisation({ validTo: '2025-03-13' })] })).toMatchObject({
    outcome: 'fails',
    severity: 'major',
  });
  expect(judge({ signatory: [authorisation({ validFrom: '2025-03-15' })] }).outcome).toBe('fails');
  const ended = authorisation({
    state: 'ended',
    validFrom: '2025-03-01',
    recordedAt: '2025-03-01T09:00:00.000000Z',
  });
  expect(judge({ signatory: [authorisation({}), ended] }).outcome).toBe('fails');
  expect(judge({ signatory: [] }).outcome).toBe('fails');
});

it('an end entered later does not reach back', () => {
  const ended = authorisation({
    state: 'ended',
    validFrom: '2025-03-01',
    recordedAt: '2025-06-01T09:00:00.000000Z',
  });
  expect(judge({ signatory: [authorisation({}), ended] }).outcome).toBe('holds');
});

it('cannot be judged without signatory or authorisations, entered later, or by a coarse date', () => {
  expect(judge({ signatory: null })).toMatchObject({ outcome: 'cannot be judged', severity: 'information' });
  expect(judge({ signatory: [], hasAuthorisations: false }).sentence).toBe('no authorisations');
  const history = { recordedAt: '2026-05-02T09:00:00.000000Z' };
  expect(judge({ signatory: [] }, history)).toMatchObject({ sentence: 'entered later', severity: 'minor' });
  const half = authorisation({ validTo: '2025-03-20' });
  expect(judge({ signatory: [half] }, { datePrecision: 'month' }).sentence).toBe('undecided');
});

it('does not apply to a draft, nor to a certificate received', () => {
  expect(judge({ isIssued: false, signatory: null }).sentence).toBe('not yet');
  expect(judge({ signatory: [] }, { registeredByIssuer: false }).sentence).toBe('received');
});
