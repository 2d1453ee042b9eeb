import { z } from 'zod';
import { decimalText } from '../decimal.ts';
import {
  Abilities,
  CoverageFactor,
  Cursor,
  DatePrecision,
  Day,
  DecimalString,
  Deviation,
  Id,
  LaboratoryName,
  Medium,
  Nominal,
  QuantityKind,
  Stage,
  ValueState,
  WeightClass,
} from './common.ts';

export const StandardKind = z.enum([
  'weight',
  'prototype',
  'silicon sphere',
  'realization',
  'consensus value',
]);

/** Shapes of weights: knob and cylinder from 1 g, wire and sheet below (OIML R 111-1, 6). */
export const Shape = z.enum(['knob', 'cylinder', 'sphere', 'sheet', 'wire', 'block', 'other']);
export type Shape = z.infer<typeof Shape>;

export const PropertyOrigin = z.enum(['measured', 'assumed', 'manufacturer']);

export const RegistryNo = z
  .string()
  .trim()
  .regex(/^[A-Z]{2,4} \d{4}(-\d{1,3})?$/, 'Expected a registry number such as TV 0112 or TV 0300-07');

/** A decimal on the wire whose refusal shows an example that fits the field. */
const decimalLike = (example: string) =>
  z
    .string({ error: `Write a plain number such as ${example}` })
    .trim()
    .max(60, 'A number has at most 60 characters')
    .regex(/^[+-]?\d+(\.\d+)?$/, `Write a plain number such as ${example}`)
    .transform((text) => decimalText(text));

export const Density = decimalLike('7950').refine(
  (text) => Number(text) >= 500 && Number(text) <= 25_000 && !/\.\d{10}/.test(text),
  'Expected a density from 500 to 25 000 kg/m3, with at most 9 decimals',
);

/** GET /api/standards. Everything a list can be asked for; the URL of the page carries the same names. */
export const StandardListQuery = z.object({
  /** Part of a registry number, marking, serial or certificate number. */
  q: z.string().trim().max(80).optional(),
  laboratory: Id.optional(),
  class: WeightClass.optional(),
  kind: StandardKind.optional(),
  /** `due`: recalibration due by the holder's programme within 60 days; `overdue`; `no value`. */
  standing: z.enum(['due', 'overdue', 'no value']).optional(),
  nominalFrom: Nominal.optional(),
  nominalTo: Nominal.optional(),
  sort: z
    .enum(['registryNo', '-registryNo', 'nominal', '-nominal', 'calibrated', '-calibrated'])
    .default('registryNo'),
  cursor: Cursor.optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});
export type StandardListQuery = z.infer<typeof StandardListQuery>;

/** The value of a standard that is in force, short. `null` members: not stated on the certificate. */
export const CurrentValue = z.object({
  uid: Id,
  revisionId: Id,
  quantity: QuantityKind,
  deviation: Deviation,
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  performedEnd: Day,
  datePrecision: DatePrecision,
  certificateNo: z.string(),
});

export const StandardRow = z.object({
  id: Id,
  registryNo: z.string(),
  kind: StandardKind,
  nominal: DecimalString,
  marking: z.string(),
  class: WeightClass.nullable(),
  holder: LaboratoryName,
  set: z.object({ id: Id, registryNo: z.string() }).nullable(),
  value: CurrentValue.nullable(),
  /** By the holder's programme: whose, and when next due. */
  dueOn: Day.nullable(),
});
export type StandardRow = z.infer<typeof StandardRow>;

export const StandardListResponse = z.object({
  standards: z.array(StandardRow),
  nextCursor: z.string().nullable(),
  /** Counted up to 10 000; `isCountExact` is false beyond. */
  count: z.number().int(),
  isCountExact: z.boolean(),
  abilities: Abilities,
});
export type StandardListResponse = z.infer<typeof StandardListResponse>;

const PropertyBody = z.strictObject({
  value: Density,
  expandedU: decimalLike('140')
    .refine(
      (text) => Number(text) > 0 && Number(text) <= 25_000 && !/\.\d{10}/.test(text),
      'Expected an uncertainty above 0 and up to 25 000 kg/m3, with at most 9 decimals',
    )
    .nullable(),
  k: CoverageFactor.nullable(),
  origin: PropertyOrigin,
});

const MANUFACTURER_LENGTH = 'A manufacturer has at most 120 characters';

const WeightBody = {
  nominal: Nominal,
  marking: z
    .string()
    .trim()
    .min(1, 'Each weight is identified by its marking (OIML R 111-1, 13)')
    .max(80, 'A marking has at most 80 characters'),
  serial: z.string().trim().max(80, 'A serial has at most 80 characters').nullable().default(null),
  shape: Shape,
  material: z
    .string()
    .trim()
    .min(1, 'Name the material, for example "stainless steel"')
    .max(80, 'A material has at most 80 characters'),
  class: WeightClass.nullable(),
  density: PropertyBody.nullable(),
};

/** POST /api/standards: one weight. */
export const RegisterStandardBody = z.strictObject({
  laboratoryId: Id,
  registryNo: RegistryNo,
  manufacturer: z.string().trim().max(120, MANUFACTURER_LENGTH).nullable().default(null),
  inServiceFrom: Day.nullable().default(null),
  /** The holder's own rule for how long it relies on a calibration; null where it is no reference. */
  intervalMonths: z.number().int().min(1).max(240).nullable().default(null),
  ...WeightBody,
});
export type RegisterStandardBody = z.infer<typeof RegisterStandardBody>;

/** POST /api/sets: a whole set; members are numbered `<set>-01`, `-02`, ... in the order given. */
export const RegisterSetBody = z.strictObject({
  laboratoryId: Id,
  registryNo: RegistryNo.refine(
    (text) => !text.includes('-'),
    'A set has a number without suffix, such as TV 0300',
  ),
  name: z
    .string()
    .trim()
    .min(1, 'Name the set as it stands on the lid, for example "E2 set, 1 mg to 1 kg"')
    .max(120, 'A name has at most 120 characters'),
  manufacturer: z.string().trim().max(120, MANUFACTURER_LENGTH).nullable().default(null),
  inServiceFrom: Day.nullable().default(null),
  intervalMonths: z.number().int().min(1).max(240).nullable().default(null),
  members: z
    .array(z.strictObject(WeightBody))
    .min(1, 'A set has at least one weight')
    .max(60, 'A set has at most 60 weights; register the others as a second set'),
});
export type RegisterSetBody = z.infer<typeof RegisterSetBody>;

export const RegisteredStandardResponse = z.object({ id: Id, registryNo: z.string() });
export const RegisteredSetResponse = z.object({
  id: Id,
  registryNo: z.string(),
  members: z.array(RegisteredStandardResponse),
});

/** POST /api/standards/:standardId/epochs: an intervention opens a new stretch of the weight's life. */
export const OpenEpochBody = z.strictObject({
  reason: z.enum(['adjusted', 'repaired', 're-polished', 'damaged']),
  beginsOn: Day,
  lastGoodOn: Day.nullable().default(null),
  note: z.string().trim().max(300, 'A note has at most 300 characters').nullable().default(null),
});
export const EpochResponse = z.object({ id: Id, n: z.number().int() });

/** One point of a standard's history. */
export const HistoryValue = z.object({
  uid: Id,
  revisionId: Id,
  certificateNo: z.string(),
  revisionN: z.number().int(),
  issuer: LaboratoryName,
  quantity: QuantityKind,
  medium: Medium,
  stage: Stage.nullable(),
  epochN: z.number().int(),
  deviation: Deviation,
  /** null: the certificate states none; the plot has a point without a bar. */
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  performedEnd: Day,
  datePrecision: DatePrecision,
  issuedOn: Day,
  state: ValueState,
  stateSince: Day.nullable(),
  /** Change since the previous value of the same epoch and quantity, and E = |change| / U(change); null where U is not stated. */
  change: z.object({ deviation: Deviation, ratio: z.number().nullable() }).nullable(),
});

/** GET /api/standards/:standardId. */
export const StandardResponse = z.object({
  standard: StandardRow.extend({
    serial: z.string().nullable(),
    manufacturer: z.string().nullable(),
    shape: z.string(),
    material: z.string(),
    inServiceFrom: Day.nullable(),
    state: z.string(),
  }),
  /** Maximum permissible error of the class at this nominal, grams; null without class. */
  maximumPermissibleError: DecimalString.nullable(),
  epochs: z.array(
    z.object({
      n: z.number().int(),
      reason: z.string(),
      beginsOn: Day,
      lastGoodOn: Day.nullable(),
      note: z.string().nullable(),
    }),
  ),
  properties: z.array(
    z.object({
      kind: z.enum(['density', 'volume', 'susceptibility', 'polarisation']),
      value: DecimalString,
      expandedU: DecimalString.nullable(),
      k: DecimalString.nullable(),
      origin: PropertyOrigin,
      validFrom: Day,
    }),
  ),
  programme: z
    .object({
      laboratory: LaboratoryName,
      intervalMonths: z.number().int(),
      method: z.string(),
      justification: z.string(),
      dueOn: Day.nullable(),
    })
    .nullable(),
  history: z.array(HistoryValue),
  /** Who leans on its values: counts only. */
  leansOnThis: z.object({
    weights: z.number().int(),
    laboratories: z.number().int(),
    newestUse: Day.nullable(),
  }),
  abilities: Abilities,
});
export type StandardResponse = z.infer<typeof StandardResponse>;
