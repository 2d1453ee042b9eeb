import { expect, it } from 'vitest';
import { agesAlongChain } from './b-49-ages.ts';
import { chainFacts, judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';
import type { LinkFacts } from './facts.ts';

const judge = (changes: Partial<LinkFacts>) => {
  const link = linkFacts(changes);
  return judgedBy(agesAlongChain, chainFacts({ values: [link.child, link.parent], links: [link] }));
};
/** Without a programme, used ten years and a day after it was determined, or exactly ten years. */
const old = (usedEnd: string) => ({ programmes: [], usedBegin: usedEnd, usedEnd });

it('says how old the oldest was at its use, and how long the chain is', () => {
  expect(judge({}).text).toBe(
    'Oldest at its use was IP-2024-002 (2024-01-15, leaned on until 2025-03-10: 1 year 1 month). From IP-2024-002 (2024-01-15) to 2026-06-01 lie 2 years 4 months.',
  );
  expect(judge({ usedEnd: '2024-01-20' }).text).toContain('less than a month');
});

it('holds up to ten years without a programme, and beyond with one: that is for B-14', () => {
  expect(judge(old('2034-01-15')).outcome).toBe('holds');
  const programmes = [{ ...linkFacts().programmes[0]!, intervalMonths: 180 }];
  expect(judge({ ...old('2035-01-15'), programmes }).outcome).toBe('holds');
});

it('fails beyond ten years where no programme governs it', () => {
  const found = judge(old('2034-01-16'));
  expect(found).toMatchObject({ outcome: 'fails', severity: 'minor' });
  expect(found.text).toContain(
    'until 2034-01-16, 10 years later, and no calibration programme of River Laboratory',
  );
});

it('cannot be judged where a year does not decide', () => {
  const parent = referenceFacts({ performedEnd: '2024-01-01', datePrecision: 'year' });
  expect(judge({ ...old('2034-06-01'), parent }).outcome).toBe('cannot be judged');
});

it('does not apply to a root, nor above an agreed value', () => {
  const root = { links: [], values: [valueFacts()] };
  expect(judgedBy(agesAlongChain, chainFacts(root)).outcome).toBe('does not apply');
  expect(
    judge({ ...old('2040-01-01'), parent: referenceFacts({ rootKind: 'consensus value' }) }).outcome,
  ).toBe('does not apply');
});
