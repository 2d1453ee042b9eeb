import { expect, it } from 'vitest';
import { providerAccepted } from './b-45-provider-accepted.ts';
import { judgedBy, LABORATORY, valueFacts } from './example-facts.ts';
import type { RecognitionFacts, ValueFacts } from './facts.ts';

const judge = (changes: Partial<ValueFacts>) => judgedBy(providerAccepted, valueFacts(changes));
const recognition = (changes: Partial<RecognitionFacts>): RecognitionFacts[] => [
  { ...valueFacts().recognitions[0]!, ...changes },
];

it('holds on each of the routes', () => {
  expect(judge({ recognitions: recognition({ kind: 'institute arrangement' }) }).text).toContain('route 1');
  expect(judge({}).text).toContain('route 2');
  expect(judge({ rootKind: 'accepted stop', recognitions: [] }).text).toContain('route 3');
  const institute = {
    recognitions: recognition({ kind: 'institute arrangement' }),
    underAccreditation: false,
  };
  expect(judge(institute).outcome).toBe('holds');
  expect(judge({ rootKind: 'recognized certificate', underAccreditation: false }).outcome).toBe('holds');
});

it('fails where the recognition was suspended or the certificate does not claim it', () => {
  const suspended = judge({ recognitions: recognition({ state: 'suspended' }) });
  expect(suspended).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(suspended.text).toContain(
    '(Accreditation of the Plain, K-17) was suspended when certificate RL-2025-031 was issued on 2025-03-14',
  );
  expect(judge({ underAccreditation: false }).sentence).toBe('not under accreditation');
});

it('cannot be judged where nothing is on record, or the year does not decide', () => {
  expect(judge({ recognitions: [] }).sentence).toBe('not recorded');
  expect(judge({ recognitions: recognition({ validTo: '2025-03-13' }) }).sentence).toBe('not recorded');
  const coarse = { recognitions: recognition({ validTo: '2025-06-30' }), datePrecision: 'year' } as const;
  expect(judge({ ...coarse }).sentence).toBe('undecided');
});

it("does not apply to a laboratory's own weight, nor to a consensus value", () => {
  expect(judge({ holder: LABORATORY, recognitions: [] }).sentence).toBe('in-house');
  expect(judge({ rootKind: 'consensus value' }).sentence).toBe('reference');
});
