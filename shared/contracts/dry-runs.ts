import { z } from 'zod';
import { Abilities, Cursor, Day, DecimalString, Id, LaboratoryName, WeightClass } from './common.ts';
import { DownstreamBy, WhatIfChange } from './downstream.ts';

/** What a dry run asks, so that it can be asked again: by whoever opens it, within their own rights. */
export const DryRunQuestion = z.strictObject({
  changes: z.array(WhatIfChange).min(1, 'Name at least one change').max(20),
  /** Left out: the day on which it is asked. */
  day: Day.optional(),
  known: Day.optional(),
  by: DownstreamBy.default('laboratory'),
  threshold: z.number().min(0).max(10).default(0.1),
});
export type DryRunQuestion = z.infer<typeof DryRunQuestion>;

/** POST /api/dry-runs, 201: keeps a question for a laboratory. Answers are never kept. */
export const SaveDryRunBody = z.strictObject({
  laboratoryId: Id,
  name: z.string().trim().min(1, 'Give it a name by which others find it').max(120),
  question: DryRunQuestion,
});

/** POST /api/dry-runs/:id/notes, 201: a remark, or that it is discarded and why. */
export const DryRunNoteBody = z.strictObject({
  kind: z.enum(['note', 'discard']),
  text: z.string().trim().min(3, 'Write at least three characters').max(600),
});

const DryRunHead = z.object({
  id: Id,
  name: z.string(),
  laboratory: LaboratoryName,
  savedBy: z.string(),
  savedAt: z.string(),
  /** The newest act when it was saved. */
  actSeq: z.number().int(),
  changes: z.number().int(),
  isDiscarded: z.boolean(),
});
export type DryRunHead = z.infer<typeof DryRunHead>;

/** GET /api/dry-runs: those of the laboratories one works in, the newest first. */
export const DryRunListQuery = z.object({
  cursor: Cursor.optional(),
  limit: z.coerce.number().int().min(1).max(100).default(50),
});
export const DryRunListResponse = z.object({
  runs: z.array(DryRunHead),
  nextCursor: z.string().nullable(),
});
export type DryRunListResponse = z.infer<typeof DryRunListResponse>;

/** GET /api/dry-runs/:id, for anyone signed in who has its address. */
export const DryRunResponse = DryRunHead.extend({
  /** Null where it names what this reader may not know. */
  question: DryRunQuestion.nullable(),
  /** Acts recorded since then, the keeping of dry runs apart. */
  actsSince: z.number().int(),
  /** The day on which it was saved: asking as known then gives the register of that day. */
  savedOn: Day,
  notes: z.array(
    z.object({
      kind: z.enum(['note', 'discard']),
      text: z.string(),
      by: z.string(),
      at: z.string(),
    }),
  ),
  abilities: Abilities,
});
export type DryRunResponse = z.infer<typeof DryRunResponse>;

/** POST /api/what-if/named: what the changes of a dry run are about, in words, and which real acts are open. */
export const NamedInput = z.strictObject({
  changes: z.array(WhatIfChange).min(1, 'Name at least one change').max(20),
});

/** A value that a change names, as a traceability statement would show it. */
const NamedValue = z.object({
  about: z.literal('value'),
  uid: Id,
  registryNo: z.string(),
  nominal: DecimalString,
  class: WeightClass.nullable(),
  certificateNo: z.string(),
  issuer: LaboratoryName,
  deviation: DecimalString,
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  /** Null where this person may not open the certificate. */
  revisionId: Id.nullable(),
  abilities: Abilities,
});

const NamedCertificate = z.object({
  about: z.literal('certificate'),
  revisionId: Id,
  certificateNo: z.string(),
  issuer: LaboratoryName,
  issuedOn: Day,
  values: z.number().int(),
  abilities: Abilities,
});

/** A notice speaks for an issuer. */
const NamedIssuer = z.object({ about: z.literal('issuer'), issuer: LaboratoryName, abilities: Abilities });

export const NamedResponse = z.object({
  /** One for each change, in order. */
  subjects: z.array(z.discriminatedUnion('about', [NamedValue, NamedCertificate, NamedIssuer])),
});
export type NamedResponse = z.infer<typeof NamedResponse>;
export type NamedSubject = NamedResponse['subjects'][number];
