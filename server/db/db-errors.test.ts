import { DatabaseError } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { asAppError } from './db-errors.ts';

const refused = (errno: number, sqlMessage: string) =>
  new DatabaseError(Object.assign(new Error(sqlMessage), { errno, sqlMessage, sql: 'INSERT' }));

describe('what the database refuses', () => {
  it.each([
    [1264, "Out of range value for column 'expanded_u' at row 1", 'expanded_u'],
    [1264, 'Out of range value for column `exagium`.`property`.`expanded_u` at row 1', 'expanded_u'],
    [1406, "Data too long for column 'name' at row 3", 'name'],
    [1366, 'something said in another way', 'a column'],
  ])('%i "%s" becomes a 422 that names the column and is news for the operator', (errno, message, column) => {
    const error = asAppError(refused(errno, message));
    expect(error).toMatchObject({ id: 'unprocessable', status: 422, isReportable: true });
    expect(error?.message).toContain(`(${column})`);
  });

  it('leaves what nobody foresaw to the masked 500', () => {
    expect(asAppError(refused(1064, 'You have an error in your SQL syntax'))).toBeNull();
    expect(asAppError(new Error('something else'))).toBeNull();
    expect(asAppError(null)).toBeNull();
  });
});
