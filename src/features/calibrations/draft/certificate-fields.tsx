import { memo } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Controller, useFormContext } from 'react-hook-form';
import { Combobox, type ComboboxOption } from '#src/components/ui/combobox.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { DateField, TextField } from '#src/components/ui/text-field.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { laboratoriesQuery } from '../api.ts';
import { CertificateFile } from './certificate-file.tsx';
import type { DraftValues } from './draft-values.ts';
import { usePointAt } from './point-at.ts';

const PRECISIONS = [
  { value: 'day', label: 'day' },
  { value: 'month', label: 'month' },
  { value: 'year', label: 'year' },
];

const DECISION_RULES = [
  { value: 'guarded', label: 'guarded: accepted where U also fits' },
  { value: 'simple', label: 'simple: accepted by the value alone' },
];

/** The head of the certificate: who issued it, its number, its days, its method, and the file itself. */
export const CertificateFields = memo(function CertificateFields({ laboratoryId }: { laboratoryId: string }) {
  const { register, control } = useFormContext<DraftValues>();
  const errorOf = usePointAt();
  return (
    <Section title="Certificate">
      <div className="grid grid-cols-2 gap-x-5 gap-y-3 xl:grid-cols-4">
        <div data-field="issuerId" className="col-span-2">
          <IssuerField error={errorOf('issuerId')} />
        </div>
        <div data-field="certificateNo">
          <TextField
            label="Certificate number"
            isMono
            autoComplete="off"
            maxLength={300}
            error={errorOf('certificateNo')}
            {...register('certificateNo')}
          />
        </div>
        <div data-field="issuedOn">
          <DateField label="Issued on" error={errorOf('issuedOn')} {...register('issuedOn')} />
        </div>
        <div data-field="performedBegin">
          <DateField label="Begun on" error={errorOf('performedBegin')} {...register('performedBegin')} />
        </div>
        <div data-field="performedEnd">
          <DateField label="Ended on" error={errorOf('performedEnd')} {...register('performedEnd')} />
        </div>
        <div data-field="datePrecision">
          <SelectField label="Dates known to the" choices={PRECISIONS} {...register('datePrecision')} />
        </div>
        <div data-field="decisionRule">
          <Controller
            control={control}
            name="decisionRule"
            render={({ field }) => (
              <SelectField
                label="Decision rule"
                isOptional
                placeholder="none stated"
                choices={DECISION_RULES}
                {...field}
                value={field.value ?? ''}
                onChange={(event) => field.onChange(event.target.value || null)}
              />
            )}
          />
        </div>
        <div data-field="method" className="col-span-2">
          <TextField
            label="Method"
            placeholder="as the certificate names it"
            maxLength={300}
            error={errorOf('method')}
            {...register('method')}
          />
        </div>
        <div data-field="documentId" className="col-span-2">
          <CertificateFile laboratoryId={laboratoryId} />
        </div>
      </div>
    </Section>
  );
});

function IssuerField({ error }: { error: string | undefined }) {
  const { control } = useFormContext<DraftValues>();
  const { data } = useQuery(laboratoriesQuery);
  const options = (data?.laboratories ?? []).map((one) => ({
    id: one.id,
    label: one.name,
    detail: `${one.code}, ${one.place}`,
  }));
  const search = async (text: string): Promise<ComboboxOption[]> => {
    const wanted = text.toLowerCase();
    return options
      .filter(({ label, detail }) => `${label} ${detail}`.toLowerCase().includes(wanted))
      .slice(0, 30);
  };
  return (
    <Controller
      control={control}
      name="issuerId"
      render={({ field }) => (
        <Combobox
          label="Issued by"
          placeholder="name, code or place"
          emptyText="No laboratory of the register by that name"
          error={error}
          value={options.find(({ id }) => id === field.value) ?? null}
          onChange={(chosen) => field.onChange(chosen?.id ?? null)}
          onBlur={field.onBlur}
          search={search}
        />
      )}
    />
  );
}
