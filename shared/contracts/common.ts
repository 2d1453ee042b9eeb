import { z } from 'zod';
import { Decimal, DecimalString } from '#shared/decimal.ts';
import { Id } from '#shared/ids.ts';

export { DecimalString, Id };

/** A calendar day, ISO 8601, that exists. */
export const Day = z.iso.date('Expected a day such as 2025-02-20');

/** How exactly a date of the world is known; K20's calibration of 1948 has a year only. */
export const DatePrecision = z.enum(['day', 'month', 'year']);

export const QuantityKind = z.enum(['mass', 'conventional mass']);
export type QuantityKind = z.infer<typeof QuantityKind>;

export const Medium = z.enum(['air', 'vacuum', 'inert gas']);

/** State of the weight when it was weighed, where an adjustment lies between. */
export const Stage = z.enum(['as found', 'as left']);

export const WeightClass = z.enum(['E1', 'E2', 'F1', 'F2', 'M1', 'M1-2', 'M2', 'M2-3', 'M3']);
export type WeightClass = z.infer<typeof WeightClass>;

export const MassUnit = z.enum(['kg', 'g', 'mg', 'ug']);
export type MassUnit = z.infer<typeof MassUnit>;

/** Grams as text, above zero and within the column. */
export const Nominal = DecimalString.refine(
  (text) => new Decimal(text).gt(0) && new Decimal(text).lte('50000000') && fitsColumn(text),
  'Expected a nominal above 0 g and up to 50 000 kg, to a picogram at most',
);

/** Grams as text, signed, within the column (to a picogram). */
export const Deviation = DecimalString.refine(
  fitsColumn,
  'Expected a deviation that fits: at most 12 decimals of a gram',
);

/** Expanded uncertainty, grams as text, above zero. */
export const ExpandedU = DecimalString.refine(
  (text) => new Decimal(text).gt(0) && fitsColumn(text),
  'Expected an expanded uncertainty above zero',
);

/** Coverage factor as text. */
export const CoverageFactor = DecimalString.refine(
  (text) => new Decimal(text).gte(1) && new Decimal(text).lte(20) && hasPlaces(text, 4),
  'Expected a coverage factor from 1 to 20 with at most 4 decimals, as printed on the certificate',
);

/** Coverage probability as text, for example 0.9545. */
export const CoverageProbability = DecimalString.refine(
  (text) => new Decimal(text).gt(0.5) && new Decimal(text).lt(1) && hasPlaces(text, 5),
  'Expected a coverage probability between 0.5 and 1 with at most 5 decimals, such as 0.9545',
);

/** What this person may do with a record, by permission name. */
export const Abilities = z.record(z.string(), z.boolean());
export type Abilities = z.infer<typeof Abilities>;

/** Opaque place in a list: sent back as it came, for the next page. */
export const Cursor = z.string().max(400);

/** A laboratory as others mention it. */
export const LaboratoryName = z.object({ id: Id, code: z.string(), name: z.string() });

/** How a value stands on the day asked about, as known on the knowledge day. */
export const ValueState = z.enum(['in force', 'not yet in force', 'superseded', 'withdrawn']);
export type ValueState = z.infer<typeof ValueState>;

/** Outcome of a check. A machine never says more. */
export const Outcome = z.enum(['holds', 'fails', 'cannot be judged', 'does not apply']);
export type Outcome = z.infer<typeof Outcome>;

/** Which facts a check speaks for: those known by the day of use, or all of today's. */
export const Verdict = z.enum(['conduct', 'today']);
export type Verdict = z.infer<typeof Verdict>;

export const Severity = z.enum(['block', 'critical', 'major', 'minor', 'information']);
export type Severity = z.infer<typeof Severity>;

function fitsColumn(text: string): boolean {
  const value = new Decimal(text);
  return value.decimalPlaces() <= 12 && value.abs().lt('100000000');
}

/** More decimals than the column has would be rounded in silence. */
function hasPlaces(text: string, places: number): boolean {
  return new Decimal(text).decimalPlaces() <= places;
}
