import { DataTypes, type Model, type ModelAttributes, type ModelStatic, type Sequelize } from 'sequelize';
import { guardRegisterModel } from './base-model.ts';

/** What every row of the register carries: when, and in which act, it was recorded. */
export interface Recorded {
  recordedAt: Date;
  actSeq: number;
}

type RegisterModel<Row extends object> = ModelStatic<Model<Row & Recorded, Row & Recorded>>;

/** Column types as the migrations declare them. */
export const ID = DataTypes.CHAR(36);
export const GRAMS = DataTypes.DECIMAL(20, 12);

/**
 * Declares an insert-only table of the register. The model belongs to a pool, and a process may have several
 * (tests do): so this gives a function that finds the model of a pool, made at its first use. Attributes are
 * camelCase here and snake_case in the table.
 * @param options.hasOwnAct false for rows that belong to the act of the row they hang on, such as a value's links
 */
export function registerModel<Row extends object>(
  table: string,
  columns: ModelAttributes<Model<Row, Row>, Row>,
  { hasOwnAct = true }: { hasOwnAct?: boolean } = {},
): (database: Sequelize) => RegisterModel<Row> {
  const models = new WeakMap<Sequelize, RegisterModel<Row>>();
  return (database) => {
    const known = models.get(database);
    if (known) return known;
    const recorded = hasOwnAct ? { recordedAt: DataTypes.DATE(6), actSeq: DataTypes.BIGINT } : {};
    const model = database.define(table, { ...columns, ...recorded } as ModelAttributes, {
      tableName: table,
      underscored: true,
      timestamps: false,
    }) as unknown as RegisterModel<Row>;
    guardRegisterModel(model);
    models.set(database, model);
    return model;
  };
}
