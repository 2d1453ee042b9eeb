import type { Role } from '#shared/contracts/identity.ts';
import { permission } from '#server/policy/permission.ts';
import { worksIn } from '#server/policy/user.ts';

/** Roles that a laboratory gives to its own people. Its administrators and its assessors come from the registrar. */
const OWN_TO_GIVE: readonly Role[] = ['metrologist', 'signatory', 'reader'];

/** Granting or ending a role in a laboratory. */
export const assertMembershipPermission = permission<{ laboratoryId: string; role: Role }>(
  'membership:assert',
  (user, { laboratoryId, role }) =>
    user.isRegistrar ||
    (OWN_TO_GIVE.includes(role) && worksIn(user, laboratoryId, 'laboratory administrator')),
);
