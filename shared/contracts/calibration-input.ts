import { z } from 'zod';
import {
  CoverageFactor,
  CoverageProbability,
  DatePrecision,
  Day,
  Deviation,
  ExpandedU,
  Id,
  MassUnit,
  Medium,
  QuantityKind,
  Stage,
  WeightClass,
} from './common.ts';

export const UsedAs = z.enum(['certificate', 'by notice', 'class limit', 'fit', 'bracketing']);
export const RootKind = z.enum([
  'realization run',
  'consensus value',
  'recognized certificate',
  'earlier definition',
  'accepted stop',
]);
export type RootKind = z.infer<typeof RootKind>;

export const DecisionRule = z.enum(['guarded', 'simple']);

/** A value used as reference by a line: which one, how strongly, when, and as what. */
const ReferenceInput = z.strictObject({
  valueUid: Id,
  /** `informs`: named above a consensus value, without flow. */
  role: z.enum(['reference', 'informs']).default('reference'),
  /** Change of the result per change of the reference: 1 for a comparison at equal nominal, 0.5 for 500 g from 1 kg. */
  sensitivity: z.number().min(-1000).max(1000),
  usedAs: UsedAs.default('certificate'),
  usedBegin: Day,
  usedEnd: Day,
  usedDeviation: Deviation.nullable().default(null),
  usedExpandedU: ExpandedU.nullable().default(null),
  usedK: CoverageFactor.nullable().default(null),
});

const SourceInput = z.strictObject({
  sourceUid: Id,
  /** g per unit of the source. */
  sensitivity: z.number(),
});

const ComponentInput = z.strictObject({
  name: z.string().trim().min(1).max(120),
  evaluation: z.enum(['A', 'B']),
  distribution: z.enum(['normal', 'rectangular', 'triangular', 'u-shaped']),
  standardUncertainty: z.number().positive(),
  /** g per unit of the input. */
  sensitivity: z.number(),
  degreesOfFreedom: z.number().positive().nullable().default(null),
  estimate: z.string().max(80).nullable().default(null),
});

/** One result of a calibration. All masses in grams. */
export const CalibrationLine = z.strictObject({
  standardId: Id,
  quantity: QuantityKind,
  medium: Medium.default('air'),
  stage: Stage.nullable().default(null),
  deviation: Deviation,
  /** Unit and decimals as printed, so that the certificate can be read back digit for digit. */
  reportedUnit: MassUnit,
  reportedDecimals: z.number().int().min(0).max(15),
  expandedU: ExpandedU.nullable(),
  reportedUDecimals: z.number().int().min(0).max(15).nullable().default(null),
  k: CoverageFactor.nullable(),
  coverage: CoverageProbability.nullable().default(null),
  degreesOfFreedom: z.number().positive().nullable().default(null),
  class: WeightClass.nullable().default(null),
  underAccreditation: z.boolean().default(false),
  /** The person saw the question about the unit (B-18) and keeps the value. */
  unitConfirmed: z.boolean().default(false),
  rootKind: RootKind.nullable().default(null),
  scaleVersionId: Id.nullable().default(null),
  references: z.array(ReferenceInput).max(20).default([]),
  sources: z.array(SourceInput).max(20).default([]),
  components: z.array(ComponentInput).max(60).default([]),
});
export type CalibrationLine = z.infer<typeof CalibrationLine>;

/** A calibration complete enough to be issued. What the service takes, from the form as from any other way in. */
export const CalibrationInput = z.strictObject({
  /** The laboratory that calibrated and signed the certificate. */
  issuerId: Id,
  /** The laboratory that enters it: the issuer itself, or the holder who received the certificate. */
  registeredById: Id,
  certificateNo: z.string().trim().min(1, 'Copy the number of the certificate').max(60),
  issuedOn: Day,
  performedBegin: Day,
  performedEnd: Day,
  datePrecision: DatePrecision.default('day'),
  method: z.string().trim().min(1, 'Name the method as the certificate does').max(120),
  decisionRule: DecisionRule.nullable().default(null),
  documentId: Id.nullable().default(null),
  lines: z.array(CalibrationLine).min(1, 'A calibration has at least one result').max(200),
  /** Covariance of the local parts of its lines, g2, in line order, where a weighing design correlates them. */
  group: z
    .strictObject({
      covariance: z.array(z.array(z.number())),
      degreesOfFreedom: z.number().positive().nullable().default(null),
      estimate: z.string().max(80).nullable().default(null),
    })
    .nullable()
    .default(null),
});
export type CalibrationInput = z.infer<typeof CalibrationInput>;

/** A revision re-issues every line; each says for itself whether value, U, kind or scale changed. */
export const RevisionInput = CalibrationInput.extend({
  calibrationId: Id,
  reason: z
    .string()
    .trim()
    .min(3, 'Say what the amendment changes and why (ISO/IEC 17025:2017, 7.8.8)')
    .max(300),
  effectiveOn: Day,
});
export type RevisionInput = z.infer<typeof RevisionInput>;
