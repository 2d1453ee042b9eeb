export {
  adoptPolicy,
  assertAuthorisation,
  assertRecognition,
  assertScopeLine,
  createLaboratory,
  createScaleVersion,
} from './network.service.ts';
