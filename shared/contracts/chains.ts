import { z } from 'zod';
import { RootKind, UsedAs } from './calibration-input.ts';
import {
  Abilities,
  DatePrecision,
  Day,
  DecimalString,
  Deviation,
  Id,
  LaboratoryName,
  Medium,
  Outcome,
  QuantityKind,
  Severity,
  Stage,
  ValueState,
  Verdict,
  WeightClass,
} from './common.ts';

/** Links as used, or each superseded ancestor replaced by what took its place. */
export const ChainAs = z.enum(['certified', 'now known']);
export type ChainAs = z.infer<typeof ChainAs>;

/** GET /api/chains/:valueUid: in force on `day`, as known at the end of `known`; both default to today. */
export const ChainQuery = z.object({
  day: Day.optional(),
  known: Day.optional(),
  as: ChainAs.default('certified'),
  /** `packed`: checks come as `PackedChecks` (`packed-checks.ts`), a fifth of the reply. */
  checks: z.enum(['packed']).optional(),
});
export type ChainQuery = z.infer<typeof ChainQuery>;

/** Where a number for u comes from; worn by each u on screen. */
export const UncertaintyOrigin = z.enum([
  'stated',
  'recomputed',
  'inferred',
  'agreed',
  'by definition',
  'unknown',
]);

/** A value in the chain. What is above one's own weights is a statement: never readings, budget or owner's customers. */
export const ChainValue = z.object({
  type: z.literal('value'),
  uid: Id,
  view: z.enum(['full', 'statement']),
  registryNo: z.string(),
  standardId: Id,
  /** Address of the calibration behind it; null where this person may not open it. */
  revisionId: Id.nullable(),
  marking: z.string(),
  nominal: DecimalString,
  class: WeightClass.nullable(),
  /** Who holds the weight; null in a statement. */
  holder: LaboratoryName.nullable(),
  issuer: LaboratoryName,
  certificateNo: z.string(),
  revisionN: z.number().int(),
  quantity: QuantityKind,
  medium: Medium,
  stage: Stage.nullable(),
  deviation: Deviation,
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  performedEnd: Day,
  datePrecision: DatePrecision,
  issuedOn: Day,
  state: ValueState,
  stateSince: Day.nullable(),
  rootKind: RootKind.nullable(),
  scaleVersion: z.string().nullable(),
  /** Standard uncertainties, g: stated by the certificate, carried by what it leans on, as computed now. */
  uStated: z.number().nullable(),
  uCarried: z.number().nullable(),
  uNow: z.number().nullable(),
  uOrigin: UncertaintyOrigin,
  /** Tier from the focus (0) upwards: the longest way. */
  tier: z.number().int(),
  /** Local part's share of the focus's variance (a fraction, signed); null where unknown. */
  localShare: z.number().nullable(),
  /** What flows through this node, as a share of the focus's variance. */
  share: z.number().nullable(),
  /**
   * The value as now known, where something it rests on, or its own certificate, has changed since; null: nothing
   * has. Not computable: `deviation` and `shift` are null and `because` names the certificate.
   */
  now: z
    .object({
      deviation: Deviation.nullable(),
      /** Grams, signed: as now known less as certified. */
      shift: DecimalString.nullable(),
      because: z.string().nullable(),
    })
    .nullable(),
});
export type ChainValue = z.infer<typeof ChainValue>;

/** An effect shared by several values: a volume, a scale version, one apparatus. */
export const ChainSource = z.object({
  type: z.literal('source'),
  uid: Id,
  kind: z.enum(['volume', 'air', 'drift', 'apparatus', 'scale version']),
  name: z.string(),
  /** Of which standard, where it belongs to one. */
  registryNo: z.string().nullable(),
  /** Null where this person sees a statement only. */
  u: z.number().nullable(),
  unit: z.string(),
  tier: z.number().int(),
  share: z.number().nullable(),
});
export type ChainSource = z.infer<typeof ChainSource>;

export const ChainLink = z.object({
  childUid: Id,
  /** A value or a source. */
  parentUid: Id,
  role: z.enum(['reference', 'informs', 'source']),
  sensitivity: z.number(),
  usedAs: UsedAs.nullable(),
  usedBegin: Day.nullable(),
  usedEnd: Day.nullable(),
  /** Signed share of the focus's variance that flows through; null where not computable. */
  flow: z.number().nullable(),
  /** Worst outcome of its checks under each verdict. */
  conduct: z.enum(['sound', 'caution', 'broken', 'not judged']),
  today: z.enum(['sound', 'caution', 'broken', 'not judged']),
});
export type ChainLink = z.infer<typeof ChainLink>;

/** What a check is about. Parameters fill the rule's sentence: texts only, already formatted for reading. */
export const ChainCheck = z.object({
  rule: z.string(),
  subject: z.discriminatedUnion('type', [
    z.object({ type: z.literal('link'), childUid: Id, parentUid: Id }),
    z.object({ type: z.literal('value'), uid: Id }),
    z.object({ type: z.literal('chain') }),
  ]),
  verdict: Verdict,
  outcome: Outcome,
  /** Severity of this outcome; a rule's own, unless it depends on the effect. */
  severity: Severity,
  parameters: z.record(z.string(), z.string()),
  /** Which of the rule's sentences applies; null where it would tell more of another laboratory's weight than a statement does. */
  sentence: z.string().nullable(),
});
export type ChainCheck = z.infer<typeof ChainCheck>;

/** Said once per rule: its clause and those of its sentences that are said, with `{parameter}` places. */
export const ChainRule = z.object({
  id: z.string(),
  title: z.string(),
  clause: z.string(),
  edition: z.string(),
  severity: Severity,
  scope: z.enum(['link', 'value', 'chain']),
  /** What it finds for the conduct is a flaw of the result itself, and counts for today as well. */
  isLasting: z.boolean(),
  sentences: z.record(z.string(), z.string()),
});

/** One line of "where the uncertainty comes from". */
export const Contribution = z.object({
  /** A value (its local part), a group's member values, or a source. */
  uids: z.array(Id),
  label: z.string(),
  kind: z.enum(['local part', 'weighing design', 'source', 'root', 'class limit']),
  /** Share of the focus's variance, signed. */
  share: z.number(),
});

/** What would help most, in plain numbers: U of the focus now and after. Grams, at the focus's k. */
export const Improvement = z.object({
  action: z.string(),
  uids: z.array(Id),
  expandedUNow: z.number(),
  expandedUThen: z.number(),
});

/** The focus as now known: what has changed above it since it was certified, and by how much it moves. */
export const AsNowKnown = z.object({
  /** Grams, signed; null where not computable, and `because` says which certificate stands in the way. */
  shift: DecimalString.nullable(),
  deviation: Deviation.nullable(),
  /** U at the certificate's k, local parts frozen. */
  expandedU: z.number().nullable(),
  because: z.string().nullable(),
  /** Whether the declared rule accepts the class stated for it, before and after; null where it cannot be judged. */
  keepsClass: z.object({ certified: z.boolean(), now: z.boolean() }).nullable(),
  /** Values whose certificate was superseded or withdrawn; `byUid` is null where nothing has taken its place. */
  replaced: z.array(
    z.object({
      uid: Id,
      byUid: Id.nullable(),
      registryNo: z.string(),
      certificateNo: z.string(),
      /** What its replacement brings to the focus, grams, signed; null where not computable. */
      shift: DecimalString.nullable(),
    }),
  ),
  /** Notices that apply to what the focus rests on; each once, with what it brings along every path. */
  notices: z.array(
    z.object({
      id: Id,
      number: z.string(),
      title: z.string(),
      effectiveOn: Day,
      shift: DecimalString,
      /** Standard uncertainty that it adds at the focus, grams. */
      u: z.number(),
    }),
  ),
});
export type AsNowKnown = z.infer<typeof AsNowKnown>;

const SideValue = z.object({
  quantity: QuantityKind,
  deviation: Deviation,
  expandedU: z.number().nullable(),
  origin: z.enum(['stated', 'computed from the other and the density']),
  isTheOneToType: z.boolean(),
});

export const ChainResponse = z.object({
  question: z.object({
    valueUid: Id,
    day: Day,
    known: Day,
    as: ChainAs,
    ruleSet: z.string(),
    engine: z.string(),
  }),
  focusUid: Id,
  /**
   * Where the focus was not in force yet on the day, or not known yet: the value of the same weight and kind that
   * was; null where there was none, where the focus stands, and in a statement.
   */
  inForceInstead: z.object({ uid: Id, certificateNo: z.string() }).nullable(),
  /** What took the focus's own place on the day, as known; null where it stands or is lost, and in a statement. */
  succeededBy: z.object({ uid: Id, certificateNo: z.string(), revisionN: z.number().int() }).nullable(),
  /** The latest later value in force of the same weight and kind, where the focus is in force itself; null as above. */
  newerInForce: z.object({ uid: Id, certificateNo: z.string() }).nullable(),
  nodes: z.array(z.discriminatedUnion('type', [ChainValue, ChainSource])),
  links: z.array(ChainLink),
  /** Null: nothing that the focus rests on has changed since it was certified. */
  asNowKnown: AsNowKnown.nullable(),
  /** The definition in force when the roots were determined. */
  definition: z.enum(['planck constant', 'international prototype', 'both']),
  uncertainty: z.object({
    /** Grams, k = 1; null with the reason in `missing`. */
    standard: z.number().nullable(),
    /** At the k the certificate states. */
    expanded: z.number().nullable(),
    k: z.number(),
    stated: z.number().nullable(),
    carried: z.number().nullable(),
    degreesOfFreedom: z.number().nullable(),
    /** "unknown, because ...": one sentence per value that states no U. */
    missing: z.array(z.object({ uid: Id, because: z.string() })),
  }),
  /** What reaches the focus through each root that something flows from, as a share of its variance. */
  rootShares: z.array(z.object({ uid: Id, share: z.number() })),
  contributions: z.array(Contribution),
  improvements: z.array(Improvement),
  /** Mass and conventional mass side by side, where the density allows; the one to type into a balance named. */
  sideBySide: z.array(SideValue),
  sideBySideNote: z.string().nullable(),
  rules: z.array(ChainRule),
  checks: z.array(ChainCheck),
  /** Counts of links by their worst outcome under each verdict. */
  summary: z.object({
    links: z.number().int(),
    conduct: z.object({
      sound: z.number().int(),
      caution: z.number().int(),
      broken: z.number().int(),
      notJudged: z.number().int(),
    }),
    today: z.object({
      sound: z.number().int(),
      caution: z.number().int(),
      broken: z.number().int(),
      notJudged: z.number().int(),
    }),
  }),
  abilities: Abilities,
});
export type ChainResponse = z.infer<typeof ChainResponse>;

/** GET /api/chains/:valueUid/covariance/:otherUid: of two values that both are open to this person. Grams squared. */
export const CovarianceResponse = z.object({
  covariance: z.number().nullable(),
  correlation: z.number().nullable(),
  standardUncertainties: z.tuple([z.number().nullable(), z.number().nullable()]),
});

/** GET /api/chains?q=&failing=1: which chain to open; those that fail in the newest audit of their laboratory. */
export const ChainSearchQuery = z.object({
  q: z.string().trim().max(80).default(''),
  failing: z.literal('1', 'Expected 1, or nothing for all values').optional(),
});
export const ChainSearchResponse = z.object({
  values: z.array(
    z.object({
      uid: Id,
      registryNo: z.string(),
      nominal: DecimalString,
      marking: z.string(),
      holder: LaboratoryName,
      quantity: QuantityKind,
      certificateNo: z.string(),
      performedEnd: Day,
      deviation: Deviation,
      expandedU: DecimalString.nullable(),
      k: DecimalString.nullable(),
    }),
  ),
});
