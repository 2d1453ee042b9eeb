import type { FieldError, FieldValues, Path, UseFormRegisterReturn, UseFormReturn } from 'react-hook-form';
import { errorAt } from '#src/lib/form.ts';

/** An entry left empty is not known, which is null in the register: for `setValueAs`. */
export function emptyAsNull(entry: string | null): string | null {
  return entry === null || entry.trim() === '' ? null : entry;
}

/** Whole months as a number; what is no number stays as typed, so that the schema names it. */
export function monthsEntry(entry: string | number | null): number | null {
  if (entry === null || String(entry).trim() === '') return null;
  const months = Number(entry);
  return Number.isFinite(months) ? months : (entry as number);
}

/** What is wrong with the months: the server's own words, or one sentence for whatever the schema refuses. */
export function monthsError(error: FieldError | undefined): string | undefined {
  if (!error) return undefined;
  return error.type === 'server'
    ? error.message
    : 'Write whole months from 1 to 240, or leave it empty where the weight is no reference.';
}

/** What a field of the kit takes from a form: its registration and what is wrong with it. */
export function fieldProps<Input extends FieldValues, Context, Output extends FieldValues>(
  form: UseFormReturn<Input, Context, Output>,
  name: Path<Input>,
  options: { isNullable?: boolean } = {},
): UseFormRegisterReturn & { error: string | undefined } {
  return {
    error: errorAt(form.formState.errors, name),
    ...form.register(name, options.isNullable ? { setValueAs: emptyAsNull } : {}),
  };
}
