import { notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { chainSubject, readChain } from '#server/modules/chains/index.ts';
import { authorize } from '#server/policy/permission.ts';
import { auditJob, type AuditJob } from './audit-job.queries.ts';
import { beginAudit, type WantedAudit } from './audits.policy.ts';

/**
 * The value, laboratory or network that an audit is wanted of.
 * @throws AppError `not-found` for a value that they may not know
 */
export async function wantedAudit(
  context: SignedInContext,
  wanted: { scope: AuditJob['scope']; valueUid?: string | null; laboratoryId?: string | null },
): Promise<WantedAudit> {
  if (wanted.scope === 'value')
    authorize(context.user, readChain, await chainSubject(context, wanted.valueUid!));
  return { scope: wanted.scope, laboratoryId: wanted.laboratoryId ?? null };
}

/**
 * An audit of something that this person may have audited, whoever asked for it.
 * @throws AppError `not-found` otherwise
 */
export async function auditSubject(context: SignedInContext, id: string): Promise<AuditJob> {
  const job = await auditJob(context.database, id);
  if (!job) throw notFound('This audit');
  if (!beginAudit.allows(context.user, await wantedAudit(context, job))) throw notFound('This audit');
  return job;
}
