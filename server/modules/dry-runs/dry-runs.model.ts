import { DataTypes } from 'sequelize';
import { ID, registerModel } from '#server/db/register-model.ts';

export interface DryRunColumns {
  id: string;
  laboratoryId: string;
  accountId: string;
  name: string;
  /** A `DryRunQuestion`. */
  question: object;
}

export const dryRunModel = registerModel<DryRunColumns>('dry_run', {
  id: { type: ID, primaryKey: true },
  laboratoryId: ID,
  accountId: ID,
  name: DataTypes.STRING(120),
  question: DataTypes.JSON,
});

export interface DryRunNoteColumns {
  id: string;
  dryRunId: string;
  accountId: string;
  kind: 'note' | 'discard';
  text: string;
}

export const dryRunNoteModel = registerModel<DryRunNoteColumns>('dry_run_note', {
  id: { type: ID, primaryKey: true },
  dryRunId: ID,
  accountId: ID,
  kind: DataTypes.STRING(10),
  text: DataTypes.STRING(600),
});
