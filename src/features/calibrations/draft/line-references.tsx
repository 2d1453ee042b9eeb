import { Controller, useFormContext } from 'react-hook-form';
import type { DraftLine } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { stateOfValue } from '#shared/states.ts';
import type { DraftValues } from './draft-values.ts';
import { useKnown, type KnownStandard } from './known.ts';
import { USES } from './line-choices.ts';
import { usePointAt } from './point-at.ts';
import { ReferenceBox } from './reference-box.tsx';
import { defaultSensitivity } from './sensitivity.ts';

interface LineReferencesProps {
  at: number;
  line: DraftLine;
  standard: KnownStandard | undefined;
}

/** The assigned values one result leans on, and how strongly. */
export function LineReferences({ at, line, standard }: LineReferencesProps) {
  const { setValue, getValues } = useFormContext<DraftValues>();
  const known = useKnown();
  const errorOf = usePointAt();
  const path = `lines.${at}.references` as const;
  const chosen = line.references.map(({ valueUid }) => known.references.get(valueUid));
  const standing = defaultSensitivity(standard, chosen);
  const write = (references: DraftLine['references']): void =>
    setValue(path, references, { shouldDirty: true });

  function useForAll(): void {
    const lines = getValues('lines').map((one) => ({
      ...one,
      references: line.references.map((reference) => ({ ...reference, sensitivity: '' })),
    }));
    setValue('lines', lines, { shouldDirty: true });
  }

  return (
    <div data-field={path} className="flex flex-col gap-2">
      {line.references.map(({ valueUid }, index) => (
        <div
          key={valueUid}
          className="grid grid-cols-1 items-start gap-x-5 gap-y-2 sm:grid-cols-[3fr_2fr_2fr_auto]"
        >
          <ReferenceFacts uid={valueUid} />
          <div data-field={`${path}.${index}.sensitivity`}>
            <Controller<DraftValues, `lines.${number}.references.${number}.sensitivity`>
              name={`${path}.${index}.sensitivity`}
              render={({ field }) => (
                <DecimalField
                  label="Sensitivity"
                  maxLength={20}
                  placeholder={standing?.value ?? ''}
                  hint={
                    standing
                      ? `Left empty: ${standing.value}, ${standing.why}`
                      : 'Change of the result per change of this value'
                  }
                  error={errorOf(`${path}.${index}.sensitivity`)}
                  {...field}
                />
              )}
            />
          </div>
          <Controller<DraftValues, `lines.${number}.references.${number}.usedAs`>
            name={`${path}.${index}.usedAs`}
            render={({ field }) => <SelectField label="Used as" choices={USES} {...field} />}
          />
          <span className="sm:pt-6">
            <Button weight="text" onClick={() => write(line.references.filter((_, one) => one !== index))}>
              Take off
            </Button>
          </span>
        </div>
      ))}
      <div className="flex flex-wrap items-end gap-x-5 gap-y-2">
        <ReferenceBox
          label={line.references.length === 0 ? 'Reference and its value' : 'A further reference'}
          className="w-72 max-w-full"
          quantity={line.quantity}
          onChosen={({ valueUid }) => {
            if (line.references.some((one) => one.valueUid === valueUid)) return;
            write([...line.references, { valueUid, sensitivity: '', usedAs: 'certificate' }]);
          }}
        />
        {line.references.length > 0 && (
          <Button weight="text" onClick={useForAll}>
            {line.references.length === 1 ? 'Name this reference in all lines' : 'Name these in all lines'}
          </Button>
        )}
      </div>
    </div>
  );
}

function ReferenceFacts({ uid }: { uid: string }) {
  const reference = useKnown().references.get(uid);
  if (!reference) return <p className="text-ink-2">not loaded yet</p>;
  const { registryNo, marking, certificateNo, performedEnd, deviation, expandedU, k, state } = reference;
  return (
    <p>
      <span className="font-mono text-sm">{registryNo}</span>, {marking}{' '}
      <StateMark state={stateOfValue(state)}>{state}</StateMark>
      <span className="block text-ink-2 [&>*]:whitespace-nowrap">
        {deviation !== null && (
          <>
            <Quantity
              value={deviation}
              kind="deviation"
              shownIn="auto"
              expandedUncertainty={expandedU}
              coverageFactor={k}
            />
            ,{' '}
          </>
        )}
        <span>{certificateNo}</span>, <span>{performedEnd}</span>
      </span>
    </p>
  );
}
