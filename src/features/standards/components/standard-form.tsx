import { useState } from 'react';
import { Controller, type SubmitHandler } from 'react-hook-form';
import { WeightClass } from '#shared/contracts/common.ts';
import { RegisterStandardBody, Shape } from '#shared/contracts/standards.ts';
import { Stack, Toolbar, TwoColumns } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SelectField, type Choice } from '#src/components/ui/select-field.tsx';
import { DateField, TextField } from '#src/components/ui/text-field.tsx';
import { errorAt, showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { useRegisterStandard } from '../api.ts';
import { emptyAsNull, monthsEntry, monthsError } from '../entries.ts';
import { isGrams, isHeavy, nominalMarking, usualShape } from '../nominal.ts';
import { DensityFields } from './density-fields.tsx';
import { ErrorLimitNote } from './error-limit-note.tsx';
import { HeavyCaution } from './heavy-caution.tsx';
import { NominalField } from './nominal-field.tsx';
import { RestoredNotice } from './restored-notice.tsx';

interface StandardFormProps {
  /** Whose entries are kept in this browser. */
  accountId: string;
  /** The laboratories one may register for. */
  laboratories: readonly Choice[];
  onRegistered: (standardId: string) => void;
}

const SHAPES = Shape.options.map((value) => ({ value, label: value }));
const CLASSES = WeightClass.options.map((value) => ({ value, label: value }));
const GRID = 'grid grid-cols-2 items-start gap-4 min-[40rem]:grid-cols-3';

/** One weight, typed from its box and its papers. */
export function StandardForm({ accountId, laboratories, onRegistered }: StandardFormProps) {
  const form = useZodForm(RegisterStandardBody, {
    defaultValues: {
      laboratoryId: laboratories[0]?.value ?? '',
      registryNo: '',
      nominal: '',
      marking: '',
      serial: null,
      shape: 'knob',
      material: 'stainless steel',
      class: null,
      density: null,
      manufacturer: null,
      inServiceFrom: null,
      intervalMonths: null,
    },
  });
  const draft = useLocalDraft(accountId, 'standard-new', form);
  const register = useRegisterStandard();
  const [hidesFields, setHidesFields] = useState(true);
  const { errors } = form.formState;
  const [nominal, weightClass] = form.watch(['nominal', 'class']);
  const field = (name: Parameters<typeof form.register>[0], isNullable = false) => ({
    error: errorAt(errors, name),
    ...form.register(name, isNullable ? { setValueAs: emptyAsNull } : {}),
  });

  function changeNominal(next: string): void {
    const { nominal: before, marking, shape } = form.getValues();
    form.setValue('nominal', next, { shouldDirty: true, shouldValidate: form.formState.isSubmitted });
    if (!isGrams(next)) return;
    const wasProposed = isGrams(before) ? before : null;
    if (marking === '' || (wasProposed && marking === nominalMarking(wasProposed))) {
      form.setValue('marking', nominalMarking(next));
    }
    if (shape === (wasProposed ? usualShape(wasProposed) : 'knob')) form.setValue('shape', usualShape(next));
  }

  const send: SubmitHandler<RegisterStandardBody> = (body) =>
    register.mutateAsync(body).then(
      ({ id }) => {
        draft.clear();
        onRegistered(id);
      },
      (error: unknown) => {
        setHidesFields(
          showFieldProblems(error, form, (path) => path !== 'laboratoryId' || laboratories.length > 1),
        );
      },
    );

  return (
    <form
      noValidate
      onSubmit={(event) => {
        register.reset();
        void form.handleSubmit(send)(event);
      }}
    >
      <TwoColumns
        sideWidth="narrow"
        side={
          <>
            <Section title="Error limit">
              <ErrorLimitNote weightClass={weightClass} nominal={nominal} />
            </Section>
            {isGrams(nominal) && isHeavy(nominal) && <HeavyCaution />}
          </>
        }
      >
        <RestoredNotice restoredFrom={draft.restoredFrom} onDiscard={draft.discard} />
        <Section title="Identity">
          <Stack>
            <div className={GRID}>
              {laboratories.length > 1 && (
                <SelectField label="Held by" choices={laboratories} {...field('laboratoryId')} />
              )}
              <TextField
                label="Registry number"
                isMono
                autoFocus
                autoComplete="off"
                hint="Letters and four digits: TV 0112"
                {...field('registryNo')}
              />
              <Controller
                name="nominal"
                control={form.control}
                render={({ field: { ref, onBlur, name } }) => (
                  <NominalField
                    label="Nominal"
                    ref={ref}
                    name={name}
                    value={nominal}
                    hint="With its unit: 1 kg, 500 mg"
                    onChange={changeNominal}
                    onBlur={onBlur}
                    error={errorAt(errors, 'nominal')}
                  />
                )}
              />
              <SelectField
                label="Class"
                isOptional
                placeholder="none"
                choices={CLASSES}
                {...field('class', true)}
              />
              <TextField label="Marking" autoComplete="off" {...field('marking')} />
              <TextField label="Serial" isOptional isMono autoComplete="off" {...field('serial', true)} />
              <TextField label="Manufacturer" isOptional {...field('manufacturer', true)} />
            </div>
          </Stack>
        </Section>
        <Section title="Body">
          <Stack>
            <div className={GRID}>
              <SelectField label="Shape" choices={SHAPES} {...field('shape')} />
              <TextField label="Material" {...field('material')} />
            </div>
            <Controller
              name="density"
              control={form.control}
              render={({ field: { ref, value, onChange } }) => (
                <DensityFields
                  ref={ref}
                  value={value}
                  onChange={onChange}
                  errorOf={(part) => errorAt(errors, `density.${part}`)}
                />
              )}
            />
          </Stack>
        </Section>
        <Section title="Programme">
          <div className={GRID}>
            <DateField
              label="In service from"
              isOptional
              className="w-full"
              {...field('inServiceFrom', true)}
            />
            <TextField
              label="Recalibrated every"
              isOptional
              inputMode="numeric"
              hint="Months, 1 to 240. Your own rule for how long you rely on a calibration."
              {...form.register('intervalMonths', { setValueAs: monthsEntry })}
              error={monthsError(errors.intervalMonths)}
            />
          </div>
        </Section>
        {register.error && <ErrorNotice error={register.error} hidesFields={hidesFields} />}
        <Toolbar>
          <Button type="submit" weight="primary" isBusy={register.isPending}>
            Register the weight
          </Button>
        </Toolbar>
      </TwoColumns>
    </form>
  );
}
