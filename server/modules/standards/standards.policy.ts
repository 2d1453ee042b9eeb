import { permission } from '#server/policy/permission.ts';
import { readsInFull, worksIn } from '#server/policy/user.ts';
import type { StandardSubject } from './standard-laboratory.queries.ts';

/** Opening a standard: for those who read its owner or its custodian in full. */
export const readStandard = permission<StandardSubject>(
  'standard:read',
  (user, { ownerId, custodianId }) => readsInFull(user, ownerId) || readsInFull(user, custodianId),
);

/** Registering standards and sets of a laboratory. */
export const registerStandardPermission = permission<{ laboratoryId: string }>(
  'standard:register',
  (user, { laboratoryId }) => worksIn(user, laboratoryId, 'metrologist', 'laboratory administrator'),
);

/** Saying what happened to a standard: for its owner's people. */
export const changeStandard = permission<StandardSubject>('standard:change', (user, { ownerId }) =>
  worksIn(user, ownerId, 'metrologist', 'laboratory administrator'),
);

/** Every permission over a standard, for the abilities sent with it. */
export const STANDARD_PERMISSIONS = [readStandard, changeStandard] as const;
