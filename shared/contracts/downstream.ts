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

/**
 * Beyond this part of U a change is material for weights of others, whatever threshold is asked: a word at a threshold
 * of the asker's choice would tell U, which is the holder's.
 */
export const WEIGHTS_OF_OTHERS_BEYOND = 0.1;

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
  /** A shift, or a growth of U, beyond this part of U is material for one's own values (`WEIGHTS_OF_OTHERS_BEYOND` for others). */
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

/** Weights by their word. */
export const WordCounts = z.object({
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
