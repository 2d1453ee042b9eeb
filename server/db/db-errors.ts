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
