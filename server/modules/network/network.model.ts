import { DataTypes } from 'sequelize';
import { GRAMS, ID, registerModel } from '#server/db/register-model.ts';

export interface LaboratoryRow {
  id: string;
  /** Short, unique, as its registry numbers and lists show it. */
  code: string;
  name: string;
  kind: 'national institute' | 'calibration laboratory' | 'external institute';
  /** ISO 3166-1 alpha-2. */
  country: string;
  place: string;
}

export const laboratoryModel = registerModel<LaboratoryRow>('laboratory', {
  id: { type: ID, primaryKey: true },
  code: DataTypes.STRING(12),
  name: DataTypes.STRING(160),
  kind: DataTypes.STRING(30),
  country: DataTypes.CHAR(2),
  place: DataTypes.STRING(120),
});

export interface RecognitionRow {
  id: string;
  laboratoryId: string;
  kind: 'institute arrangement' | 'accreditation';
  /** Who recognises. */
  body: string;
  number: string;
  arrangement: string;
  state: 'granted' | 'suspended' | 'withdrawn';
  validFrom: string;
  validTo: string | null;
}

export const recognitionModel = registerModel<RecognitionRow>('recognition', {
  id: { type: ID, primaryKey: true },
  laboratoryId: ID,
  kind: DataTypes.STRING(30),
  body: DataTypes.STRING(160),
  number: DataTypes.STRING(60),
  arrangement: DataTypes.STRING(160),
  state: DataTypes.STRING(10),
  validFrom: DataTypes.DATEONLY,
  validTo: DataTypes.DATEONLY,
});

export interface ScopeLineRow {
  id: string;
  laboratoryId: string;
  /** Number of the line within the laboratory's scope; a later assertion with the same number replaces it. */
  line: number;
  quantity: 'mass' | 'conventional mass';
  /** Grams, both ends included. */
  nominalFrom: string;
  nominalTo: string;
  method: string;
  /** Best U at nominal m: `bestUConstant` (g) + `bestURelative` (g/g) times m, at `k`. */
  bestUConstant: string;
  bestURelative: number;
  k: string;
  coverage: string;
  state: 'granted' | 'suspended' | 'withdrawn';
  validFrom: string;
  validTo: string | null;
}

export const scopeLineModel = registerModel<ScopeLineRow>('scope_line', {
  id: { type: ID, primaryKey: true },
  laboratoryId: ID,
  line: DataTypes.SMALLINT.UNSIGNED,
  quantity: DataTypes.STRING(20),
  nominalFrom: GRAMS,
  nominalTo: GRAMS,
  method: DataTypes.STRING(80),
  bestUConstant: GRAMS,
  bestURelative: DataTypes.DOUBLE,
  k: DataTypes.DECIMAL(6, 4),
  coverage: DataTypes.DECIMAL(6, 5),
  state: DataTypes.STRING(10),
  validFrom: DataTypes.DATEONLY,
  validTo: DataTypes.DATEONLY,
});

export interface AuthorisationRow {
  id: string;
  accountId: string;
  laboratoryId: string;
  what: 'sign calibrations';
  state: 'granted' | 'ended';
  validFrom: string;
  validTo: string | null;
}

export const authorisationModel = registerModel<AuthorisationRow>('authorisation', {
  id: { type: ID, primaryKey: true },
  accountId: ID,
  laboratoryId: ID,
  what: DataTypes.STRING(30),
  state: DataTypes.STRING(10),
  validFrom: DataTypes.DATEONLY,
  validTo: DataTypes.DATEONLY,
});

export interface ScaleVersionRow {
  id: string;
  name: string;
  /** What the scale rests on, in words. */
  basis: string;
  validFrom: string;
  validTo: string | null;
}

export const scaleVersionModel = registerModel<ScaleVersionRow>('scale_version', {
  id: { type: ID, primaryKey: true },
  name: DataTypes.STRING(60),
  basis: DataTypes.STRING(200),
  validFrom: DataTypes.DATEONLY,
  validTo: DataTypes.DATEONLY,
});

export interface PolicyVersionRow {
  id: string;
  name: string;
  edition: string;
  content: unknown;
  validFrom: string;
  validTo: string | null;
}

export const policyVersionModel = registerModel<PolicyVersionRow>('policy_version', {
  id: { type: ID, primaryKey: true },
  name: DataTypes.STRING(60),
  edition: DataTypes.STRING(40),
  content: DataTypes.JSON,
  validFrom: DataTypes.DATEONLY,
  validTo: DataTypes.DATEONLY,
});
