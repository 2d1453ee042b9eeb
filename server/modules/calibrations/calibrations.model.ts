import { DataTypes } from 'sequelize';
import type { CalibrationLine, RootKind } from '#shared/contracts/calibration-input.ts';
import { GRAMS, ID, registerModel } from '#server/db/register-model.ts';

export interface CalibrationColumns {
  id: string;
  /** The issuer of the certificate. */
  laboratoryId: string;
  certificateNo: string;
  registeredById: string;
}

/** One event by one laboratory under one certificate; what it says stands in its revisions. */
export const calibrationModel = registerModel<CalibrationColumns>('calibration', {
  id: { type: ID, primaryKey: true },
  laboratoryId: ID,
  certificateNo: DataTypes.STRING,
  registeredById: ID,
});

export interface RevisionColumns {
  id: string;
  calibrationId: string;
  n: number;
  reason: string | null;
  issuedOn: string;
  performedBegin: string;
  performedEnd: string;
  datePrecision: 'day' | 'month' | 'year';
  method: string;
  decisionRule: 'guarded' | 'simple' | null;
  signatoryId: string | null;
  documentId: string | null;
  contentSha256: string;
}

export const revisionModel = registerModel<RevisionColumns>('revision', {
  id: { type: ID, primaryKey: true },
  calibrationId: ID,
  n: DataTypes.INTEGER,
  reason: DataTypes.STRING,
  issuedOn: DataTypes.DATEONLY,
  performedBegin: DataTypes.DATEONLY,
  performedEnd: DataTypes.DATEONLY,
  datePrecision: DataTypes.STRING,
  method: DataTypes.STRING,
  decisionRule: DataTypes.STRING,
  signatoryId: ID,
  documentId: ID,
  contentSha256: { type: DataTypes.CHAR(64), field: 'content_sha256' },
});

export type LocalOrigin = 'components' | 'inferred' | 'agreed' | 'group' | 'unknown';

export interface AssignedValueColumns {
  id: number;
  uid: string;
  revisionId: string;
  line: number;
  standardId: string;
  epochId: string;
  quantity: CalibrationLine['quantity'];
  medium: CalibrationLine['medium'];
  stage: CalibrationLine['stage'];
  /** Grams, as are all masses and uncertainties here. */
  nominal: string;
  deviation: string;
  reportedUnit: CalibrationLine['reportedUnit'];
  reportedDecimals: number;
  expandedU: string | null;
  reportedUDecimals: number | null;
  k: string | null;
  coverage: string | null;
  nuEff: number | null;
  u: number | null;
  localU: number | null;
  localOrigin: LocalOrigin;
  localDegreesOfFreedom: number | null;
  localEstimate: string | null;
  rootKind: RootKind | null;
  scaleVersionId: string | null;
  class: string | null;
  underAccreditation: number;
  unitConfirmed: number;
  changed: 'new' | 'text' | 'value';
  performedEnd: string;
  datePrecision: 'day' | 'month' | 'year';
  effectiveFrom: string;
  issuerId: string;
  holderId: string;
  decade: number;
  engineVersion: string;
}

export const assignedValueModel = registerModel<AssignedValueColumns>('assigned_value', {
  id: { type: DataTypes.BIGINT, primaryKey: true },
  uid: ID,
  revisionId: ID,
  line: DataTypes.INTEGER,
  standardId: ID,
  epochId: ID,
  quantity: DataTypes.STRING,
  medium: DataTypes.STRING,
  stage: DataTypes.STRING,
  nominal: GRAMS,
  deviation: GRAMS,
  reportedUnit: DataTypes.STRING,
  reportedDecimals: DataTypes.INTEGER,
  expandedU: GRAMS,
  reportedUDecimals: DataTypes.INTEGER,
  k: DataTypes.DECIMAL(6, 4),
  coverage: DataTypes.DECIMAL(6, 5),
  nuEff: DataTypes.DOUBLE,
  u: DataTypes.DOUBLE,
  localU: DataTypes.DOUBLE,
  localOrigin: DataTypes.STRING,
  localDegreesOfFreedom: DataTypes.DOUBLE,
  localEstimate: DataTypes.STRING,
  rootKind: DataTypes.STRING,
  scaleVersionId: ID,
  class: DataTypes.STRING,
  underAccreditation: DataTypes.TINYINT,
  unitConfirmed: DataTypes.TINYINT,
  changed: DataTypes.STRING,
  performedEnd: DataTypes.DATEONLY,
  datePrecision: DataTypes.STRING,
  effectiveFrom: DataTypes.DATEONLY,
  issuerId: ID,
  holderId: ID,
  decade: DataTypes.TINYINT,
  engineVersion: DataTypes.STRING,
});
