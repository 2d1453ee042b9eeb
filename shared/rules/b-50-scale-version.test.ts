import { expect, it } from 'vitest';
import { scaleVersionConstant } from './b-50-scale-version.ts';
import { chainFacts, judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';
import type { LinkFacts } from './facts.ts';

const OLD = 'consensus 2021';
/** The reference stands on an earlier scale than the result; one notice takes it there. */
const step = (changes: Partial<LinkFacts> = {}) =>
  linkFacts({
    parent: referenceFacts({ scaleVersion: OLD }),
    scaleMap: { notices: ['IP-N3'], shift: -0.000005, u: 0 },
    ...changes,
  });
const judge = (link: LinkFacts) =>
  judgedBy(scaleVersionConstant, chainFacts({ links: [link], values: [link.child, link.parent] }));
const notices = [
  { number: 'IP-N3', title: '', effectiveOn: '2024-01-01', madeKnownOn: '2023-12-01', shift: 0, u: 0 },
];

it('holds where the scale is the same, or converted by a notice', () => {
  expect(judge(linkFacts()).text).toBe('Every step of the chain stands on consensus 2023.');
  const converted = judge(step({ usedAs: 'by notice' }));
  expect(converted).toMatchObject({ outcome: 'holds', sentence: 'converted' });
  expect(converted.text).toContain('(consensus 2023; consensus 2021) by notice IP-N3');
});

it('fails where it changes without conversion, by the effect on u', () => {
  // 5 ug beside u = 150 ug: 0.06 %.
  expect(judge(step())).toMatchObject({
    outcome: 'fails',
    severity: 'information',
    sentence: 'not converted',
  });
  const grave = judge(step({ scaleMap: { notices: ['IP-N3'], shift: -0.00006, u: 0 } }));
  expect(grave).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(grave.text).toContain('by notice IP-N3 that is 7.7 % of u');
});

it('tells the step with the largest effect', () => {
  const child = valueFacts({ certificateNo: 'RL-2025-032' });
  const links = [step(), step({ child, scaleMap: { notices: ['IP-N4'], shift: 0.0002, u: 0 } })];
  const found = judgedBy(scaleVersionConstant, chainFacts({ links }));
  expect(found.text).toContain('Certificate RL-2025-032');
});

it('cannot be judged without the notice, a scale, or U', () => {
  expect(judge(step({ scaleMap: null }))).toMatchObject({
    outcome: 'cannot be judged',
    sentence: 'no notice',
  });
  const silent = linkFacts({ parent: referenceFacts({ scaleVersion: null }), scaleMap: null });
  expect(judge(silent)).toMatchObject({ outcome: 'cannot be judged', sentence: 'not stated' });
  expect(judge(step({ child: valueFacts({ expandedU: null }) })).sentence).toBe('no uncertainty');
});

it('does not apply where no scale is stated, or where the notice was in force and is missed at its link', () => {
  const none = linkFacts({
    child: valueFacts({ scaleVersion: null }),
    parent: referenceFacts({ scaleVersion: null }),
    scaleMap: null,
  });
  expect(judge(none).sentence).toBe('none');
  expect(judge(step({ notices }))).toMatchObject({ outcome: 'does not apply', sentence: 'at a link' });
});

it('asks nothing of a reference used by its class limit', () => {
  expect(judge(step({ usedAs: 'class limit' })).outcome).toBe('holds');
});
