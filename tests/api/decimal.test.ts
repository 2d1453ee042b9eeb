import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { Decimal, decimalText } from '#shared/decimal.ts';
import { readRow } from '#server/db/read.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();

describe('numbers on their way out of the database', () => {
  it('reads DECIMAL as exact text: no digit is lost', async () => {
    const row = await readRow<{ d: string; e: string; whole: string }>(
      app.database,
      `SELECT CAST(0.123456789012345679 AS DECIMAL(30,18)) AS d, CAST(-99999999.999999999999 AS DECIMAL(20,12)) AS e,
              CAST(1000 AS DECIMAL(20,12)) AS whole`,
    );
    expect(row).toEqual({
      d: '0.123456789012345679',
      e: '-99999999.999999999999',
      whole: '1000.000000000000',
    });
  });

  it('reads DECIMAL from a column as exact text', async () => {
    const table = `digits_${randomUUID().slice(0, 8)}`;
    await app.owner.query(`CREATE TABLE ${table} (n BIGINT PRIMARY KEY AUTO_INCREMENT, d DECIMAL(30,18))`);
    await app.owner.query(`INSERT INTO ${table} (d) VALUES ('0.123456789012345679')`);
    const row = await readRow<{ n: number; d: string }>(app.database, `SELECT n, d FROM ${table}`);
    expect(row).toEqual({ n: 1, d: '0.123456789012345679' });
    await app.owner.query(`DROP TABLE ${table}`);
  });

  it('keeps a kilogram written to a picogram through the engine and back to text', () => {
    const text = '1000.000000212345678901';
    expect(decimalText(new Decimal(text).minus('1000').plus('1000'))).toBe(text);
  });

  it('reads BIGINT and COUNT as numbers', async () => {
    const row = await readRow<{ b: number; c: number }>(
      app.database,
      'SELECT CAST(9007199254740991 AS SIGNED) AS b, COUNT(*) AS c FROM act_lock',
    );
    expect(row).toEqual({ b: Number.MAX_SAFE_INTEGER, c: 1 });
  });

  it('throws at a BIGINT that a number cannot hold, instead of rounding it', async () => {
    const reading = readRow(app.database, 'SELECT CAST(9007199254740993 AS SIGNED) AS b');
    await expect(reading).rejects.toThrow(/9007199254740993|range/i);
  });

  it('reads DOUBLE bit for bit', async () => {
    const values = [1.6e-7, 0.1 + 0.2, 5e-324, Number.MAX_VALUE, -1 / 3];
    const table = `doubles_${randomUUID().slice(0, 8)}`;
    await app.owner.query(`CREATE TABLE ${table} (n INT PRIMARY KEY, x DOUBLE)`);
    for (const [n, x] of values.entries()) {
      await app.owner.query(`INSERT INTO ${table} VALUES (:n, :x)`, { replacements: { n, x } });
    }
    const rows = await app.database.query<{ x: number }>(`SELECT x FROM ${table} ORDER BY n`, {
      type: QueryTypes.SELECT,
    });
    expect(rows.map((row) => row.x)).toEqual(values);
    await app.owner.query(`DROP TABLE ${table}`);
  });

  it('reads a DATE of the nineteenth century as the day it is', async () => {
    const row = await readRow<{ day: string }>(app.database, "SELECT CAST('1889-09-28' AS DATE) AS day");
    expect(row).toEqual({ day: '1889-09-28' });
  });
});
