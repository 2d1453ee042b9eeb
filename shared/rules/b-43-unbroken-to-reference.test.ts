import { expect, it } from 'vitest';
import { unbrokenToReference } from './b-43-unbroken-to-reference.ts';
import { REFERENCE, chainFacts, judgedBy, referenceFacts, valueFacts } from './example-facts.ts';
import type { ChainFacts, ValueFacts } from './facts.ts';

const judge = (changes: Partial<ChainFacts>) => judgedBy(unbrokenToReference, chainFacts(changes));
const endingAt = (changes: Partial<ValueFacts>) =>
  judge({ values: [valueFacts(), referenceFacts({ rootKind: null, ...changes })] });

it('holds to a stated reference, and to a recognized issuer that discloses none', () => {
  expect(judge({})).toMatchObject({ outcome: 'holds' });
  expect(judge({}).text).toContain('RL 0001, certificate IP-2024-002');
  expect(endingAt({ registeredByIssuer: false }).outcome).toBe('holds');
});

it('fails where a branch ends elsewhere, and names the place', () => {
  const found = endingAt({});
  expect(found).toMatchObject({ outcome: 'fails', severity: 'critical', sentence: 'broken' });
  expect(found.text).toContain('at RL 0001, certificate IP-2024-002');
  expect(endingAt({ registeredByIssuer: false, recognitions: [] }).outcome).toBe('fails');
});

it('fails where a named reference is not in the register', () => {
  const known = judge({ missingReferences: [{ childUid: REFERENCE, named: 'QX-9' }] });
  expect(known.text).toContain('RL 0001, certificate IP-2024-002 (names QX-9)');
  expect(judge({ missingReferences: [{ childUid: 'nowhere', named: 'QX-9' }] }).text).toContain(
    'ends at QX-9',
  );
});

it('cannot be judged where the day of issue would decide the recognition', () => {
  const [recognition] = valueFacts().recognitions;
  const changes = {
    registeredByIssuer: false,
    datePrecision: 'year',
    recognitions: [{ ...recognition!, validFrom: '2024-06-01' }],
  } as const;
  expect(endingAt({ ...changes, recognitions: [...changes.recognitions] }).outcome).toBe('cannot be judged');
});

it('does not apply to a stated reference itself', () => {
  expect(judge({ focusUid: REFERENCE }).outcome).toBe('does not apply');
});
