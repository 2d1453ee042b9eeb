export { dryRunRoutes } from './dry-runs.routes.ts';
