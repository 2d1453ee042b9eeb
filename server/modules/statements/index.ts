export { statementRoutes } from './statements.routes.ts';
