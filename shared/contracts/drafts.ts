import { z } from 'zod';
import { DecisionRule, UsedAs } from './calibration-input.ts';
import {
  Abilities,
  DatePrecision,
  Day,
  DecimalString,
  Deviation,
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
  /** Grams; null, as U and k are, where the weight is another laboratory's: a chain tells it once a certificate names it. */
  deviation: Deviation.nullable(),
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  certificateNo: z.string(),
  performedEnd: Day,
  state: ValueState,
  isNewest: z.boolean(),
});
export type ReferenceChoice = z.infer<typeof ReferenceChoice>;
export const ReferenceListResponse = z.object({ references: z.array(ReferenceChoice) });
