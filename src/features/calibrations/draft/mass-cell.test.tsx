import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { FormProvider, useForm, useWatch } from 'react-hook-form';
import { expect, it } from 'vitest';
import { emptyDraft, newLine, type DraftValues } from './draft-values.ts';
import { MassCell } from './mass-cell.tsx';

function Sheet() {
  const form = useForm<DraftValues>({ defaultValues: { ...emptyDraft(), lines: [newLine(null)] } });
  const line = useWatch({ control: form.control, name: 'lines.0' });
  return (
    <FormProvider {...form}>
      <MassCell at={0} part="value" label="Value" isLocked={false} error={undefined} />
      <output>{`${line.value} in ${line.unit}, U in ${line.uUnit}`}</output>
    </FormProvider>
  );
}

it('a unit typed beside the number becomes the unit of the value, and leaves the cell', async () => {
  const user = userEvent.setup();
  render(<Sheet />);
  const cell = screen.getByLabelText<HTMLInputElement>('Value');
  await user.type(cell, '80 g');
  expect(cell.value).toBe('80');
  expect(screen.getByRole('status').textContent).toBe('80 in g, U in mg');
  expect(screen.queryByText(/Write a plain decimal/)).toBeNull();
  await user.clear(cell);
  await user.type(cell, '-0,031 \u00b5g');
  expect(screen.getByRole('status').textContent).toBe('-0.031 in ug, U in mg');
});
