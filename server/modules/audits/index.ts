export { auditRoutes } from './audits.routes.ts';
export { auditRunnerOf } from './audit-runner.ts';
export { newestAudits } from './newest-audits.queries.ts';
