import { DataTypes } from 'sequelize';
import { GRAMS, ID, registerModel } from '#server/db/register-model.ts';

/** Rows that hang on a value or a revision and belong to its act. */
const PART = { hasOwnAct: false };

export interface ValueLinkColumns {
  childId: number;
  parentId: number;
  role: 'reference' | 'informs';
  sensitivity: number;
  usedBegin: string;
  usedEnd: string;
  usedAs: 'certificate' | 'by notice' | 'class limit' | 'fit' | 'bracketing';
  usedDeviation: string | null;
  usedExpandedU: string | null;
  usedK: string | null;
}

/** What a value leaned on, as used. */
export const valueLinkModel = registerModel<ValueLinkColumns>(
  'value_link',
  {
    childId: { type: DataTypes.BIGINT, primaryKey: true },
    parentId: { type: DataTypes.BIGINT, primaryKey: true },
    role: { type: DataTypes.STRING, primaryKey: true },
    sensitivity: DataTypes.DOUBLE,
    usedBegin: DataTypes.DATEONLY,
    usedEnd: DataTypes.DATEONLY,
    usedAs: DataTypes.STRING,
    usedDeviation: GRAMS,
    usedExpandedU: GRAMS,
    usedK: DataTypes.DECIMAL(6, 4),
  },
  PART,
);

export interface SourceLinkColumns {
  childId: number;
  sourceId: number;
  /** Grams per unit of the source. */
  sensitivity: number;
}

export const sourceLinkModel = registerModel<SourceLinkColumns>(
  'source_link',
  {
    childId: { type: DataTypes.BIGINT, primaryKey: true },
    sourceId: { type: DataTypes.BIGINT, primaryKey: true },
    sensitivity: DataTypes.DOUBLE,
  },
  PART,
);

export interface ValueGroupColumns {
  id: number;
  revisionId: string;
  degreesOfFreedom: number | null;
  estimate: string | null;
}

/** Local parts of one calibration that a weighing design correlates. */
export const valueGroupModel = registerModel<ValueGroupColumns>(
  'value_group',
  {
    id: { type: DataTypes.BIGINT, primaryKey: true },
    revisionId: ID,
    degreesOfFreedom: DataTypes.DOUBLE,
    estimate: DataTypes.STRING,
  },
  PART,
);

export interface GroupCovarianceColumns {
  groupId: number;
  rowId: number;
  columnId: number;
  /** Square grams; `rowId <= columnId`. */
  covariance: number;
}

export const groupCovarianceModel = registerModel<GroupCovarianceColumns>(
  'group_covariance',
  {
    groupId: { type: DataTypes.BIGINT, primaryKey: true },
    rowId: { type: DataTypes.BIGINT, primaryKey: true },
    columnId: { type: DataTypes.BIGINT, primaryKey: true },
    covariance: DataTypes.DOUBLE,
  },
  PART,
);

export interface ComponentColumns {
  valueId: number;
  n: number;
  name: string;
  evaluation: 'A' | 'B';
  distribution: string;
  u: number;
  sensitivity: number;
  degreesOfFreedom: number | null;
  estimate: string | null;
}

/** A budget line of a value's local part. */
export const componentModel = registerModel<ComponentColumns>(
  'component',
  {
    valueId: { type: DataTypes.BIGINT, primaryKey: true },
    n: { type: DataTypes.INTEGER, primaryKey: true },
    name: DataTypes.STRING,
    evaluation: DataTypes.STRING,
    distribution: DataTypes.STRING,
    u: DataTypes.DOUBLE,
    sensitivity: DataTypes.DOUBLE,
    degreesOfFreedom: DataTypes.DOUBLE,
    estimate: DataTypes.STRING,
  },
  PART,
);

export interface ValueEndColumns {
  valueId: number;
  kind: 'superseded' | 'withdrawn';
  effectiveOn: string;
  madeKnownOn: string;
  replacedBy: number | null;
  changed: 'text' | 'value';
  reason: string;
}

/** The end of a value; never undone. */
export const valueEndModel = registerModel<ValueEndColumns>('value_end', {
  valueId: { type: DataTypes.BIGINT, primaryKey: true },
  kind: DataTypes.STRING,
  effectiveOn: DataTypes.DATEONLY,
  madeKnownOn: DataTypes.DATEONLY,
  replacedBy: DataTypes.BIGINT,
  changed: DataTypes.STRING,
  reason: DataTypes.STRING,
});
