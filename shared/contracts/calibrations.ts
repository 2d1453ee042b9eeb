import { z } from 'zod';
import {
  Abilities,
  CoverageFactor,
  CoverageProbability,
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
  Outcome,
  QuantityKind,
  Severity,
  Stage,
  ValueState,
  Verdict,
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

// --- drafts: documents that may hold anything half-done ---------------------------------------------

const DraftText = z.string().max(300).default('');

/** A line as typed. Nothing is parsed before it is checked: a half-typed number is kept as it is. */
export const DraftLine = z.strictObject({
  key: z.string().max(40),
  standardId: Id.nullable().default(null),
  quantity: QuantityKind.default('conventional mass'),
  medium: Medium.default('air'),
  stage: Stage.nullable().default(null),
  /** As typed, in `unit`: a deviation from nominal, or the whole value. */
  value: DraftText,
  valueIs: z.enum(['deviation', 'whole value']).default('deviation'),
  unit: MassUnit.default('mg'),
  expandedU: DraftText,
  uUnit: MassUnit.default('mg'),
  /** The certificate states no U. */
  uNotStated: z.boolean().default(false),
  k: z.string().max(20).default('2'),
  coverage: z.string().max(20).default(''),
  class: WeightClass.nullable().default(null),
  underAccreditation: z.boolean().default(true),
  unitConfirmed: z.boolean().default(false),
  signConfirmed: z.boolean().default(false),
  references: z
    .array(
      z.strictObject({
        valueUid: Id,
        sensitivity: z.string().max(20).default(''),
        usedAs: UsedAs.default('certificate'),
      }),
    )
    .max(20)
    .default([]),
});
export type DraftLine = z.infer<typeof DraftLine>;

export const DraftContent = z.strictObject({
  issuerId: Id.nullable().default(null),
  certificateNo: DraftText,
  issuedOn: DraftText,
  performedBegin: DraftText,
  performedEnd: DraftText,
  datePrecision: DatePrecision.default('day'),
  method: DraftText,
  decisionRule: DecisionRule.nullable().default(null),
  documentId: Id.nullable().default(null),
  lines: z.array(DraftLine).max(200).default([]),
});
export type DraftContent = z.infer<typeof DraftContent>;

/** POST /api/drafts, 201. GET /api/drafts/:draftId gives a DraftResponse, as do all writes below. */
export const CreateDraftBody = z.strictObject({ laboratoryId: Id, content: DraftContent });
/** PUT /api/drafts/:draftId: `version` is the one this edit started from; another one on the server is a 409 with both. */
export const SaveDraftBody = z.strictObject({ version: z.number().int().min(1), content: DraftContent });
/** POST /api/drafts/:draftId/state. */
export const DraftStateBody = z.strictObject({
  version: z.number().int().min(1),
  state: z.enum(['open', 'sent to sign', 'discarded']),
});
/** POST /api/drafts/:draftId/issue, 201 IssuedResponse: the signatory's password again, and the version they read. */
export const IssueDraftBody = z.strictObject({
  version: z.number().int().min(1),
  password: z.string().min(1, 'Type your password again: it is your signature').max(200),
});

/** A point that keeps the draft from being issued, or a question to answer. */
export const OpenPoint = z.object({
  /** Path into the draft's content, for example `lines.0.expandedU`. */
  field: z.string(),
  message: z.string(),
  received: z.string().nullable(),
  expected: z.string().nullable(),
  clause: z.string().nullable(),
  /** `missing`/`wrong` block; `question` blocks until confirmed; `note` does not. */
  kind: z.enum(['missing', 'wrong', 'question', 'note']),
  /** What a question is about; its answer is `unitConfirmed` or `signConfirmed`. */
  asks: z.enum(['unit', 'sign']).optional(),
});
export type OpenPoint = z.infer<typeof OpenPoint>;

/** A check of one line against its reference, shown while the draft is written. */
export const DraftCheck = z.object({
  /** Place in `content.lines`, from 0. */
  line: z.number().int(),
  referenceUid: Id.nullable(),
  rule: z.string(),
  clause: z.string(),
  severity: Severity,
  verdict: Verdict,
  outcome: Outcome,
  sentence: z.string(),
});
export type DraftCheck = z.infer<typeof DraftCheck>;

export const DraftSummary = z.object({
  id: Id,
  laboratory: LaboratoryName,
  certificateNo: z.string(),
  issuerName: z.string().nullable(),
  lines: z.number().int(),
  state: z.enum(['open', 'sent to sign', 'issued', 'discarded']),
  updatedAt: z.string(),
  updatedBy: z.string(),
});

export const DraftResponse = z.object({
  id: Id,
  version: z.number().int(),
  state: z.enum(['open', 'sent to sign', 'issued', 'discarded']),
  laboratory: LaboratoryName,
  content: DraftContent,
  document: z.object({ id: Id, name: z.string(), size: z.number().int() }).nullable(),
  /** Standards named by the lines, for display. */
  standards: z.array(
    z.object({
      id: Id,
      registryNo: z.string(),
      marking: z.string(),
      nominal: DecimalString,
      class: WeightClass.nullable(),
      maximumPermissibleError: DecimalString.nullable(),
      /** Its last value of the same kind, for the questions of sign, unit and change. */
      lastValue: z
        .object({ deviation: Deviation, expandedU: DecimalString.nullable(), performedEnd: Day })
        .nullable(),
    }),
  ),
  /** Values named as references, as far as this person may see them. */
  references: z.array(z.lazy(() => ReferenceChoice)),
  points: z.array(OpenPoint),
  checks: z.array(DraftCheck),
  revisionId: Id.nullable(),
  updatedAt: z.string(),
  updatedBy: z.string(),
  abilities: Abilities,
});
export type DraftResponse = z.infer<typeof DraftResponse>;

/** GET /api/references?laboratory=&issuer=&q=&quantity=: own values by part of the number, the issuer's by a whole number. */
export const ReferenceQuery = z.object({
  laboratory: Id,
  /** Who issued the certificate that names the reference. */
  issuer: Id.optional(),
  q: z.string().trim().min(1).max(80),
  quantity: QuantityKind.optional(),
});
export const ReferenceChoice = z.object({
  valueUid: Id,
  registryNo: z.string(),
  marking: z.string(),
  nominal: DecimalString,
  holder: LaboratoryName,
  quantity: QuantityKind,
  deviation: Deviation,
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  certificateNo: z.string(),
  performedEnd: Day,
  state: ValueState,
  isNewest: z.boolean(),
});
export type ReferenceChoice = z.infer<typeof ReferenceChoice>;
export const ReferenceListResponse = z.object({ references: z.array(ReferenceChoice) });

// --- issued calibrations ----------------------------------------------------------------------------

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

/** POST /api/calibrations/:revisionId/withdraw: a CalibrationResponse. */
export const WithdrawBody = z.strictObject({
  reason: z.string().trim().min(3, 'Say why it is withdrawn').max(300),
  effectiveOn: Day,
});
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
