import { permission } from '#server/policy/permission.ts';
import { readsInFull, worksIn } from '#server/policy/user.ts';

/** Seeing who works in a laboratory. */
export const seePeople = permission<{ laboratoryId: string }>(
  'laboratory:see-people',
  (user, { laboratoryId }) => readsInFull(user, laboratoryId),
);

/** Giving roles to a laboratory's people; which roles, `membership:assert` decides one by one. */
export const managePeople = permission<{ laboratoryId: string }>(
  'laboratory:manage-people',
  (user, { laboratoryId }) => user.isRegistrar || worksIn(user, laboratoryId, 'laboratory administrator'),
);

/** Every permission over a laboratory, for the abilities sent with it. */
export const LABORATORY_PERMISSIONS = [seePeople, managePeople] as const;
