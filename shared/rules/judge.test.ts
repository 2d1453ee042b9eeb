import { describe, expect, it } from 'vitest';
import { ChainCheck } from '#shared/contracts/chains.ts';
import {
  FOCUS,
  QUESTION,
  REFERENCE,
  chainFacts,
  linkFacts,
  referenceFacts,
  valueFacts,
} from './example-facts.ts';
import type { ChainFacts, EndFacts, LinkFacts, ValueFacts } from './facts.ts';
import { judgeChain, judgeLink, judgeValue, standingOf, type Check } from './judge.ts';
import { RULES } from './rule-set.ts';
import { fillSentence } from './sentence.ts';

function chainOf(link: LinkFacts, changes: Partial<ChainFacts> = {}): ChainFacts {
  return chainFacts({ values: [link.child, link.parent], links: [link], ...changes });
}
const failing = (checks: Check[]) =>
  checks.filter((check) => check.outcome === 'fails').map((check) => `${check.rule} ${check.verdict}`);
const WITHDRAWN: EndFacts = {
  kind: 'withdrawn',
  effectiveOn: '2025-01-01',
  madeKnownOn: '2025-12-01',
  recordedAt: '2025-12-01T09:00:00.000000Z',
  changed: 'value',
  replacedBy: null,
};

describe('judgeChain', () => {
  it('finds nothing in a chain that is in order', () => {
    const judgement = judgeChain(chainFacts());
    expect(failing(judgement.checks)).toEqual([]);
    expect(judgement.links).toEqual([
      { childUid: FOCUS, parentUid: REFERENCE, conduct: 'sound', today: 'sound' },
    ]);
    expect(judgement.rules).toHaveLength(RULES.length);
  });

  it('judges every rule once per subject and verdict, in the form of the reply, with sentences that fill', () => {
    const { checks, rules } = judgeChain(chainFacts());
    const sentences = new Map(rules.map((rule) => [rule.id, rule.sentences]));
    for (const check of checks) {
      expect(ChainCheck.parse(check)).toEqual(check);
      expect(fillSentence(sentences.get(check.rule)?.[check.sentence ?? ''] ?? '', check.parameters)).toMatch(
        /\.$|\?$/,
      );
    }
    const keys = checks.map((check) => JSON.stringify([check.rule, check.subject, check.verdict]));
    expect(new Set(keys).size).toBe(keys.length);
    const times = { link: 1, value: 2, chain: 1 };
    expect(checks).toHaveLength(
      RULES.reduce((sum, rule) => sum + times[rule.scope] * rule.verdicts.length, 0),
    );
  });

  it('keeps conduct and today apart for a withdrawal that was back-dated', () => {
    const { checks, links } = judgeChain(
      chainOf(linkFacts({ parent: referenceFacts({ ends: [WITHDRAWN] }) })),
    );
    expect(failing(checks)).toEqual(['B-15 today']);
    expect(links[0]).toMatchObject({ conduct: 'sound', today: 'broken' });
  });

  it('counts a flaw of the result itself for today as well, and a lapse of conduct not', () => {
    const deficit = judgeChain(chainOf(linkFacts({ child: valueFacts({ carriedVariance: 0.0002 ** 2 }) })));
    expect(failing(deficit.checks)).toEqual(['B-21 conduct']);
    expect(deficit.links[0]).toMatchObject({ conduct: 'broken', today: 'broken' });
    const late = judgeChain(chainOf(linkFacts({ usedBegin: '2028-01-01', usedEnd: '2028-01-02' })));
    expect(failing(late.checks)).toEqual(['B-14 conduct']);
    expect(late.links[0]).toMatchObject({ conduct: 'broken', today: 'sound' });
  });

  it('reports a deficit where it arises: the step below only inherits', () => {
    const middle = referenceFacts({
      rootKind: null,
      references: 1,
      holder: valueFacts().issuer,
      carriedVariance: 0.00008 ** 2,
    });
    const root = referenceFacts({
      uid: 'value-root',
      calibrationId: 'calibration-root',
      performedEnd: '2022-01-01',
    });
    const lower = linkFacts({ parent: middle });
    const upper = linkFacts({ child: middle, parent: root, usedBegin: '2024-01-12', usedEnd: '2024-01-15' });
    const { checks } = judgeChain(chainFacts({ values: [lower.child, middle, root], links: [lower, upper] }));
    const deficits = checks.filter((check) => check.rule === 'B-21' && check.outcome === 'fails');
    expect(deficits.map((check) => check.subject)).toEqual([{ type: 'value', uid: REFERENCE }]);
  });

  it('lets the checks of a root count where it is leaned on', () => {
    const root = referenceFacts({ recognitions: [] });
    const { links } = judgeChain(chainOf(linkFacts({ parent: root })));
    expect(links[0]).toMatchObject({ conduct: 'not judged', today: 'sound' });
  });

  it('does not judge a link that only informs', () => {
    const informs = linkFacts({ role: 'informs', programmes: [] });
    const { checks, links } = judgeChain(chainOf(informs));
    expect(checks.some((check) => check.subject.type === 'link')).toBe(false);
    expect(links[0]).toMatchObject({ conduct: 'sound', today: 'sound' });
  });

  it('says "cannot be judged", and invents nothing, for a historic root with years and without U', () => {
    const historic: Partial<ValueFacts> = {
      uid: 'value-1948',
      rootKind: 'recognized certificate',
      references: 0,
      quantity: 'mass',
      class: null,
      expandedU: null,
      reportedUDecimals: null,
      k: null,
      coverage: null,
      datePrecision: 'year',
      underAccreditation: false,
      carriedVariance: null,
      scope: [],
      recognitions: [],
    };
    const value = valueFacts(historic);
    const { checks } = judgeChain(
      chainFacts({ focusUid: value.uid, values: [value], links: [], contributions: null, varianceNow: null }),
    );
    expect(failing(checks)).toEqual([]);
    const open = checks.filter((check) => check.outcome === 'cannot be judged').map((check) => check.rule);
    expect(open).toEqual(['B-28', 'B-45', 'B-47']);
  });
});

describe('standingOf', () => {
  const check = (outcome: Check['outcome'], severity: Check['severity']): Check => ({
    rule: 'B-14',
    subject: { type: 'chain' },
    verdict: 'conduct',
    outcome,
    severity,
    parameters: {},
    sentence: 'x',
  });

  it.each([
    [[], 'sound'],
    [[check('holds', 'critical'), check('does not apply', 'block')], 'sound'],
    [[check('holds', 'information')], 'sound'],
    [[check('fails', 'block')], 'broken'],
    [[check('fails', 'critical')], 'broken'],
    [[check('fails', 'minor'), check('fails', 'major')], 'broken'],
    [[check('fails', 'minor')], 'caution'],
    [[check('fails', 'information'), check('cannot be judged', 'critical')], 'caution'],
    [[check('cannot be judged', 'major')], 'not judged'],
    [[check('cannot be judged', 'minor')], 'sound'],
    [[check('cannot be judged', 'critical'), check('fails', 'major')], 'broken'],
  ] as const)('%j is %s', (checks, standing) => {
    expect(standingOf([...checks])).toBe(standing);
  });
});

it('judges a single link and a single value, for a draft', () => {
  expect(
    judgeLink(linkFacts({ programmes: [] }), QUESTION).find((check) => check.rule === 'B-14')?.outcome,
  ).toBe('cannot be judged');
  expect(failing(judgeValue(valueFacts({ references: 0 }), QUESTION))).toEqual(['B-10 conduct']);
});
