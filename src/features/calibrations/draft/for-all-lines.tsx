import { useFormContext, useWatch } from 'react-hook-form';
import type { DraftLine } from '#shared/contracts/drafts.ts';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { SelectField, type Choice } from '#src/components/ui/select-field.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { Toolbar } from '#src/components/layout/columns.tsx';
import type { DraftValues } from './draft-values.ts';
import { runsOf } from './gather-points.ts';
import { CLASSES, QUANTITIES, UNIT_CHOICES, VALUE_FORMS } from './line-choices.ts';
import { ReferenceBox } from './reference-box.tsx';
import { useLinkSet, type LinkedSet } from './use-link-set.ts';

/** What is usually the same on a whole certificate, said once for all its lines. */
export function ForAllLines() {
  const { control, setValue, getValues } = useFormContext<DraftValues>();
  const lines = useWatch({ control, name: 'lines' });
  const change = (changes: Partial<DraftLine>): void =>
    setValue(
      'lines',
      getValues('lines').map((line) => ({ ...line, ...changes })),
      { shouldDirty: true },
    );
  const { result, link } = useLinkSet();
  const choose = (field: keyof DraftLine, label: string, choices: readonly Choice[], width: string) => (
    <SelectField
      label={label}
      choices={choices}
      placeholder={field === 'class' ? 'none' : 'differ'}
      className={width}
      value={(common(lines, field) as string | null) ?? ''}
      onChange={(event) => {
        const chosen = event.target.value;
        if (chosen !== '' || field === 'class') change({ [field]: chosen || null });
      }}
    />
  );
  return (
    <div className="flex flex-col gap-2">
      <Toolbar label="For all lines">
        {choose('quantity', 'Quantity', QUANTITIES, 'w-42')}
        {choose('valueIs', 'Printed as', VALUE_FORMS, 'w-32')}
        {choose('unit', 'in', UNIT_CHOICES, 'w-18')}
        {choose('uUnit', 'U in', UNIT_CHOICES, 'w-18')}
        <TextField
          label="k"
          className="w-14"
          inputMode="decimal"
          placeholder="differ"
          value={(common(lines, 'k') as string | null) ?? ''}
          onChange={(event) => change({ k: event.target.value })}
        />
        {choose('class', 'Class stated', CLASSES, 'w-22')}
        <ReferenceBox
          label="Reference of all lines"
          className="min-w-48 flex-1"
          quantity={(common(lines, 'quantity') as DraftLine['quantity'] | null) ?? undefined}
          onChosen={({ valueUid }) =>
            change({ references: [{ valueUid, sensitivity: '', usedAs: 'certificate' }] })
          }
          onSet={(set) => void link(set)}
        />
      </Toolbar>
      {result && <LinkedSetNotice {...result} />}
    </div>
  );
}

/** What the set gave, and which lines it has no piece for. */
function LinkedSetNotice({ registryNo, linked, without, error }: LinkedSet) {
  if (error) return <ErrorNotice error={error} />;
  return (
    <Notice
      tone={without.length > 0 ? 'caution' : 'plain'}
      role="status"
      title={`${linked} of ${linked + without.length} lines lean on set ${registryNo}, piece by piece`}
    >
      {without.length > 0 &&
        `Line${without.length > 1 ? 's' : ''} ${runsOf(without)} found no piece of the same nominal, and of the same marking where there are several, with a value in force. What stood there stays.`}
    </Notice>
  );
}

/** The value that all lines share; null where they differ. */
function common(lines: readonly DraftLine[], field: keyof DraftLine): unknown {
  const [first, ...rest] = lines;
  return first && rest.every((line) => line[field] === first[field]) ? first[field] : null;
}
