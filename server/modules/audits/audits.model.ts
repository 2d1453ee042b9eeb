import { DataTypes } from 'sequelize';
import { ID, registerModel } from '#server/db/register-model.ts';
import type { ColumnShape } from '#server/db/row-digest.ts';

/** A finished audit: never changed. Repeating it is a run of its own. */
export interface AuditRunColumns {
  id: string;
  scope: 'value' | 'laboratory' | 'network';
  valueUid: string | null;
  laboratoryId: string | null;
  day: string;
  known: string;
  asOf: string;
  asOfAct: number;
  repeatOf: string | null;
  askedBy: string;
  ruleSet: string;
  engine: string;
  beganAt: Date;
  endedAt: Date;
  chains: number;
  valueCount: number;
  linkCount: number;
  findingCount: number;
  /** JSON text. */
  counts: string;
  /** JSON text. */
  rules: string;
  resultSha256: string;
  factsSha256: string;
}

export const auditRunModel = registerModel<AuditRunColumns>('audit_run', {
  id: { type: ID, primaryKey: true },
  scope: DataTypes.STRING,
  valueUid: ID,
  laboratoryId: ID,
  day: DataTypes.DATEONLY,
  known: DataTypes.DATEONLY,
  asOf: DataTypes.CHAR(27),
  asOfAct: DataTypes.BIGINT,
  repeatOf: ID,
  askedBy: ID,
  ruleSet: DataTypes.STRING,
  engine: DataTypes.STRING,
  beganAt: DataTypes.DATE(6),
  endedAt: DataTypes.DATE(6),
  chains: DataTypes.INTEGER,
  valueCount: DataTypes.INTEGER,
  linkCount: DataTypes.INTEGER,
  findingCount: DataTypes.INTEGER,
  counts: DataTypes.TEXT('long'),
  rules: DataTypes.TEXT('long'),
  resultSha256: DataTypes.CHAR(64),
  factsSha256: DataTypes.CHAR(64),
});

/** A row of `audit_finding`, as the table names its columns. */
export interface FindingRow {
  run_id: string;
  n: number;
  rule: string;
  verdict: 'conduct' | 'today';
  outcome: 'fails' | 'cannot be judged';
  severity: 'block' | 'critical' | 'major' | 'minor' | 'information';
  subject: 'value' | 'link' | 'chain';
  value_uid: string;
  parent_uid: string | null;
  focus_uid: string;
  laboratory_id: string;
  sentence: string;
  /** JSON text. */
  parameters: string;
  /** Place of what the rule saw, over all blocks of `audit_facts`. */
  facts_n: number;
}

const text = (name: string): ColumnShape => ({ name, type: 'char', scale: null });
const whole = (name: string): ColumnShape => ({ name, type: 'int', scale: null });

/**
 * Columns of the two tables that hold a run's many rows. They are written past the models, since the record's lock is
 * taken only once they are there, and digested by these shapes as the models would.
 */
export const FINDING_COLUMNS: readonly ColumnShape[] = [
  text('run_id'),
  whole('n'),
  ...['rule', 'verdict', 'outcome', 'severity', 'subject', 'value_uid', 'parent_uid'].map(text),
  ...['focus_uid', 'laboratory_id', 'sentence', 'parameters'].map(text),
  whole('facts_n'),
];
export const FACTS_COLUMNS: readonly ColumnShape[] = [text('run_id'), whole('block'), text('body')];
