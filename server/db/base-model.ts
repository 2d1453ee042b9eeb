import { type Model, type Attributes, type CreationAttributes, type ModelStatic } from 'sequelize';
import { currentAct } from './act.ts';
import { rowSha256, type ColumnShape } from './row-digest.ts';

/**
 * Makes a model insert-only and bound to an act: a row of the register is written inside `inAct`, and never
 * changed. The database's grants refuse the rest; this says so earlier and in words.
 */
export function guardRegisterModel<M extends Model>(model: ModelStatic<M>): void {
  const needsAct = () => {
    if (!currentAct()) throw new Error(`${model.name} is written inside an act only`);
  };
  const refuses = () => {
    throw new Error(`${model.name} is insert-only: a correction is a new row`);
  };
  model.addHook('beforeCreate', needsAct);
  model.addHook('beforeBulkCreate', needsAct);
  model.addHook('beforeUpdate', refuses);
  model.addHook('beforeBulkUpdate', refuses);
  model.addHook('beforeDestroy', refuses);
  model.addHook('beforeBulkDestroy', refuses);
}

/** Inserts one row and stamps it with the open act's number and time. */
export async function insertRow<M extends Model>(
  model: ModelStatic<M>,
  values: Omit<CreationAttributes<M>, 'actSeq' | 'recordedAt'>,
): Promise<M> {
  const row = await model.create(stamp<M>(values));
  noteRows(model, [row]);
  return row;
}

/** Inserts many rows in one statement, each stamped with the open act. */
export async function insertRows<M extends Model>(
  model: ModelStatic<M>,
  values: Omit<CreationAttributes<M>, 'actSeq' | 'recordedAt'>[],
): Promise<void> {
  if (values.length === 0) return;
  noteRows(model, await model.bulkCreate(values.map((row) => stamp<M>(row))));
}

function stamp<M extends Model>(values: object): CreationAttributes<M> & Attributes<M> {
  const act = currentAct();
  return { ...values, actSeq: act?.seq, recordedAt: act?.recordedAt } as unknown as CreationAttributes<M> &
    Attributes<M>;
}

/** The act's own record holds a hash of the rows it wrote, so that a row changed later is found. */
function noteRows<M extends Model>(model: ModelStatic<M>, rows: readonly M[]): void {
  const attributes = Object.entries(model.getAttributes());
  const columns = attributes.map(([name, { field, type }]) => columnShape(field ?? name, type));
  for (const row of rows) {
    const values = attributes.map(([name, { field }]) => [
      field ?? name,
      row.getDataValue(name as keyof M['_attributes']),
    ]);
    currentAct()?.noteRow(model.tableName, rowSha256(columns, Object.fromEntries(values)));
  }
}

/** A model's column as the catalogue would describe it. */
function columnShape(name: string, declared: unknown): ColumnShape {
  const { key = 'STRING', _scale: scale = null } = declared as { key?: string; _scale?: number | null };
  const type =
    key === 'DATE' ? 'datetime' : key === 'DATEONLY' ? 'date' : key.toLowerCase().replace(' precision', '');
  return { name, type, scale };
}
