export { userByAccountId, verifyPassword } from './account.queries.ts';
