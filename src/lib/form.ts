import { zodResolver } from '@hookform/resolvers/zod';
import {
  get as valueAt,
  useForm,
  type FieldErrors,
  type FieldValues,
  type Path,
  type UseFormProps,
  type UseFormReturn,
} from 'react-hook-form';
import type { z } from 'zod';
import { ApiProblem, problemLine } from './api-problem.ts';

/**
 * A form checked by the same schema as the request's body: fields are checked when left, and again while they
 * are being mended. `handleSubmit` gives what the schema made of the entries.
 */
export function useZodForm<Input extends FieldValues, Output extends FieldValues>(
  schema: z.ZodType<Output, Input>,
  options: Omit<UseFormProps<Input, unknown, Output>, 'resolver'> = {},
): UseFormReturn<Input, unknown, Output> {
  return useForm<Input, unknown, Output>({ mode: 'onTouched', ...options, resolver: zodResolver(schema) });
}

/** The message of one field by its path (`lines.0.deviation`), for a field's `error`. */
export function errorAt(errors: FieldErrors, path: string): string | undefined {
  const found: unknown = valueAt(errors, path);
  if (typeof found !== 'object' || found === null || !('message' in found)) return undefined;
  return typeof found.message === 'string' && found.message !== '' ? found.message : undefined;
}

/**
 * Puts the server's field problems beside the fields and the focus on the first.
 * @param hasField says whether the form shows a field for a path; without it every path counts as shown
 * @returns true when every problem found its field, so that no general notice is needed
 */
export function showFieldProblems<Input extends FieldValues>(
  error: unknown,
  form: Pick<UseFormReturn<Input>, 'setError'>,
  hasField: (path: string) => boolean = () => true,
): boolean {
  if (!(error instanceof ApiProblem)) return false;
  const problems = Object.entries(error.fields);
  const shown = problems.filter(([path]) => hasField(path));
  shown.forEach(([path, problem], index) => {
    form.setError(
      path as Path<Input>,
      { type: 'server', message: problemLine(problem) },
      { shouldFocus: index === 0 },
    );
  });
  return problems.length > 0 && shown.length === problems.length;
}
