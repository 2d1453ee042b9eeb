import { z } from 'zod';
import { Decimal } from '#shared/decimal.ts';
import {
  Cursor,
  DatePrecision,
  Day,
  DecimalString,
  Deviation,
  Id,
  LaboratoryName,
  Nominal,
  QuantityKind,
  WeightClass,
} from './common.ts';

/** What descendants are grouped by. `nominal`: by decade. */
export const DownstreamBy = z.enum(['laboratory', 'class', 'nominal', 'year']);
export type DownstreamBy = z.infer<typeof DownstreamBy>;

const GroupKey = z.string().max(60);
const PageLimit = z.coerce.number().int().min(1).max(500).default(50);

/** In force on `day`, as known at the end of `known`; both default to today. A group is opened by its key. */
const GroupedQuestion = z.object({
  day: Day.optional(),
  known: Day.optional(),
  by: DownstreamBy.default('laboratory'),
  group: GroupKey.optional(),
  cursor: Cursor.optional(),
  limit: PageLimit,
});
export type GroupedQuestion = z.infer<typeof GroupedQuestion>;

/** GET /api/downstream/:uid: who leans on a value, or on any value of a standard. */
export const DownstreamQuery = GroupedQuestion;

/** GET /api/exposure/:standardId: what leaned on a weight between its last good day and its first bad one, both included. */
export const ExposureQuery = GroupedQuestion.extend({ lastGood: Day, firstBad: Day }).refine(
  ({ lastGood, firstBad }) => lastGood <= firstBad,
  { path: ['lastGood'], error: 'Expected a last good day on or before the first bad one' },
);
export type ExposureQuery = z.infer<typeof ExposureQuery>;

/** Members of a group, its key and what it is called where that is not the key itself. */
const GroupHead = z.object({
  /**
   * A laboratory's id; a class, or "none"; floor(log10) of the nominal in grams; a year of calibration, or "withheld"
   * for the weights of others, whose dates are not told.
   */
  key: GroupKey,
  laboratory: LaboratoryName.nullable(),
  /** Rows: a value of one's own, or a weight of others. */
  count: z.number().int(),
  /** Of them weights of others. */
  warned: z.number().int(),
});
export const DownstreamGroup = GroupHead;
export type DownstreamGroup = z.infer<typeof DownstreamGroup>;

/** A value that this person sees in full: of their own laboratory, or on a certificate that it issued. */
export const FullRow = z.object({
  view: z.literal('full'),
  uid: Id,
  standardId: Id,
  revisionId: Id,
  registryNo: z.string(),
  marking: z.string(),
  nominal: DecimalString,
  class: WeightClass.nullable(),
  holder: LaboratoryName,
  issuer: LaboratoryName,
  certificateNo: z.string(),
  quantity: QuantityKind,
  deviation: Deviation,
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  performedEnd: Day,
  datePrecision: DatePrecision,
  issuedOn: Day,
});

/**
 * A weight of others below one's own, enough to warn: the weight, and the laboratory that calibrated it. Whose
 * customer it belongs to, what it weighs and when it was calibrated stay there.
 */
export const WarningRow = z.object({
  view: z.literal('warning'),
  laboratory: LaboratoryName,
  registryNo: z.string(),
  nominal: DecimalString,
  class: WeightClass.nullable(),
});

export const DownstreamRow = z.discriminatedUnion('view', [FullRow, WarningRow]);
export type DownstreamRow = z.infer<typeof DownstreamRow>;

/** Both replies of "who leans on this": in groups first, and one group's rows where its key was sent. */
export const DownstreamResponse = z.object({
  question: z.object({ day: Day, known: Day, by: DownstreamBy }),
  total: z.object({ count: z.number().int(), warned: z.number().int() }),
  groups: z.array(DownstreamGroup),
  page: z
    .object({ group: GroupKey, rows: z.array(DownstreamRow), nextCursor: z.string().nullable() })
    .nullable(),
});
export type DownstreamResponse = z.infer<typeof DownstreamResponse>;

// --- what if ------------------------------------------------------------------------------------------

const Shift = Deviation.refine(
  (text) => !new Decimal(text).isZero() && new Decimal(text).abs().lte(1_000_000),
  'Expected a shift other than zero, of up to 1 000 kg',
);

/** A notice: one shared effect on all values of an issuer that it covers, inherited below them through links. */
const NoticeChange = z
  .strictObject({
    kind: z.literal('notice'),
    issuerId: Id,
    /** The scale version that the values stand on, where they state one; left out: any. */
    fromScaleId: Id.optional(),
    /** Which values it covers; left out: of either kind, of any date, of any nominal. */
    quantity: QuantityKind.optional(),
    performedFrom: Day.optional(),
    performedTo: Day.optional(),
    nominalFrom: Nominal.optional(),
    nominalTo: Nominal.optional(),
    /** Shift in grams per kilogram of nominal by day of calibration: linear between the days given, constant outside. */
    shiftPerKilogram: z
      .array(z.strictObject({ on: Day, shift: Deviation }))
      .min(1, 'Give the shift on one day at least; "0" for none')
      .max(20)
      .refine(
        (points) => points.every((point, at) => at === 0 || points[at - 1]!.on < point.on),
        'Expected the days in order, each once',
      ),
    /** Standard uncertainty added, grams per kilogram of nominal; the same effect for every value covered. */
    addedUPerKilogram: z.number().min(0).max(1000).default(0),
  })
  .refine(({ performedFrom: from, performedTo: to }) => !from || !to || from <= to, {
    path: ['performedFrom'],
    error: 'Expected a first day on or before the last one',
  });

/** One change whose effect is asked; nothing is changed by asking. Grams. */
export const WhatIfChange = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('shift'), valueUid: Id, shift: Shift }),
  /** `addedU`: a standard uncertainty, added in quadrature. */
  z.strictObject({
    kind: z.literal('raise'),
    valueUid: Id,
    addedU: z.number().positive('Expected an added standard uncertainty above zero').max(1e8),
  }),
  z.strictObject({ kind: z.literal('withdraw'), revisionId: Id }),
  NoticeChange,
]);
export type WhatIfChange = z.infer<typeof WhatIfChange>;

/** One word for a weight. A changed verdict is never below a threshold. */
export const WhatIfWord = z.enum(['none', 'material', 'verdict changes']);
export type WhatIfWord = z.infer<typeof WhatIfWord>;

/** By the word, then by |shift|; by |shift|; by |shift|/U; by the growth of U. What is not told comes last. */
export const WhatIfSort = z.enum(['word', 'shift', 'ratio', 'u']);
export type WhatIfSort = z.infer<typeof WhatIfSort>;

/** POST /api/what-if: a dry run. */
export const WhatIfInput = z.strictObject({
  changes: z.array(WhatIfChange).min(1, 'Name at least one change').max(20),
  day: Day.optional(),
  known: Day.optional(),
  by: DownstreamBy.default('laboratory'),
  group: GroupKey.optional(),
  sort: WhatIfSort.default('word'),
  cursor: Cursor.optional(),
  limit: PageLimit,
  /** A shift, or a growth of U, beyond this part of U is material. */
  threshold: z.number().min(0).max(10).default(0.1),
});
export type WhatIfInput = z.infer<typeof WhatIfInput>;

export const ClassVerdict = z.enum(['keeps', 'does not keep', 'not judged']);
export type ClassVerdict = z.infer<typeof ClassVerdict>;

/** A value of one's own, before and after. Grams. */
export const WhatIfFullRow = FullRow.extend({
  /** Null where it cannot be computed: something above it is withdrawn. */
  shift: z.number().nullable(),
  /** Exact decimal text. */
  deviationAfter: z.string().nullable(),
  /** Shift over U as stated, signed; null without U or shift. */
  ratio: z.number().nullable(),
  /** U at the k of the certificate. */
  expandedUAfter: z.number().nullable(),
  /** What the declared decision rule gives for the class stated. */
  classBefore: ClassVerdict,
  classAfter: ClassVerdict,
  /** It, or something above it, used by its class limit a weight that leaves its class: the limit no longer covers it. */
  isBeyondLimit: z.boolean(),
  word: WhatIfWord,
});

/** A weight of others, or held by a customer: what is enough to warn its holder, and one word. */
export const WhatIfWarningRow = WarningRow.extend({ shift: z.number().nullable(), word: WhatIfWord });

export const WhatIfRow = z.discriminatedUnion('view', [WhatIfFullRow, WhatIfWarningRow]);
export type WhatIfRow = z.infer<typeof WhatIfRow>;

const WordCounts = z.object({
  none: z.number().int(),
  material: z.number().int(),
  verdictChanges: z.number().int(),
});

export const WhatIfGroup = GroupHead.extend({
  words: WordCounts,
  /** Largest |shift|, grams; null where none can be computed. */
  largestShift: z.number().nullable(),
  /** Largest |shift|/U among one's own; null without any. */
  largestRatio: z.number().nullable(),
});
export type WhatIfGroup = z.infer<typeof WhatIfGroup>;

export const WhatIfResponse = z.object({
  question: z.object({ day: Day, known: Day, by: DownstreamBy, sort: WhatIfSort, threshold: z.number() }),
  total: z.object({ count: z.number().int(), warned: z.number().int(), words: WordCounts }),
  groups: z.array(WhatIfGroup),
  page: z.object({ group: GroupKey, rows: z.array(WhatIfRow), nextCursor: z.string().nullable() }).nullable(),
  /** One's own weights that leave their class and were used by their class limit. */
  beyondLimit: z.array(z.object({ uid: Id, registryNo: z.string() })),
});
export type WhatIfResponse = z.infer<typeof WhatIfResponse>;

// --- distance and reach -------------------------------------------------------------------------------

/** How wrong an ancestor may be before the focus leaves its class. Grams; null: without limit. */
export const AncestorDistance = z.object({
  uid: Id,
  registryNo: z.string(),
  nominal: DecimalString,
  /** Change of the focus per change of the ancestor. */
  sensitivity: z.number(),
  upwards: z.number().nullable(),
  downwards: z.number().nullable(),
  /** The smaller of the two, rounded down to two digits: "0.21 mg"; null: without limit. */
  text: z.string().nullable(),
});

/** How fast a weight changes, grams per year. */
const Drift = z.object({
  perYear: z.number(),
  u: z.number(),
  /** A line through its calibrations of one epoch, or the rate that its laboratory declares. */
  from: z.enum(['calibrations', 'declared rate']),
  calibrations: z.number().int(),
});

/** GET /api/chains/:valueUid/distance */
export const DistanceResponse = z.object({
  focusUid: Id,
  registryNo: z.string(),
  class: WeightClass.nullable(),
  /** Why no distance is given; null where it is. */
  because: z.string().nullable(),
  /** The rule applied, in words. */
  rule: z.string().nullable(),
  /** How far the focus itself may move, grams: the largest |deviation| accepted less the present one; below 0: beyond it already. */
  room: z.number().nullable(),
  ancestors: z.array(AncestorDistance),
  /** What the focus can still carry as a reference. */
  reach: z.object({
    /** The smallest U (k = 2) of a weight of the same nominal calibrated from it, grams; null without u. */
    bestExpandedU: z.number().nullable(),
    bestText: z.string().nullable(),
    /** Classes with U <= MPE/3 at this nominal, finest first. */
    classes: z.array(WeightClass),
    /** How it is known to drift; null where it is not. */
    drift: Drift.nullable(),
    /** Why no drift is known; null where it is. */
    driftBecause: z.string().nullable(),
    /**
     * U at best on the day of asking, used at its certificate's value; grams, null without u or drift. And, for each
     * class reachable when it was calibrated, the last day on which it can still be reached; null: more than 50 years.
     */
    expandedUToday: z.number().nullable(),
    textToday: z.string().nullable(),
    until: z.array(z.object({ class: WeightClass, last: Day.nullable() })),
  }),
});
export type DistanceResponse = z.infer<typeof DistanceResponse>;

// --- several weights together -------------------------------------------------------------------------

/** POST /api/chains/together: weights on one pan (+1), or on the other (-1). */
export const TogetherInput = z
  .strictObject({
    valueUids: z
      .array(Id)
      .min(2, 'Name two values at least')
      .max(20)
      .refine((uids) => new Set(uids).size === uids.length, 'Expected each value once'),
    /** One for each value; all +1 when left out. */
    signs: z.array(z.union([z.literal(1), z.literal(-1)])).optional(),
  })
  .refine(({ valueUids, signs }) => !signs || signs.length === valueUids.length, {
    path: ['signs'],
    error: 'Expected one sign for each value',
  });
export type TogetherInput = z.infer<typeof TogetherInput>;

const CombinedU = z.object({
  /** With every covariance known here; null where an undeclared one, or an unknown u, stands in the way. Grams. */
  u: z.number().nullable(),
  /** Undeclared covariances at their largest, the known ones as they are; null without the u of each. */
  bound: z.number().nullable(),
  /** Every correlation at its largest: the sum of the standard uncertainties. */
  linear: z.number().nullable(),
  /** The masses so added, grams, exact; null where they may not be added. */
  total: DecimalString.nullable(),
});

export const TogetherResponse = z.object({
  valueUids: z.array(Id),
  signs: z.array(z.number().int()),
  /** What each is, as a traceability statement would show it. */
  weights: z.array(
    z.object({
      registryNo: z.string(),
      marking: z.string(),
      nominal: DecimalString,
      class: WeightClass.nullable(),
      quantity: QuantityKind,
      deviation: Deviation,
      expandedU: DecimalString.nullable(),
      k: DecimalString.nullable(),
      certificateNo: z.string(),
    }),
  ),
  /** Why they may not be added; null where they may. */
  notAdded: z.string().nullable(),
  /** Standard uncertainty of each, grams: as computed now, else as stated; null where neither is known. */
  standardUncertainties: z.array(z.number().nullable()),
  /** Grams squared; null where undeclared. */
  covariance: z.array(z.array(z.number().nullable())),
  correlation: z.array(z.array(z.number().nullable())),
  /** Pairs, by place, whose covariance is undeclared, and why. */
  undeclared: z.array(z.object({ pair: z.tuple([z.number().int(), z.number().int()]), because: z.string() })),
  /** All added. */
  sum: CombinedU,
  /** With the signs asked for: a difference where one is -1. */
  signed: CombinedU,
  /** What two or more of them share, with the places of those that do. */
  shared: z.array(
    z.object({
      uid: Id,
      type: z.enum(['value', 'source']),
      label: z.string(),
      places: z.array(z.number().int()),
    }),
  ),
});
export type TogetherResponse = z.infer<typeof TogetherResponse>;
