import { expect, it } from 'vitest';
import { programmeJustified } from './b-53-programme-justified.ts';
import { judgedBy, linkFacts, referenceFacts } from './example-facts.ts';
import type { LinkFacts, ProgrammeFacts } from './facts.ts';

const [programme] = linkFacts().programmes;
const judge = (changes: Partial<ProgrammeFacts>, link: Partial<LinkFacts> = {}) =>
  judgedBy(programmeJustified, linkFacts({ programmes: [{ ...programme!, ...changes }], ...link }));

it('holds with method and reason', () => {
  expect(judge({})).toMatchObject({ outcome: 'holds', sentence: 'justified' });
});

it('holds, and says so, where the interval was stated at registration and no more', () => {
  expect(judge({ justification: 'Stated by the holder at registration.' })).toMatchObject({
    outcome: 'holds',
    sentence: 'stated only',
  });
});

it('fails where method or reason say nothing', () => {
  expect(judge({ justification: ' ' })).toMatchObject({ outcome: 'fails', severity: 'minor' });
  expect(judge({ method: '-' }).text).toContain('River Laboratory for RL 0001 (36 months) does not say');
});

it('cannot be judged without a programme, and that weighs little beside B-14', () => {
  expect(judge({}, { programmes: [] })).toMatchObject({
    outcome: 'cannot be judged',
    severity: 'information',
  });
});

it('does not apply to a consensus value', () => {
  expect(judge({}, { parent: referenceFacts({ rootKind: 'consensus value' }) }).outcome).toBe(
    'does not apply',
  );
});
