export {
  adoptPolicy,
  assertAuthorisation,
  assertRecognition,
  assertScopeLine,
  createLaboratory,
  createScaleVersion,
} from './network.service.ts';
export { networkRoutes } from './network.routes.ts';
export { refuseUnknownLaboratory } from './refuse-unknown-laboratory.ts';
export { standingOn } from './standing.ts';
