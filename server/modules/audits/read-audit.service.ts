import type { z } from 'zod';
import type { AuditComparison, AuditFindingsQuery, AuditSummary } from '#shared/contracts/audits.ts';
import { notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readableLaboratoryIds } from '#server/policy/user.ts';
import { storedFacts } from './audit-facts.queries.ts';
import { oneFinding, type NamedFinding, type Whose } from './audit-findings.queries.ts';
import type { AuditJob } from './audit-job.queries.ts';
import { auditSummary } from './audit-list.queries.ts';
import { auditRun, newestRepeat, type AuditRun } from './audit-run.queries.ts';
import { compareAudits } from './compare-audits.ts';

/** Everything there is of one audit. */
export interface ReadAudit {
  summary: AuditSummary;
  run: AuditRun | null;
  comparison: z.infer<typeof AuditComparison> | null;
  repeatedBy: string | null;
}

/** How far an audit is, what it found, and how it compares with the one it repeats. */
export async function readAuditOf(context: SignedInContext, job: AuditJob): Promise<ReadAudit> {
  const { database } = context;
  const [summary, run, repeatedBy] = await Promise.all([
    auditSummary(context, job.id),
    auditRun(database, job.id),
    newestRepeat(database, job.id),
  ]);
  const comparison = run && job.repeatOf ? await compareAudits(database, run, job.repeatOf) : null;
  return { summary, run, comparison, repeatedBy };
}

/** The laboratories whose results count as one's own in an audit: the audited one, or all that the person reads. */
export function whoseOf(
  { user }: SignedInContext,
  job: AuditJob,
  whose: AuditFindingsQuery['whose'],
): Whose | null {
  if (whose === undefined) return null;
  const readable = readableLaboratoryIds(user);
  const laboratoryIds = job.laboratoryId ? [job.laboratoryId] : readable;
  return laboratoryIds && { laboratoryIds, isOwn: whose === 'own' };
}

/**
 * A finding with what its rule saw.
 * @throws AppError `not-found` where the audit has no such finding
 */
export async function findingWithFacts(
  { database }: SignedInContext,
  job: AuditJob,
  n: number,
): Promise<{ found: NamedFinding; facts: unknown }> {
  const found = await oneFinding(database, job.id, n);
  if (!found) throw notFound('This finding');
  return { found, facts: await storedFacts(database, job.id, found.row.facts_n) };
}
