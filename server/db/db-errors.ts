import { ConnectionError, ForeignKeyConstraintError, UniqueConstraintError } from 'sequelize';
import { AppError } from '#server/http/app-error.ts';

/** Unique keys of the register, by name: the field a form shows the message beside, and the sentence. */
const UNIQUE_KEYS: Record<string, { field: string; message: string }> = {
  standard_registry_no: {
    field: 'registryNo',
    message: 'This registry number is taken. Choose another, or open the standard that has it.',
  },
  weight_set_registry_no: { field: 'registryNo', message: 'This registry number is taken by another set.' },
  calibration_certificate: {
    field: 'certificateNo',
    message:
      'This certificate of this laboratory is already in the register. Open it, or correct the number.',
  },
  account_email: { field: 'email', message: 'An account with this e-mail exists.' },
  laboratory_code: { field: 'code', message: 'This code is taken by another laboratory.' },
};

/** Translates what the database refuses into the product's own errors; `null` for what nobody foresaw. */
export function asAppError(thrown: unknown): AppError | null {
  if (thrown instanceof UniqueConstraintError) {
    const text = String((thrown.parent as { sqlMessage?: string }).sqlMessage ?? thrown.parent.message);
    const known = Object.entries(UNIQUE_KEYS).find(([name]) => text.includes(name));
    if (!known) return null;
    const received = Object.values(thrown.fields ?? {})
      .map(String)
      .join(' ');
    const { field, message } = known[1];
    return new AppError('duplicate', message, { fields: { [field]: { message, received } } });
  }
  if (thrown instanceof ForeignKeyConstraintError) {
    return new AppError('unprocessable', 'Something this refers to is not in the register.', {
      cause: thrown,
    });
  }
  const unfit = unfitColumn(thrown);
  if (unfit) {
    // The edge should have said so, by the field's own name: news for us, not only for the person.
    return new AppError(
      'unprocessable',
      `A value does not fit where it is kept (${unfit}); nothing was saved.`,
      {
        cause: thrown,
        isReportable: true,
      },
    );
  }
  if (thrown instanceof ConnectionError) {
    return new AppError(
      'unavailable',
      'The database does not answer; nothing was saved. Try again in a moment.',
      {
        cause: thrown,
      },
    );
  }
  return null;
}

/** Out of range, too long, or not of the column's kind. */
const UNFIT = new Set([1264, 1406, 1366, 1292]);

function unfitColumn(thrown: unknown): string | null {
  const parent = (thrown as { parent?: { errno?: number; sqlMessage?: string } } | null)?.parent;
  if (!parent?.errno || !UNFIT.has(parent.errno)) return null;
  return /column [`']?(?:[^`']*[`']\.[`'])*([a-z_]+)/i.exec(parent.sqlMessage ?? '')?.[1] ?? 'a column';
}
