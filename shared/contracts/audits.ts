import { z } from 'zod';
import { ChainRule } from './chains.ts';
import { Abilities, Cursor, Day, Id, LaboratoryName, Outcome, Severity, Verdict } from './common.ts';

/** What is audited: the chain of one value, the values a laboratory holds or issued, or every value in force. */
export const AuditScope = z.enum(['value', 'laboratory', 'network']);
export type AuditScope = z.infer<typeof AuditScope>;

const Days = {
  /** In force on; today where left out. */
  day: Day.optional(),
  /** As known at the end of, or until now where that is today; today where left out. */
  known: Day.optional(),
};

/** POST /api/audits, 201: asks for an audit. The work is done as a job; its address tells how far it is. */
export const AuditBody = z.discriminatedUnion('scope', [
  z.strictObject({ scope: z.literal('value'), valueUid: Id, ...Days }),
  z.strictObject({ scope: z.literal('laboratory'), laboratoryId: Id, ...Days }),
  z.strictObject({ scope: z.literal('network'), ...Days }),
]);
export type AuditBody = z.infer<typeof AuditBody>;

/** POST /api/audits and POST /api/audits/:auditId/repeat, 201. */
export const AuditAskedResponse = z.object({ id: Id });

export const AuditState = z.enum(['waiting', 'running', 'done', 'failed', 'stopped']);
export type AuditState = z.infer<typeof AuditState>;

/** What an audit is about, as it is named. */
export const AuditSubject = z.discriminatedUnion('scope', [
  z.object({
    scope: z.literal('value'),
    valueUid: Id,
    registryNo: z.string(),
    certificateNo: z.string(),
  }),
  z.object({ scope: z.literal('laboratory'), laboratory: LaboratoryName }),
  z.object({ scope: z.literal('network') }),
]);

/** How many findings fail, by severity, and how many cannot be judged. */
export const AuditFigures = z.object({
  block: z.number().int(),
  critical: z.number().int(),
  major: z.number().int(),
  minor: z.number().int(),
  information: z.number().int(),
  notJudged: z.number().int(),
});
export type AuditFigures = z.infer<typeof AuditFigures>;

/** An audit in a list: its question, how far it is, and its figures once it is done. */
export const AuditSummary = z.object({
  id: Id,
  subject: AuditSubject,
  day: Day,
  known: Day,
  askedBy: z.string(),
  askedAt: z.iso.datetime(),
  state: AuditState,
  /** Chains worked out, of how many. */
  done: z.number().int(),
  total: z.number().int().nullable(),
  /** Null until it is done. */
  figures: AuditFigures.nullable(),
});
export type AuditSummary = z.infer<typeof AuditSummary>;

/** GET /api/audits: the audits in one's reach, newest first. */
export const AuditListQuery = z.object({ cursor: Cursor.optional() });
export const AuditListResponse = z.object({
  audits: z.array(AuditSummary),
  nextCursor: z.string().nullable(),
  /** What this person may have audited: laboratories, and whether the whole network. */
  mayAudit: z.object({ laboratories: z.array(LaboratoryName), network: z.boolean() }),
});
export type AuditListResponse = z.infer<typeof AuditListResponse>;

/** How often one rule gave each outcome, by the severity of the outcome. */
export const AuditCount = z.object({
  rule: z.string(),
  verdict: Verdict,
  outcome: Outcome,
  severity: Severity,
  count: z.number().int(),
});
export type AuditCount = z.infer<typeof AuditCount>;

/** What a finished audit holds. */
export const AuditResult = z.object({
  ruleSet: z.string(),
  engine: z.string(),
  beganAt: z.iso.datetime(),
  endedAt: z.iso.datetime(),
  /** Chains, and the values and links judged once each. */
  chains: z.number().int(),
  values: z.number().int(),
  links: z.number().int(),
  findings: z.number().int(),
  counts: z.array(AuditCount),
  /** The rules in the words of that rule set. */
  rules: z.array(ChainRule),
  resultSha256: z.string(),
  factsSha256: z.string(),
  /** Number of the act that recorded it. */
  actSeq: z.number().int(),
});

const Found = z.object({ outcome: Outcome, severity: Severity });

/** A finding that one of two runs has and the other has not, or gives another outcome or severity. */
export const AuditDifference = z.object({
  rule: z.string(),
  verdict: Verdict,
  registryNo: z.string(),
  then: Found.nullable(),
  now: Found.nullable(),
});

/** How a repeated audit compares with the one it repeats. */
export const AuditComparison = z.object({
  of: Id,
  isSame: z.boolean(),
  ruleSet: z.object({ then: z.string(), now: z.string() }),
  engine: z.object({ then: z.string(), now: z.string() }),
  /** Whether the rules were given the same facts. */
  sameFacts: z.boolean(),
  /** Whether the stored findings of the first run are still those it recorded. */
  isIntact: z.boolean(),
  /** The first of them. */
  differences: z.array(AuditDifference),
  differenceCount: z.number().int(),
});
export type AuditComparison = z.infer<typeof AuditComparison>;

/** GET /api/audits/:auditId: how far it is, and what it found. */
export const AuditResponse = AuditSummary.extend({
  /** The knowledge it stands on: the newest act then, and the last instant that counts. */
  asOfAct: z.number().int(),
  asOf: z.string(),
  /** Why it failed or waits. */
  message: z.string().nullable(),
  result: AuditResult.nullable(),
  /** For a repeated audit that is done. */
  comparison: AuditComparison.nullable(),
  repeatOf: Id.nullable(),
  /** The newest audit that repeats this one. */
  repeatedBy: Id.nullable(),
  abilities: Abilities,
});
export type AuditResponse = z.infer<typeof AuditResponse>;

/** GET /api/audits/:auditId/findings. */
export const AuditFindingsQuery = z.object({
  rule: z.string().max(16).optional(),
  outcome: z.enum(['fails', 'cannot be judged']).optional(),
  severity: Severity.optional(),
  verdict: Verdict.optional(),
  /** Results of one's own laboratory, or of those above. */
  whose: z.enum(['own', 'above']).optional(),
  cursor: Cursor.optional(),
});
export type AuditFindingsQuery = z.infer<typeof AuditFindingsQuery>;

/** A value as a finding names it: what a traceability statement would show of it. */
export const AuditedValue = z.object({
  uid: Id,
  registryNo: z.string(),
  certificateNo: z.string(),
  /** Addresses of the weight and of the sheet; null where this person may not open them. */
  standardId: Id.nullable(),
  revisionId: Id.nullable(),
  /** Who holds the weight; null where the value is not theirs in full. */
  holderId: Id.nullable(),
});

export const AuditFinding = z.object({
  n: z.number().int(),
  rule: z.string(),
  verdict: Verdict,
  outcome: Outcome,
  severity: Severity,
  subject: z.enum(['value', 'link', 'chain']),
  /** The value itself, the one that leans, or the chain's focus. */
  value: AuditedValue,
  /** For a link, what was leaned on. */
  reference: AuditedValue.nullable(),
  /** The first audited value in whose chain it was met. */
  focusUid: Id,
  laboratory: LaboratoryName,
  /** Null where the words would tell more of another laboratory's weight than a statement does. */
  sentence: z.string().nullable(),
  parameters: z.record(z.string(), z.string()),
});
export type AuditFinding = z.infer<typeof AuditFinding>;

/** How many findings of one rule there are under a filter, whatever rule that filter asks for. */
export const AuditFindingGroup = z.object({
  rule: z.string(),
  outcome: Outcome,
  severity: Severity,
  count: z.number().int(),
});
export type AuditFindingGroup = z.infer<typeof AuditFindingGroup>;

export const AuditFindingsResponse = z.object({
  /** By rule, with the first page; null on further ones. */
  groups: z.array(AuditFindingGroup).nullable(),
  findings: z.array(AuditFinding),
  nextCursor: z.string().nullable(),
  total: z.number().int(),
});
export type AuditFindingsResponse = z.infer<typeof AuditFindingsResponse>;

/** GET /api/audits/:auditId/findings/:n/facts: what the rule saw, where its values are open in full to this person. */
export const AuditFactsResponse = z.object({ n: z.number().int(), facts: z.json() });

/** POST /api/audits/:auditId/stop. */
export const AuditStoppedResponse = z.object({ id: Id, state: AuditState });
