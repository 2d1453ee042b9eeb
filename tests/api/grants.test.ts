import { describe, expect, it } from 'vitest';
import { GRANTS } from '#server/db/grants.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { makeLaboratory } from '#tests/support/factories.ts';
import { testApp, workerDatabase } from '#tests/support/test-app.ts';

const app = await testApp();
const application = new URL(workerDatabase().applicationUrl);
const schema = application.pathname.slice(1);
const grantee = `'${application.username}'@'127.0.0.1'`;

describe('what the application may do, as the catalogue has it', () => {
  it('is SELECT on the database and, table by table, exactly the list', async () => {
    const onSchema = await readRows<{ privilege: string }>(
      app.owner,
      'SELECT PRIVILEGE_TYPE AS privilege FROM information_schema.SCHEMA_PRIVILEGES WHERE GRANTEE = :grantee',
      { grantee },
    );
    expect(onSchema).toEqual([{ privilege: 'SELECT' }]);
    const onTables = await readRows<{ name: string; privilege: string }>(
      app.owner,
      `SELECT TABLE_NAME AS name, PRIVILEGE_TYPE AS privilege FROM information_schema.TABLE_PRIVILEGES
       WHERE GRANTEE = :grantee AND TABLE_SCHEMA = :schema`,
      { grantee, schema },
    );
    const listed = Object.entries(GRANTS).flatMap(([name, list]) =>
      list.map((privilege) => `${name} ${privilege}`),
    );
    expect(onTables.map(({ name, privilege }) => `${name} ${privilege}`).sort()).toEqual(listed.sort());
  });

  it('is nothing on the whole server and on single columns', async () => {
    const onServer = await readRows<{ privilege: string }>(
      app.owner,
      'SELECT PRIVILEGE_TYPE AS privilege FROM information_schema.USER_PRIVILEGES WHERE GRANTEE = :grantee',
      { grantee },
    );
    expect(onServer).toEqual([{ privilege: 'USAGE' }]);
    const onColumns = await readRows(
      app.owner,
      'SELECT * FROM information_schema.COLUMN_PRIVILEGES WHERE GRANTEE = :grantee',
      { grantee },
    );
    expect(onColumns).toEqual([]);
  });

  it('covers every table: each is insert-only, or on the short list of those that change', async () => {
    const tables = await readRows<{ name: string }>(
      app.owner,
      "SELECT TABLE_NAME AS name FROM information_schema.TABLES WHERE TABLE_SCHEMA = :schema AND TABLE_TYPE = 'BASE TABLE'",
      { schema },
    );
    const readOnly = ['act_lock', 'schema_migration'];
    const names = tables.map((table) => table.name).filter((name) => !readOnly.includes(name));
    expect(names.sort()).toEqual(Object.keys(GRANTS).sort());
    const changing = Object.entries(GRANTS).filter(
      ([, list]) => list.includes('UPDATE') || list.includes('DELETE'),
    );
    expect(changing.map(([name]) => name).sort()).toEqual(['audit_job', 'calibration_draft', 'session']);
  });
});

/** Statements that would alter or remove an issued row, by the error the database refuses each with. */
const ATTACKS: [what: string, sql: (table: string, column: string, id: string) => string][] = [
  ['UPDATE', (table, column, id) => `UPDATE ${table} SET ${column} = ${column} WHERE id = '${id}'`],
  ['DELETE', (table, _column, id) => `DELETE FROM ${table} WHERE id = '${id}'`],
  ['REPLACE', (table, _column, id) => `REPLACE INTO ${table} SELECT * FROM ${table} WHERE id = '${id}'`],
  ['TRUNCATE', (table) => `TRUNCATE TABLE ${table}`],
  [
    'ON DUPLICATE KEY UPDATE',
    (table, column, id) =>
      `INSERT INTO ${table} SELECT * FROM ${table} WHERE id = '${id}' ON DUPLICATE KEY UPDATE ${column} = VALUES(${column})`,
  ],
  ['ALTER', (table, column) => `ALTER TABLE ${table} DROP COLUMN ${column}`],
  ['DROP', (table) => `DROP TABLE ${table}`],
  ['CREATE TRIGGER', (table) => `CREATE TRIGGER t BEFORE INSERT ON ${table} FOR EACH ROW SET @x = 1`],
  ['RENAME', (table) => `RENAME TABLE ${table} TO gone`],
];

/** Access denied to a database, a table, a column or for want of a privilege. */
const DENIED = [1044, 1142, 1143, 1227];

describe('an issued row, attacked as the application', () => {
  it.each(ATTACKS)('%s is refused by the database', async (_what, sql) => {
    const laboratory = await makeLaboratory(app);
    const before = await readRow(app.owner, 'SELECT * FROM laboratory WHERE id = :id', { id: laboratory.id });
    const attack = app.database.query(sql('laboratory', 'name', laboratory.id));
    await expect(attack).rejects.toSatisfy((error: { parent?: { errno?: number } }) =>
      DENIED.includes(error.parent?.errno ?? 0),
    );
    expect(
      await readRow(app.owner, 'SELECT * FROM laboratory WHERE id = :id', { id: laboratory.id }),
    ).toEqual(before);
  });

  it.each(['act', 'assigned_value', 'value_link', 'value_end', 'revision', 'membership'])(
    'UPDATE and DELETE on %s are refused',
    async (table) => {
      for (const sql of [`DELETE FROM ${table}`, `TRUNCATE TABLE ${table}`]) {
        await expect(app.database.query(sql)).rejects.toSatisfy((error: { parent?: { errno?: number } }) =>
          DENIED.includes(error.parent?.errno ?? 0),
        );
      }
      const [column] = await readRows<{ name: string }>(
        app.owner,
        'SELECT COLUMN_NAME AS name FROM information_schema.COLUMNS WHERE TABLE_SCHEMA = :schema AND TABLE_NAME = :table',
        { schema, table },
      );
      const update = app.database.query(`UPDATE ${table} SET ${column?.name} = ${column?.name}`);
      await expect(update).rejects.toThrow(/UPDATE command denied/);
    },
  );

  it('may still be locked for reading: acts are serialised that way', async () => {
    const row = await readRow(app.database, 'SELECT id FROM act_lock WHERE id = 1 FOR UPDATE');
    expect(row).toEqual({ id: 1 });
  });
});
