export { issueCalibration, type IssuedCalibration } from './issue-calibration.service.ts';
export { reviseCalibration } from './revise-calibration.service.ts';
export { withdrawCalibration } from './withdraw-calibration.service.ts';
export { isAuthorisedToSign } from './authorised-to-sign.queries.ts';
export { calibrationSubject } from './calibration-subject.queries.ts';
export { correctCalibrationPermission, withdrawCalibrationPermission } from './calibrations.policy.ts';
export { calibrationRoutes } from './calibrations.routes.ts';
export { openDrafts } from './draft-list.queries.ts';
export { createDraft, setDraftState } from './draft-store.ts';
