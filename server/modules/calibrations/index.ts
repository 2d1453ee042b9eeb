export { issueCalibration, type IssuedCalibration } from './issue-calibration.service.ts';
export { reviseCalibration } from './revise-calibration.service.ts';
export { withdrawCalibration } from './withdraw-calibration.service.ts';
export { calibrationRoutes } from './calibrations.routes.ts';
export { openDrafts } from './draft-list.queries.ts';
export { createDraft, setDraftState } from './draft-store.ts';
