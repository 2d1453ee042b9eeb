import { act, renderHook } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { ApiProblem } from './api-problem.ts';
import { errorAt, showFieldProblems, useZodForm } from './form.ts';

const Body = z.strictObject({ lines: z.array(z.strictObject({ k: z.string() })) });
const refusal = (fields: ApiProblem['fields']): ApiProblem =>
  new ApiProblem({ type: '/problems/unprocessable', title: 'Not possible', status: 422, fields });

function form() {
  return renderHook(() => {
    const made = useZodForm(Body, { defaultValues: { lines: [{ k: '' }] } });
    // Read here, so that the form knows that somebody watches its errors.
    return { made, errors: made.formState.errors };
  });
}

describe('showFieldProblems', () => {
  it('puts a problem beside its field, by its path', () => {
    const { result } = form();
    const problem = { message: 'Out of range', received: '25', expected: '1 to 20' };
    act(() => expect(showFieldProblems(refusal({ 'lines.0.k': problem }), result.current.made)).toBe(true));
    expect(errorAt(result.current.errors, 'lines.0.k')).toBe(
      'Out of range (received "25", expected 1 to 20).',
    );
    expect(errorAt(result.current.errors, 'lines.1.k')).toBeUndefined();
  });

  it('says when a problem has no field here, so that a notice can show it', () => {
    const { result } = form();
    const error = refusal({ elsewhere: { message: 'Wrong' } });
    act(() =>
      expect(showFieldProblems(error, result.current.made, (path) => path !== 'elsewhere')).toBe(false),
    );
    expect(showFieldProblems(new Error('no document'), result.current.made)).toBe(false);
  });
});
