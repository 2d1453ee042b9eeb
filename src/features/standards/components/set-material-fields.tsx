import { Controller } from 'react-hook-form';
import { Stack } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Checkbox } from '#src/components/ui/checkbox.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { errorAt } from '#src/lib/form.ts';
import { fieldProps } from '../entries.ts';
import { DensityFields } from './density-fields.tsx';
import type { SetForm } from './member-table.tsx';

/** What the weights are made of: once for all, once more below 1 g where the small ones are not of the same. */
export function SetMaterialFields({ form }: { form: SetForm }) {
  const below1g = form.watch('below1g');
  return (
    <Section title="Material and density" note={below1g ? 'from 1 g' : 'of all its weights'}>
      <Stack>
        <TextField label="Material" className="max-w-72" {...fieldProps(form, 'material')} />
        <Density form={form} name="density" />
        <Checkbox
          label="Weights below 1 g are of another material"
          checked={below1g !== null}
          onChange={({ target }) =>
            form.setValue('below1g', target.checked ? { material: '', density: null } : null, {
              shouldDirty: true,
            })
          }
        />
        {below1g !== null && (
          <>
            <TextField
              label="Material below 1 g"
              className="max-w-72"
              {...fieldProps(form, 'below1g.material')}
            />
            <Density form={form} name="below1g.density" />
          </>
        )}
      </Stack>
    </Section>
  );
}

function Density({ form, name }: { form: SetForm; name: 'density' | 'below1g.density' }) {
  return (
    <Controller
      name={name}
      control={form.control}
      render={({ field: { ref, value, onChange } }) => (
        <DensityFields
          ref={ref}
          value={value ?? null}
          onChange={onChange}
          errorOf={(part) => errorAt(form.formState.errors, `${name}.${part}`)}
        />
      )}
    />
  );
}
