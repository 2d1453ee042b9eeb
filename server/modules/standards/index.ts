export { assertFact, assertProgramme, assertProperty } from './assertions.service.ts';
export { createSource } from './create-source.service.ts';
export { openEpoch } from './open-epoch.service.ts';
export { registerSet } from './register-set.service.ts';
export { registerStandard, type StandardRegistration } from './register-standard.service.ts';
export { factOnDay } from './standard-laboratory.queries.ts';
export { standardRoutes } from './standards.routes.ts';
