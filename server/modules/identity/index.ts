export { userByAccountId, verifyPassword } from './account.queries.ts';
export { createAccount, setPassword } from './account.service.ts';
export { assertMembership, type RoleName } from './membership.service.ts';
export { hashPassword } from './password.ts';
import { membershipRoutes } from './membership.routes.ts';
import { sessionRoutes } from './session.routes.ts';

export const identityRoutes = [...sessionRoutes, ...membershipRoutes];
