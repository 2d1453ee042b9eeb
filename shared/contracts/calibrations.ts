import { z } from 'zod';
import { DecisionRule, UsedAs } from './calibration-input.ts';
import { DraftSummary } from './drafts.ts';
import {
  Abilities,
  Cursor,
  DatePrecision,
  Day,
  DecimalString,
  Deviation,
  ExpandedU,
  Id,
  LaboratoryName,
  MassUnit,
  Medium,
  QuantityKind,
  Stage,
  ValueState,
  WeightClass,
} from './common.ts';

/** GET /api/calibrations. */
export const CalibrationListQuery = z.object({
  q: z.string().trim().max(80).optional(),
  laboratory: Id.optional(),
  issuedFrom: Day.optional(),
  issuedTo: Day.optional(),
  state: z.enum(['in force', 'superseded', 'withdrawn']).optional(),
  sort: z.enum(['issuedOn', '-issuedOn', 'certificateNo', '-certificateNo']).default('-issuedOn'),
  cursor: Cursor.optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});
export type CalibrationListQuery = z.infer<typeof CalibrationListQuery>;

export const CalibrationRow = z.object({
  revisionId: Id,
  calibrationId: Id,
  certificateNo: z.string(),
  revisionN: z.number().int(),
  issuer: LaboratoryName,
  issuedOn: Day,
  performedBegin: Day,
  performedEnd: Day,
  datePrecision: DatePrecision,
  weights: z.number().int(),
  /** The first weight's registry number, to recognise the sheet by. */
  firstRegistryNo: z.string(),
  state: ValueState,
});

export const CalibrationListResponse = z.object({
  calibrations: z.array(CalibrationRow),
  /** Open drafts of this person's laboratories, newest first (first page only). */
  drafts: z.array(DraftSummary),
  nextCursor: z.string().nullable(),
  count: z.number().int(),
  isCountExact: z.boolean(),
  abilities: Abilities,
});
export type CalibrationListResponse = z.infer<typeof CalibrationListResponse>;

/** GET /api/calibrations/:revisionId. */
export const CalibrationResponse = z.object({
  calibration: CalibrationRow.extend({
    method: z.string(),
    decisionRule: DecisionRule.nullable(),
    registeredBy: LaboratoryName,
    signatory: z.string().nullable(),
    reason: z.string().nullable(),
    document: z.object({ id: Id, name: z.string(), size: z.number().int() }).nullable(),
    contentSha256: z.string(),
    recordedAt: z.string(),
  }),
  revisions: z.array(
    z.object({ revisionId: Id, n: z.number().int(), issuedOn: Day, reason: z.string().nullable() }),
  ),
  lines: z.array(
    z.object({
      uid: Id,
      line: z.number().int(),
      standard: z.object({ id: Id, registryNo: z.string(), marking: z.string(), nominal: DecimalString }),
      holder: LaboratoryName,
      quantity: QuantityKind,
      medium: Medium,
      stage: Stage.nullable(),
      deviation: Deviation,
      reportedUnit: MassUnit,
      reportedDecimals: z.number().int(),
      expandedU: DecimalString.nullable(),
      /** Decimals of U in `reportedUnit` as printed; null where U is not stated. */
      reportedUDecimals: z.number().int().nullable(),
      k: DecimalString.nullable(),
      coverage: DecimalString.nullable(),
      class: WeightClass.nullable(),
      underAccreditation: z.boolean(),
      state: ValueState,
      stateSince: Day.nullable(),
      /** Why it is superseded or withdrawn. */
      stateReason: z.string().nullable(),
      /** The latest later certificate in force for the same weight and kind; null where there is none, or it is not told. */
      newer: z.object({ revisionId: Id, certificateNo: z.string() }).nullable(),
      references: z.array(
        z.object({
          valueUid: Id,
          registryNo: z.string(),
          certificateNo: z.string(),
          usedAs: UsedAs,
          sensitivity: z.number(),
          usedBegin: Day,
          usedEnd: Day,
          state: ValueState,
        }),
      ),
      /** Budget lines; null where this person may see the statement only. */
      components: z
        .array(
          z.object({
            name: z.string(),
            evaluation: z.enum(['A', 'B']),
            standardUncertainty: z.number(),
            sensitivity: z.number(),
          }),
        )
        .nullable(),
    }),
  ),
  abilities: Abilities,
});
export type CalibrationResponse = z.infer<typeof CalibrationResponse>;

const SignaturePassword = z.string().min(1, 'Type your password again: it is your signature').max(200);

/** Why and from when a calibration is withdrawn. */
export const WithdrawBody = z.strictObject({
  reason: z.string().trim().min(3, 'Say why it is withdrawn').max(300),
  effectiveOn: Day,
});
/** POST /api/calibrations/:revisionId/withdraw: the same under the signatory's password. */
export const SignedWithdrawBody = WithdrawBody.extend({ password: SignaturePassword });
/** The sheet as it stands afterwards, and the number of the act. */
export const WithdrawnResponse = CalibrationResponse.extend({ actSeq: z.number().int() });
export type WithdrawnResponse = z.infer<typeof WithdrawnResponse>;

/**
 * POST /api/calibrations/:revisionId/correct, 201: a further revision that differs in the lines named; every other
 * line is issued again as it stands. Grams.
 */
export const CorrectBody = z.strictObject({
  reason: z
    .string()
    .trim()
    .min(3, 'Say what the amendment changes and why (ISO/IEC 17025:2017, 7.8.8)')
    .max(300),
  /** Day of the amended certificate, and the day from which it takes the place of the one before. */
  issuedOn: Day,
  effectiveOn: Day,
  lines: z
    .array(
      z
        .strictObject({ valueUid: Id, deviation: Deviation.optional(), expandedU: ExpandedU.optional() })
        .refine((line) => line.deviation !== undefined || line.expandedU !== undefined, {
          path: ['deviation'],
          error: 'Give the corrected deviation, the corrected U, or both',
        }),
    )
    .min(1, 'Name at least one result to correct')
    .max(200),
  password: SignaturePassword,
});
export const CorrectedResponse = z.object({
  revisionId: Id,
  valueUids: z.array(Id),
  actSeq: z.number().int(),
});
export type CorrectedResponse = z.infer<typeof CorrectedResponse>;
export const IssuedResponse = z.object({ revisionId: Id, valueUids: z.array(Id) });
export type IssuedResponse = z.infer<typeof IssuedResponse>;

/** POST /api/documents?laboratory=&name= with the file as body. */
export const DocumentQuery = z.object({ laboratory: Id, name: z.string().trim().min(1).max(200) });
export const DocumentResponse = z.object({
  id: Id,
  name: z.string(),
  size: z.number().int(),
  sha256: z.string(),
});
