import { z } from 'zod';
import { AuditFigures } from './audits.ts';
import { Day, Id, LaboratoryName, QuantityKind } from './common.ts';
import { DraftSummary } from './drafts.ts';

/** GET /api/desk: what needs this person today, by role; empty parts are not sent. */
export const DeskResponse = z.object({
  day: Day,
  laboratories: z.array(LaboratoryName),
  /** Sent to sign, where this person may sign. */
  toSign: z.array(DraftSummary),
  /** Open drafts of this person's laboratories. */
  drafts: z.array(DraftSummary),
  /** References due within 60 days or overdue, by the laboratory's own programme. */
  due: z.array(
    z.object({
      standardId: Id,
      registryNo: z.string(),
      marking: z.string(),
      holder: LaboratoryName,
      dueOn: Day,
      lastCalibrated: Day.nullable(),
    }),
  ),
  /** Values of ours whose reference was superseded or withdrawn since. */
  upstream: z.array(
    z.object({
      valueUid: Id,
      registryNo: z.string(),
      quantity: QuantityKind,
      certificateNo: z.string(),
      referenceRegistryNo: z.string(),
      referenceCertificateNo: z.string(),
      what: z.enum(['superseded', 'withdrawn']),
      on: Day,
    }),
  ),
  /** Notices that take effect from 60 days ago on and move values of ours materially, or change a verdict. */
  notices: z.array(
    z.object({
      id: Id,
      number: z.string(),
      effectiveOn: Day,
      material: z.number().int(),
      verdictChanges: z.number().int(),
    }),
  ),
  /** The newest finished audit of each laboratory this person reads in full, and for the registrar of the network. */
  audits: z.array(
    z.object({
      id: Id,
      /** Null: the whole network. */
      laboratory: LaboratoryName.nullable(),
      day: Day,
      endedAt: z.iso.datetime(),
      figures: AuditFigures,
    }),
  ),
  /** For the registrar: size of the register. */
  register: z
    .object({
      laboratories: z.number().int(),
      standards: z.number().int(),
      values: z.number().int(),
      acts: z.number().int(),
    })
    .nullable(),
  /** For an assessor: laboratories opened to them and until when. */
  assessments: z.array(z.object({ laboratory: LaboratoryName, until: Day.nullable() })),
});
export type DeskResponse = z.infer<typeof DeskResponse>;

/** GET /api/find?q=: one box finds anything by number, marking, certificate or laboratory. */
export const FindQuery = z.object({ q: z.string().trim().min(1, 'Type a number, marking or name').max(120) });
export const FindResponse = z.object({
  found: z.array(
    z.object({
      kind: z.enum(['standard', 'set', 'certificate', 'laboratory']),
      id: Id,
      label: z.string(),
      detail: z.string(),
    }),
  ),
});
