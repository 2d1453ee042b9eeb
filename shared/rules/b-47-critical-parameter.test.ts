import { expect, it } from 'vitest';
import { criticalParameter } from './b-47-critical-parameter.ts';
import { chainFacts, judgedBy } from './example-facts.ts';
import type { ContributionFacts } from './facts.ts';

const judge = (contributions: ContributionFacts[] | null) =>
  judgedBy(criticalParameter, chainFacts({ contributions }));
const top = (label: string, share: number) => ({ label, share, isTop: true });

it('adds up the top, and marks more than a quarter without failing it', () => {
  expect(judge([top('consensus 2023', 0.1), top('RL 0001', 0.15)])).toMatchObject({
    outcome: 'holds',
    sentence: 'small',
  });
  const found = judge([
    top('consensus 2023', 0.2),
    top('RL 0001', 0.1),
    { label: 'MI 0007', share: 0.7, isTop: false },
  ]);
  expect(found).toMatchObject({ outcome: 'holds', severity: 'information', sentence: 'critical' });
  expect(found.text).toContain(
    '30 % of the variance comes from the top of the chain (consensus 2023; RL 0001)',
  );
});

it('cannot be judged where the shares are unknown', () => {
  expect(judge(null).outcome).toBe('cannot be judged');
});

it('does not apply where nothing comes from the top', () => {
  expect(judge([{ label: 'MI 0007', share: 1, isTop: false }]).outcome).toBe('does not apply');
});
