import { expect, it } from 'vitest';
import { contentsForClassE } from './b-42-contents-for-class-e.ts';
import { judgedBy, referenceFacts, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (changes: Partial<ValueFacts>) => judgedBy(contentsForClassE, valueFacts(changes));
const E1 = { class: 'E1' } as const;

it('holds with the conventional mass, on this line or its twin; for E1 with the density', () => {
  expect(judge({}).text).toContain('what class E2 needs: the conventional mass with U and k.');
  expect(judge(E1).text).toContain('and the density, estimated');
  expect(judgedBy(contentsForClassE, referenceFacts()).text).toContain('and the density, measured');
  expect(judge({ quantity: 'mass', otherKind: valueFacts() }).outcome).toBe('holds');
});

it('fails without conventional mass, or with one without U or k', () => {
  expect(judge({ quantity: 'mass' })).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(judge({ expandedU: null }).sentence).toBe('no uncertainty');
  const bare = valueFacts({ k: null });
  expect(judge({ quantity: 'mass', otherKind: bare }).sentence).toBe('no uncertainty');
});

it('cannot be judged for E1 without a density on record: that is reported by B-03', () => {
  expect(judge({ ...E1, density: null })).toMatchObject({ outcome: 'cannot be judged', severity: 'minor' });
  expect(judge({ density: null }).outcome).toBe('holds');
});

it('does not apply to other classes and to none', () => {
  expect(judge({ class: 'F1' }).sentence).toBe('other class');
  expect(judge({ class: null }).sentence).toBe('no class');
});
