import { DataTypes } from 'sequelize';
import { GRAMS, ID, registerModel } from '#server/db/register-model.ts';

/** The days of the world an assertion covers; `validTo` null is an open end. */
interface Valid {
  validFrom: string;
  validTo: string | null;
}

const VALID = { validFrom: DataTypes.DATEONLY, validTo: DataTypes.DATEONLY };
const PROPERTY_VALUE = DataTypes.DECIMAL(18, 9);

export interface StandardColumns {
  id: string;
  registryNo: string;
  kind: string;
  /** Grams. */
  nominal: string;
  marking: string;
  serial: string | null;
  manufacturer: string | null;
  shape: string;
  material: string;
  inServiceFrom: string | null;
  laboratoryId: string;
}

/** The artefact. What changes about it stands in facts, properties and epochs. */
export const standardModel = registerModel<StandardColumns>('standard', {
  id: { type: ID, primaryKey: true },
  registryNo: DataTypes.STRING,
  kind: DataTypes.STRING,
  nominal: GRAMS,
  marking: DataTypes.STRING,
  serial: DataTypes.STRING,
  manufacturer: DataTypes.STRING,
  shape: DataTypes.STRING,
  material: DataTypes.STRING,
  inServiceFrom: DataTypes.DATEONLY,
  laboratoryId: ID,
});

export interface SetColumns {
  id: string;
  registryNo: string;
  name: string;
  laboratoryId: string;
}

export const setModel = registerModel<SetColumns>('weight_set', {
  id: { type: ID, primaryKey: true },
  registryNo: DataTypes.STRING,
  name: DataTypes.STRING,
  laboratoryId: ID,
});

export interface SetMemberColumns extends Valid {
  setId: string;
  standardId: string;
  position: number;
}

export const setMemberModel = registerModel<SetMemberColumns>('set_member', {
  setId: { type: ID, primaryKey: true },
  standardId: { type: ID, primaryKey: true },
  position: DataTypes.INTEGER,
  ...VALID,
});

export interface EpochColumns {
  id: string;
  standardId: string;
  n: number;
  reason: string;
  beginsOn: string;
  lastGoodOn: string | null;
  note: string | null;
}

export const epochModel = registerModel<EpochColumns>('epoch', {
  id: { type: ID, primaryKey: true },
  standardId: ID,
  n: DataTypes.INTEGER,
  reason: DataTypes.STRING,
  beginsOn: DataTypes.DATEONLY,
  lastGoodOn: DataTypes.DATEONLY,
  note: DataTypes.STRING,
});

export interface FactColumns extends Valid {
  id: string;
  standardId: string;
  kind: string;
  laboratoryId: string | null;
  value: string | null;
}

export const factModel = registerModel<FactColumns>('standard_fact', {
  id: { type: ID, primaryKey: true },
  standardId: ID,
  kind: DataTypes.STRING,
  laboratoryId: ID,
  value: DataTypes.STRING,
  ...VALID,
});

export interface ProgrammeColumns extends Valid {
  id: string;
  standardId: string;
  laboratoryId: string;
  intervalMonths: number;
  method: string;
  justification: string;
}

export const programmeModel = registerModel<ProgrammeColumns>('programme', {
  id: { type: ID, primaryKey: true },
  standardId: ID,
  laboratoryId: ID,
  intervalMonths: DataTypes.INTEGER,
  method: DataTypes.STRING,
  justification: DataTypes.STRING,
  ...VALID,
});

export interface PropertyColumns extends Valid {
  id: string;
  standardId: string;
  kind: string;
  value: string;
  expandedU: string | null;
  k: string | null;
  origin: string;
  note: string | null;
  sourceId: number | null;
}

export const propertyModel = registerModel<PropertyColumns>('property', {
  id: { type: ID, primaryKey: true },
  standardId: ID,
  kind: DataTypes.STRING,
  value: PROPERTY_VALUE,
  expandedU: PROPERTY_VALUE,
  k: DataTypes.DECIMAL(6, 4),
  origin: DataTypes.STRING,
  note: DataTypes.STRING,
  sourceId: DataTypes.BIGINT,
  ...VALID,
});

export interface SourceColumns {
  id: number;
  uid: string;
  kind: string;
  name: string;
  u: number;
  unit: string;
  degreesOfFreedom: number | null;
  estimate: string | null;
  standardId: string | null;
  laboratoryId: string | null;
  determinedOn: string | null;
}

export const sourceModel = registerModel<SourceColumns>('source', {
  id: { type: DataTypes.BIGINT, primaryKey: true },
  uid: ID,
  kind: DataTypes.STRING,
  name: DataTypes.STRING,
  u: DataTypes.DOUBLE,
  unit: DataTypes.STRING,
  degreesOfFreedom: DataTypes.DOUBLE,
  estimate: DataTypes.STRING,
  standardId: ID,
  laboratoryId: ID,
  determinedOn: DataTypes.DATEONLY,
});
