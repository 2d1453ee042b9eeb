import type { ChainFacts, HistoryFacts, LinkFacts, Question, ScopeLineFacts, ValueFacts } from './facts.ts';
import type { Finding, RuleHead, VerdictName } from './rule.ts';
import { fillSentence } from './sentence.ts';
import type { BudgetFacts, SheetFacts, WeightFacts } from './weight-facts.ts';

/*
 * An invented chain for the tests of the rules: an institute's 1 kg weight, a laboratory's 1 kg reference calibrated
 * by the institute, and a 1 kg weight calibrated with it. Everything is in order unless a test says otherwise.
 */

export const QUESTION: Question = { day: '2026-06-01', known: '2026-06-01', programmeEndedAfterUse: 'said' };

export const INSTITUTE = {
  id: 'lab-institute',
  name: 'Institute of the Plain',
  kind: 'national institute',
} as const;
export const LABORATORY = {
  id: 'lab-river',
  name: 'River Laboratory',
  kind: 'calibration laboratory',
} as const;
export const CUSTOMER = { id: 'lab-mill', name: 'Mill Laboratory', kind: 'calibration laboratory' } as const;

/** Identifiers of the two values. */
export const FOCUS = '01900000-0000-7000-8000-00000000000a';
export const REFERENCE = '01900000-0000-7000-8000-00000000000b';

export const SCOPE_LINE: ScopeLineFacts = {
  line: 1,
  nominalFrom: '1',
  nominalTo: '10000',
  method: 'substitution',
  bestUConstant: '0',
  bestURelative: 2.5e-7,
  k: '2',
  state: 'granted',
  validFrom: '2015-01-01',
  validTo: null,
  recordedAt: '2015-01-01T10:00:00.000000Z',
};

/** A knobbed weight with a serial number, its magnetic properties measured. */
export const WEIGHT: WeightFacts = {
  kind: 'weight',
  serial: '4711',
  shape: 'knob',
  classClaimed: 'E2',
  isInSet: false,
  alike: [],
  volume: null,
  susceptibility: { value: '0.004', expandedU: '0.0008', k: '2', origin: 'measured' },
  polarisation: { value: '0.2', expandedU: '0.4', k: '2', origin: 'measured' },
  densityOnlyFrom: null,
  driftRates: [],
};

/** Issued under the hand of an authorised signatory, the weight as it was received. */
export const SHEET: SheetFacts = {
  isIssued: true,
  signatory: [
    {
      state: 'granted',
      validFrom: '2018-01-01',
      validTo: null,
      recordedAt: '2018-01-01T08:00:00.000000Z',
    },
  ],
  hasAuthorisations: true,
  amendmentReason: null,
  stages: [null],
  epoch: { n: 1, reason: 'new', beginsOn: '2019-05-02' },
};

/** A budget with all that a comparison of two steel kilograms needs. */
export const BUDGET: BudgetFacts = {
  components: ['Repeatability', 'Reference since its calibration', 'Balance', 'Air density'],
  effects: [],
  references: [
    {
      registryNo: 'RL 0001',
      standardId: 'standard-reference',
      kind: 'weight',
      rootKind: 'recognized certificate',
      usedAs: 'certificate',
    },
  ],
  nuEff: null,
  ownU: 0.00013,
  ownDegreesOfFreedom: 40,
};

/** The weight at the end: 1 kg, E2, calibrated 2025-03-10 by the laboratory for its customer, U 0.30 mg. */
export function valueFacts(changes: Partial<ValueFacts> = {}): ValueFacts {
  return {
    uid: FOCUS,
    certificateNo: 'RL-2025-031',
    revisionN: 1,
    deviation: '0.00021',
    reportedUnit: 'mg',
    reportedDecimals: 2,
    expandedU: '0.0003',
    reportedUDecimals: 2,
    k: '2',
    performedBegin: '2025-03-09',
    performedEnd: '2025-03-10',
    issuedOn: '2025-03-14',
    datePrecision: 'day',
    calibrationId: 'calibration-focus',
    standardId: 'standard-focus',
    registryNo: 'MI 0007',
    marking: '1 kg',
    issuer: LABORATORY,
    holder: CUSTOMER,
    registeredByIssuer: true,
    recordedAt: '2025-03-14T09:00:00.000000Z',
    method: 'substitution',
    quantity: 'conventional mass',
    medium: 'air',
    stage: null,
    nominal: '1000',
    class: 'E2',
    decisionRule: 'guarded',
    coverage: '0.9545',
    underAccreditation: true,
    unitConfirmed: false,
    rootKind: null,
    scaleVersion: 'consensus 2023',
    ends: [],
    nextEpoch: null,
    references: 1,
    siblingLinesWithReferences: 0,
    recognitions: [
      {
        kind: 'accreditation',
        body: 'Accreditation of the Plain',
        number: 'K-17',
        arrangement: 'the arrangement',
        state: 'granted',
        validFrom: '2015-01-01',
        validTo: null,
        recordedAt: '2015-01-01T10:00:00.000000Z',
      },
    ],
    scope: [SCOPE_LINE],
    density: { value: '7950', expandedU: '140', k: '2', origin: 'assumed' },
    otherKind: null,
    carriedVariance: 0.00006 ** 2,
    carriedVarianceIndependent: 0.00006 ** 2,
    carriedMissing: [],
    sharedAncestors: [],
    history: [],
    duplicates: [],
    weight: WEIGHT,
    sheet: SHEET,
    budget: BUDGET,
    ...changes,
  };
}

/** The reference: 1 kg, E1, calibrated 2024-01-15 by the institute, U 0.12 mg. */
export function referenceFacts(changes: Partial<ValueFacts> = {}): ValueFacts {
  return valueFacts({
    uid: REFERENCE,
    certificateNo: 'IP-2024-002',
    deviation: '0.00005',
    expandedU: '0.00012',
    performedBegin: '2024-01-12',
    performedEnd: '2024-01-15',
    issuedOn: '2024-01-20',
    calibrationId: 'calibration-reference',
    standardId: 'standard-reference',
    registryNo: 'RL 0001',
    density: { value: '8000', expandedU: '1', k: '2', origin: 'measured' },
    issuer: INSTITUTE,
    holder: LABORATORY,
    class: 'E1',
    underAccreditation: false,
    scope: [],
    recognitions: [{ ...valueFacts().recognitions[0]!, kind: 'institute arrangement', number: 'A-02' }],
    references: 0,
    rootKind: 'recognized certificate',
    weight: { ...WEIGHT, classClaimed: 'E1', shape: 'cylinder' },
    budget: { ...BUDGET, components: [], references: [], ownDegreesOfFreedom: null },
    ...changes,
  });
}

/** The step from the weight to the reference, with a programme of three years. */
export function linkFacts(changes: Partial<LinkFacts> = {}): LinkFacts {
  return {
    child: valueFacts(),
    parent: referenceFacts(),
    role: 'reference',
    sensitivity: 1,
    usedBegin: '2025-03-09',
    usedEnd: '2025-03-10',
    usedAs: 'certificate',
    usedDeviation: null,
    usedExpandedU: null,
    usedK: null,
    programmes: [
      {
        intervalMonths: 36,
        method: 'fixed interval',
        justification: 'Three calibrations have shown no change beyond a third of U.',
        validFrom: '2020-01-01',
        validTo: null,
        recordedAt: '2020-01-01T08:00:00.000000Z',
      },
    ],
    otherValues: [],
    notices: [],
    scaleMap: { notices: [], shift: 0, u: 0 },
    ...changes,
  };
}

/** Another value of the weight, of another year, with the same U. */
export function historyFacts(changes: Partial<HistoryFacts> = {}): HistoryFacts {
  return {
    uid: 'value-earlier',
    certificateNo: 'RL-2023-018',
    revisionN: 1,
    deviation: '0.00018',
    reportedUnit: 'mg',
    reportedDecimals: 2,
    expandedU: '0.0003',
    reportedUDecimals: 2,
    k: '2',
    performedBegin: '2023-02-01',
    performedEnd: '2023-02-02',
    issuedOn: '2023-02-06',
    datePrecision: 'day',
    covariance: null,
    ...changes,
  };
}

/** The whole chain: the weight and its reference. */
export function chainFacts(changes: Partial<ChainFacts> = {}): ChainFacts {
  const link = linkFacts();
  return {
    question: QUESTION,
    focusUid: link.child.uid,
    values: [link.child, link.parent],
    links: [link],
    contributions: [{ label: 'RL 0001', share: 0.16, isTop: true }],
    varianceNow: 0.00015 ** 2,
    circle: null,
    missingReferences: [],
    ...changes,
  };
}

/** A finding as read: outcome, key of the sentence, its text, and the severity it carries. */
export function asRead(rule: RuleHead, finding: Finding) {
  const sentence = rule.sentences[finding.sentence];
  if (sentence === undefined) throw new Error(`${rule.id} has no sentence "${finding.sentence}".`);
  const text = fillSentence(sentence, finding.parameters);
  return {
    outcome: finding.outcome,
    sentence: finding.sentence,
    severity: finding.severity ?? rule.severity,
    text,
  };
}

/** Judges facts by a rule, under its first verdict unless another is named. */
export function judgedBy<Facts>(
  rule: RuleHead & { judge(facts: Facts, question: Question, verdict: VerdictName): Finding },
  facts: Facts,
  asked: Partial<Question> & { verdict?: VerdictName } = {},
) {
  const { verdict = rule.verdicts[0]!, ...question } = asked;
  return asRead(rule, rule.judge(facts, { ...QUESTION, ...question }, verdict));
}
