import { permission } from '#server/policy/permission.ts';
import { readsInFull, type User } from '#server/policy/user.ts';
import type { AuditJob } from './audit-job.queries.ts';

/** Of what an audit is wanted. A value's chain was opened to the person when it was found. */
export interface WantedAudit {
  scope: 'value' | 'laboratory' | 'network';
  laboratoryId: string | null;
}

/** Own people and their assessor audit a laboratory, the registrar the network, whoever may read a chain that chain. */
export const beginAudit = permission<WantedAudit>('audit:begin', mayAudit);

/** Reading: what a person may have audited; of other audits they are not told that there are any. */
export const readAudit = permission<AuditJob>('audit:read', mayAudit);

/** Repeating: who may read what was found may look whether it is found again. */
export const repeatAuditPermission = permission<AuditJob>('audit:repeat', mayAudit);

/** Stopping: for who asked, and the registrar. */
export const stopAuditPermission = permission<AuditJob>(
  'audit:stop',
  (user, { askedBy }) => user.isRegistrar || user.accountId === askedBy,
);

function mayAudit(user: User, { scope, laboratoryId }: WantedAudit): boolean {
  if (scope === 'network') return user.isRegistrar;
  return scope === 'value' || (laboratoryId !== null && readsInFull(user, laboratoryId));
}
