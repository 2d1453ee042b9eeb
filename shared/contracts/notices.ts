import { z } from 'zod';
import { Decimal } from '#shared/decimal.ts';
import {
  Abilities,
  Cursor,
  Day,
  DecimalString,
  Deviation,
  Id,
  LaboratoryName,
  Nominal,
  QuantityKind,
} from './common.ts';
import { ClassVerdict, FullRow, WarningRow, WhatIfWord, WordCounts } from './downstream.ts';

/** What a notice does to the mass scale. */
export const NoticeKind = z.enum(['unit correction', 'uncertainty added', 'consensus value']);
export type NoticeKind = z.infer<typeof NoticeKind>;

const Shift = Deviation.refine(
  (text) => new Decimal(text).abs().lte(1),
  'Expected a shift of at most 1 g per kilogram. Is it in grams?',
);
const ShiftPoint = z.strictObject({ on: Day, shift: Shift });

/** Which values of the issuer a notice covers, and what it brings to them, per kilogram of nominal. Grams. */
export const NoticeTerm = z
  .strictObject({
    /** Null or left out: of either kind, of any date, of any nominal; both ends of a range belong to it. */
    quantity: QuantityKind.nullable().default(null),
    performedFrom: Day.nullable().default(null),
    performedTo: Day.nullable().default(null),
    nominalFrom: Nominal.nullable().default(null),
    nominalTo: Nominal.nullable().default(null),
    /** By day of calibration: linear between the days given, constant outside. */
    shiftPerKilogram: z
      .array(ShiftPoint)
      .min(1, 'Give the shift on one day at least; "0" for none')
      .max(40)
      .refine(
        (points) => points.every((point, at) => at === 0 || points[at - 1]!.on < point.on),
        'Expected the days in order, each once',
      ),
    /** Standard uncertainty (k = 1); the same effect for every value covered. */
    addedUPerKilogram: z
      .number()
      .min(0, 'Expected an added standard uncertainty of zero or more')
      .max(1, 'Expected an added standard uncertainty of at most 1 g per kilogram. Is it in grams?')
      .default(0),
  })
  .refine(({ performedFrom: from, performedTo: to }) => !from || !to || from <= to, {
    path: ['performedFrom'],
    error: 'Expected a first day on or before the last one',
  })
  .refine(({ nominalFrom: from, nominalTo: to }) => !(Number(from ?? NaN) > Number(to ?? NaN)), {
    path: ['nominalFrom'],
    error: 'Expected a smallest nominal not above the largest',
  });
export type NoticeTerm = z.infer<typeof NoticeTerm>;

const NewScale = z.strictObject({
  name: z.string().trim().min(1, 'Give the scale version a name').max(60),
  basis: z.string().trim().min(1, 'Say what the scale version rests on').max(200),
  validFrom: Day,
});

/** POST /api/notices: publishes a notice under a signature. It is never changed; a later one may replace it. */
export const PublishNoticeBody = z
  .strictObject({
    issuerId: Id,
    number: z.string().trim().min(1, 'Give the notice a number').max(40),
    kind: NoticeKind,
    title: z.string().trim().min(1, 'Give the notice a title').max(160),
    reason: z.string().trim().min(1, 'Say why the notice is published').max(4000),
    fromScaleId: Id,
    /** The scale version that values stand on afterwards; null: it stays. */
    toScaleId: Id.nullable().default(null),
    /** A scale version made in the same act, instead of `toScaleId`. */
    newScale: NewScale.nullable().default(null),
    effectiveOn: Day,
    /** Today where left out; earlier for a notice of the past that is entered now. */
    madeKnownOn: Day.optional(),
    /** From where on it matters, in words. */
    threshold: z.string().trim().min(1).max(400).nullable().default(null),
    /** The notice that this one ends. */
    replacesId: Id.nullable().default(null),
    terms: z.array(NoticeTerm).min(1, 'Say which values the notice covers').max(10),
    /** The signatory's own, again. */
    password: z.string().min(1, 'Type your password again: it is your signature').max(200),
  })
  .refine(({ toScaleId, newScale }) => !toScaleId || !newScale, {
    path: ['newScale'],
    error: 'Name a scale version, or make a new one; not both',
  });
export type PublishNoticeBody = z.infer<typeof PublishNoticeBody>;

export const ScaleVersion = z.object({
  id: Id,
  name: z.string(),
  basis: z.string(),
  validFrom: Day,
  validTo: Day.nullable(),
  /** How many assigned values rest on it. */
  values: z.number().int(),
});
export type ScaleVersion = z.infer<typeof ScaleVersion>;

/** GET /api/scale-versions: in the order of their days. */
export const ScaleVersionListResponse = z.object({ scaleVersions: z.array(ScaleVersion) });

const ScaleName = z.object({ id: Id, name: z.string() });
const NoticeName = z.object({ id: Id, number: z.string(), title: z.string() });

/** A notice as published. */
export const NoticeSummary = z.object({
  id: Id,
  number: z.string(),
  kind: NoticeKind,
  title: z.string(),
  issuer: LaboratoryName,
  fromScale: ScaleName,
  toScale: ScaleName.nullable(),
  effectiveOn: Day,
  madeKnownOn: Day,
  /** It takes effect before it was made known. */
  isBackDated: z.boolean(),
  /** How it stands today. */
  state: z.enum(['in force', 'not yet in force', 'replaced']),
  replaces: NoticeName.nullable(),
  replacedBy: NoticeName.nullable(),
  /** Largest |shift| and largest added standard uncertainty of its terms, grams per kilogram. */
  largestShift: z.number(),
  largestAddedU: z.number(),
});
export type NoticeSummary = z.infer<typeof NoticeSummary>;

/** GET /api/notices: every notice, by the day it takes effect. */
export const NoticeListResponse = z.object({
  notices: z.array(NoticeSummary),
  /** Laboratories in whose name this person may publish. */
  publishesFor: z.array(LaboratoryName),
});
export type NoticeListResponse = z.infer<typeof NoticeListResponse>;

/** GET /api/notices/:noticeId */
export const NoticeQuery = z.object({
  cursor: Cursor.optional(),
  limit: z.coerce.number().int().min(1).max(500).default(50),
});

/** One's own value under a notice. Before: the certificate with the earlier notices; after: with this one too. Grams. */
export const NoticeOwnRow = FullRow.extend({
  /** What this notice brings, exact decimal text; its standard uncertainty is shared by every value it reaches. */
  shift: z.string(),
  addedU: z.number(),
  deviationBefore: z.string(),
  deviationAfter: z.string(),
  expandedUBefore: z.number().nullable(),
  expandedUAfter: z.number().nullable(),
  /** All shifts since the certificate over its U, signed; null without U. */
  ratio: z.number().nullable(),
  classBefore: ClassVerdict,
  classAfter: ClassVerdict,
  word: WhatIfWord,
});
export type NoticeOwnRow = z.infer<typeof NoticeOwnRow>;

/** A weight of others below one's own, or a customer's: enough to warn its holder. */
export const NoticeWarningRow = WarningRow.extend({ shift: z.string(), word: WhatIfWord });

export const NoticeRow = z.discriminatedUnion('view', [NoticeOwnRow, NoticeWarningRow]);
export type NoticeRow = z.infer<typeof NoticeRow>;

export const NoticeResponse = NoticeSummary.extend({
  reason: z.string(),
  threshold: z.string().nullable(),
  terms: z.array(
    z.object({
      quantity: QuantityKind.nullable(),
      performedFrom: Day.nullable(),
      performedTo: Day.nullable(),
      nominalFrom: DecimalString.nullable(),
      nominalTo: DecimalString.nullable(),
      shiftPerKilogram: z.array(z.object({ on: Day, shift: DecimalString })),
      addedUPerKilogram: z.number(),
    }),
  ),
  /** Rows that this person gets to see, the most telling first, and their words. */
  total: z.object({
    count: z.number().int(),
    warned: z.number().int(),
    words: WordCounts,
    /** The words of the values told in full alone. */
    fullWords: WordCounts,
  }),
  rows: z.array(NoticeRow),
  nextCursor: z.string().nullable(),
  abilities: Abilities,
});
export type NoticeResponse = z.infer<typeof NoticeResponse>;

/** What was published. */
export const PublishNoticeResponse = z.object({
  id: Id,
  number: z.string(),
  /** It takes effect before it was made known, and this is said. */
  isBackDated: z.boolean(),
  /** The scale version made in the same act. */
  newScaleId: Id.nullable(),
});
export type PublishNoticeResponse = z.infer<typeof PublishNoticeResponse>;
