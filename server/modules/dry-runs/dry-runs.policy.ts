import { permission } from '#server/policy/permission.ts';
import { worksIn, writesFor, type User } from '#server/policy/user.ts';

/** Whose dry run it is, or will be. */
export interface DryRunSubject {
  laboratoryId: string;
}

function keepsFor(user: User, { laboratoryId }: DryRunSubject): boolean {
  return writesFor(user, laboratoryId) || worksIn(user, laboratoryId, 'signatory');
}

/** Keeping a dry run for a laboratory: those who write or sign in its name. */
export const saveDryRunPermission = permission<DryRunSubject>('dry-run:save', keepsFor);

/** A remark on a dry run, or discarding it: the same people. */
export const noteDryRunPermission = permission<DryRunSubject>('dry-run:note', keepsFor);
