import { permission } from '#server/policy/permission.ts';
import { readsInFull, writesFor } from '#server/policy/user.ts';
import type { StandardSubject } from './standard-laboratory.queries.ts';

/** Opening a standard: for those who read its owner or its custodian in full. */
export const readStandard = permission<StandardSubject>(
  'standard:read',
  (user, { ownerId, custodianId }) => readsInFull(user, ownerId) || readsInFull(user, custodianId),
);

/** Registering standards and sets of a laboratory. */
export const registerStandardPermission = permission<{ laboratoryId: string }>(
  'standard:register',
  (user, { laboratoryId }) => writesFor(user, laboratoryId),
);

/** Saying what happened to a standard: for its owner's people. */
export const changeStandard = permission<StandardSubject>('standard:change', (user, { ownerId }) =>
  writesFor(user, ownerId),
);

/** Every permission over a standard, for the abilities sent with it. */
export const STANDARD_PERMISSIONS = [readStandard, changeStandard] as const;
