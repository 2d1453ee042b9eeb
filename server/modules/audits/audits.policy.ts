import { permission } from '#server/policy/permission.ts';
import { readsInFull } from '#server/policy/user.ts';
import type { AuditJob } from './audit-job.queries.ts';

/** Of what an audit is wanted. A value's chain was opened to the person when it was found. */
export interface WantedAudit {
  scope: 'value' | 'laboratory' | 'network';
  laboratoryId: string | null;
}

/** Own people and their assessor audit a laboratory, the registrar the network, whoever may read a chain that chain. */
export const beginAudit = permission<WantedAudit>('audit:begin', (user, { scope, laboratoryId }) => {
  if (scope === 'network') return user.isRegistrar;
  return scope === 'value' || (laboratoryId !== null && readsInFull(user, laboratoryId));
});

/** Reading: an audit that the person may not know of is not found before this is asked. */
export const readAudit = permission<AuditJob>('audit:read', () => true);

/** Repeating: who may read what was found may look whether it is found again. */
export const repeatAuditPermission = permission<AuditJob>('audit:repeat', () => true);

/** Stopping: for who asked, and the registrar. */
export const stopAuditPermission = permission<AuditJob>(
  'audit:stop',
  (user, { askedBy }) => user.isRegistrar || user.accountId === askedBy,
);
