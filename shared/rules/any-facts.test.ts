import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { WEIGHT_CLASSES } from '#shared/engine/conformity/r111-2004.ts';
import {
  BUDGET,
  chainFacts,
  CUSTOMER,
  historyFacts,
  INSTITUTE,
  LABORATORY,
  linkFacts,
  QUESTION,
  SHEET,
  valueFacts,
  WEIGHT,
} from './example-facts.ts';
import type { LinkFacts, Question, ValueFacts } from './facts.ts';
import { RULES } from './rule-set.ts';
import type { Finding, Rule, VerdictName } from './rule.ts';
import { fillSentence } from './sentence.ts';

const orNull = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: null });
const day = fc
  .integer({ min: 0, max: 20_000 })
  .map((days) => new Date(Date.UTC(1980, 0, 1) + days * 86_400_000).toISOString().slice(0, 10));
const instant = day.map((text) => `${text}T08:00:00.000000Z`);
const grams = fc
  .tuple(fc.integer({ min: -99_999, max: 99_999 }), fc.integer({ min: -9, max: 0 }))
  .map(([digits, power]) => (digits * 10 ** power).toFixed(Math.max(0, -power)));
const positive = fc
  .tuple(fc.integer({ min: 1, max: 999 }), fc.integer({ min: -9, max: 1 }))
  .map(([digits, power]) => (digits * 10 ** power).toFixed(Math.max(0, -power)));
const text = fc.constantFrom('', ' ', '1 kg', '1 kg *', 'Kilogram A', 'drift', 'Reference weight', 'Balance');
const property = orNull(
  fc.record({
    value: positive,
    expandedU: orNull(positive),
    k: orNull(fc.constantFrom('2', '2.87', '1')),
    origin: fc.constantFrom('measured', 'assumed', 'manufacturer'),
  }),
);
/** As the register takes them, kg/m3. */
const density = property.map(
  (one) => one && { ...one, value: String(500 + (Math.abs(Number(one.value)) % 24_500)) },
);
/** What a number of a model may be: no subnormal doubles. */
const tiny = fc.oneof(fc.constant(0), fc.double({ min: 1e-18, max: 1, noNaN: true }));
const signed = fc.tuple(tiny, fc.constantFrom(-1, 1)).map(([size, sign]) => size * sign);
const assertion = { validFrom: day, validTo: orNull(day), recordedAt: instant };
const laboratory = fc.constantFrom(INSTITUTE, LABORATORY, CUSTOMER);
const rootKind = orNull(
  fc.constantFrom(
    'realization run',
    'consensus value',
    'recognized certificate',
    'earlier definition',
    'accepted stop',
  ),
);
const kind = fc.constantFrom('weight', 'prototype', 'silicon sphere', 'realization', 'consensus value');
const usedAs = fc.constantFrom('certificate', 'by notice', 'class limit', 'fit', 'bracketing');
const stage = orNull(fc.constantFrom('as found', 'as left'));

const dates = {
  performedBegin: day,
  performedEnd: day,
  issuedOn: day,
  datePrecision: fc.constantFrom('day', 'month', 'year'),
};
const result = {
  deviation: grams,
  expandedU: orNull(positive),
  reportedUnit: fc.constantFrom('kg', 'g', 'mg', 'ug'),
  reportedDecimals: fc.integer({ min: 0, max: 9 }),
  reportedUDecimals: orNull(fc.integer({ min: 0, max: 9 })),
  k: orNull(fc.constantFrom('2', '2.87', '1')),
};
const history = fc.record({
  ...dates,
  ...result,
  covariance: orNull(signed),
});

const effect = fc.record({
  kind: fc.constantFrom('volume', 'air', 'drift', 'apparatus', 'scale version'),
  standardId: orNull(fc.constantFrom('standard-focus', 'standard-reference', 'standard-other')),
  of: fc.constantFrom('MI 0007', 'Barometer'),
  sensitivity: signed,
  u: tiny,
  determinedOn: orNull(day),
  onRecord: fc.array(
    fc.record({ ...assertion, kind: fc.constantFrom('density', 'volume'), isThis: fc.boolean() }),
    { maxLength: 3 },
  ),
});

const value: fc.Arbitrary<ValueFacts> = fc
  .record({
    ...dates,
    ...result,
    revisionN: fc.integer({ min: 1, max: 3 }),
    nominal: fc.constantFrom('1000', '0.001', '300', '20000', '1', '5000000'),
    class: orNull(fc.constantFrom(...WEIGHT_CLASSES)),
    quantity: fc.constantFrom('mass', 'conventional mass'),
    medium: fc.constantFrom('air', 'vacuum', 'inert gas'),
    stage,
    marking: text,
    decisionRule: orNull(fc.constantFrom('guarded', 'simple')),
    coverage: orNull(fc.constantFrom('0.9545', '0.95', '0.6827')),
    issuer: laboratory,
    holder: laboratory,
    registeredByIssuer: fc.boolean(),
    recordedAt: instant,
    rootKind,
    references: fc.integer({ min: 0, max: 3 }),
    density,
    otherKind: orNull(fc.constant(valueFacts())),
    carriedVariance: orNull(tiny),
    history: fc.array(history, { maxLength: 3 }),
    nextEpoch: orNull(
      fc.record({
        reason: fc.constantFrom('adjusted', 'repaired', 'damaged'),
        beginsOn: day,
        lastGoodOn: orNull(day),
        recordedAt: instant,
      }),
    ),
    weight: fc.record({
      kind,
      serial: orNull(fc.constantFrom('', '4711')),
      shape: fc.constantFrom('knob', 'cylinder', 'sphere', 'sheet', 'wire', 'block', 'other'),
      classClaimed: orNull(fc.constantFrom(...WEIGHT_CLASSES)),
      isInSet: fc.boolean(),
      alike: fc.array(
        fc.record({ registryNo: fc.constant('MI 0008'), marking: text, serial: orNull(text) }),
        { maxLength: 2 },
      ),
      volume: property,
      susceptibility: property,
      polarisation: property,
      densityOnlyFrom: orNull(day),
      driftRates: fc.array(fc.record({ u: tiny, determinedOn: orNull(day) }), { maxLength: 2 }),
    }),
    sheet: fc.record({
      isIssued: fc.boolean(),
      signatory: orNull(
        fc.array(fc.record({ ...assertion, state: fc.constantFrom('granted', 'ended') }), { maxLength: 2 }),
      ),
      hasAuthorisations: fc.boolean(),
      amendmentReason: orNull(text),
      stages: fc.array(stage, { maxLength: 2 }),
      epoch: fc.record({
        n: fc.integer({ min: 1, max: 3 }),
        reason: fc.constantFrom('new', 'adjusted', 'repaired'),
        beginsOn: day,
      }),
    }),
    budget: fc.record({
      components: fc.array(text, { maxLength: 4 }),
      effects: fc.array(effect, { maxLength: 3 }),
      references: fc.array(
        fc.record({
          registryNo: fc.constant('RL 0001'),
          standardId: fc.constant('standard-reference'),
          kind,
          rootKind,
          usedAs,
        }),
        { maxLength: 2 },
      ),
      nuEff: orNull(fc.double({ min: 0.01, max: 1e6, noNaN: true })),
      ownU: orNull(tiny),
      ownDegreesOfFreedom: orNull(fc.double({ min: 0.01, max: 1e6, noNaN: true })),
    }),
  })
  .map(({ history: past, ...changes }) =>
    valueFacts({
      ...(changes as Partial<ValueFacts>),
      history: past.map((one, at) => historyFacts({ uid: `past-${at}`, ...one } as never)),
    }),
  );

const link: fc.Arbitrary<LinkFacts> = fc
  .record({
    child: value,
    parent: value,
    usedBegin: day,
    usedEnd: day,
    usedAs,
    usedDeviation: orNull(grams),
    usedExpandedU: orNull(positive),
    usedK: orNull(fc.constantFrom('2', '1.7321')),
    programmes: fc.array(
      fc.record({
        ...assertion,
        intervalMonths: fc.integer({ min: 1, max: 240 }),
        method: text,
        justification: text,
      }),
      { maxLength: 3 },
    ),
  })
  .map((changes) => linkFacts(changes as Partial<LinkFacts>));

const question: fc.Arbitrary<Question> = fc.record({
  day,
  known: day,
  programmeEndedAfterUse: fc.constantFrom('said', 'breaks'),
});

/** Four outcomes, a sentence that exists with every place filled, and no text of a number that is none. */
function expectSound(rule: Rule, finding: Finding): void {
  expect(['holds', 'fails', 'cannot be judged', 'does not apply']).toContain(finding.outcome);
  const sentence = rule.sentences[finding.sentence];
  expect(sentence, `${rule.id} "${finding.sentence}"`).toBeDefined();
  const said = fillSentence(sentence!, finding.parameters);
  expect(said, rule.id).not.toMatch(/NaN|undefined|null|Infinity|\[object|\{\w+\}|\de[+-]?\d/);
}

function judge(rule: Rule, facts: LinkFacts, asked: Question, verdict: VerdictName): Finding {
  if (rule.scope === 'link') return rule.judge(facts, asked, verdict);
  if (rule.scope === 'value') return rule.judge(facts.child, asked, verdict);
  const chain = chainFacts({
    question: asked,
    values: [facts.child, facts.parent],
    links: [facts],
    focusUid: facts.child.uid,
  });
  return rule.judge(chain, asked, verdict);
}

describe('whatever the facts', () => {
  it.each(RULES.map((rule) => [rule.id, rule] as const))('%s says one of four things in words', (_, rule) => {
    fc.assert(
      fc.property(link, question, fc.constantFrom(...rule.verdicts), (facts, asked, verdict) => {
        expectSound(rule, judge(rule, facts, asked, verdict));
      }),
      { numRuns: 80 },
    );
  });

  it('starts from facts in order: nothing fails, nothing grave is open', () => {
    const sound = linkFacts({ child: valueFacts({ weight: WEIGHT, sheet: SHEET, budget: BUDGET }) });
    for (const rule of RULES) {
      for (const verdict of rule.verdicts) {
        const { outcome, severity = rule.severity } = judge(rule, sound, QUESTION, verdict);
        expect(outcome, rule.id).not.toBe('fails');
        if (outcome === 'cannot be judged') expect(['minor', 'information'], rule.id).toContain(severity);
      }
    }
  });
});
