import type { ClipboardEvent, KeyboardEvent } from 'react';
import { useFieldArray, type UseFormReturn } from 'react-hook-form';
import { Button } from '#src/components/ui/button.tsx';
import { Head, Table } from '#src/components/ui/table.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { pastedCells, withPasted } from '../paste.ts';
import { MEMBER_COLUMNS, type MemberColumn, type SetEntries, type SetEntriesInput } from '../set-entries.ts';
import { MemberRow } from './member-row.tsx';

export type SetForm = UseFormReturn<SetEntriesInput, unknown, SetEntries>;

/** The weights of a set, one row each; arrow keys and Enter move within a column, a spreadsheet can be pasted. */
export function MemberTable({ form }: { form: SetForm }) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'members' });
  const { decimalMark } = usePreferences();

  function onPaste(event: ClipboardEvent): void {
    const at = cellOf(event.target);
    const cells = pastedCells(event.clipboardData.getData('text'));
    if (!at || !cells) return;
    event.preventDefault();
    const members = withPasted(form.getValues('members'), at, cells, decimalMark);
    form.setValue('members', members, { shouldDirty: true, shouldValidate: form.formState.isSubmitted });
  }

  return (
    <div onKeyDown={moveWithinColumn} onPaste={onPaste} className="flex flex-col gap-2">
      <Table caption="Weights of the set">
        <thead>
          <tr>
            <Head>Number</Head>
            <Head align="right">Nominal</Head>
            <Head>Marking</Head>
            <Head>Serial</Head>
            <Head>Shape</Head>
            <Head align="right">Error limit</Head>
            <Head>
              <span className="sr-only">Remove</span>
            </Head>
          </tr>
        </thead>
        <tbody>
          {fields.map((row, index) => (
            <MemberRow key={row.id} form={form} index={index} onRemove={() => remove(index)} />
          ))}
        </tbody>
      </Table>
      <p className="text-sm text-ink-3">
        Arrow keys and Enter move up and down. Rows copied from a spreadsheet (nominal, marking, serial,
        shape) can be pasted from any cell on.
      </p>
      <div>
        <Button
          weight="text"
          onClick={() => append({ nominal: '', marking: '', serial: null, shape: 'knob' })}
        >
          Add a weight
        </Button>
      </div>
    </div>
  );
}

/** Which cell of the table an element stands in; null for everything else. */
function cellOf(target: EventTarget): { row: number; column: MemberColumn } | null {
  const name = target instanceof HTMLElement ? target.getAttribute('name') : null;
  const match = /^members\.(\d+)\.(\w+)$/.exec(name ?? '');
  const column = MEMBER_COLUMNS.find((one) => one === match?.[2]);
  return match && column ? { row: Number(match[1]), column } : null;
}

function moveWithinColumn(event: KeyboardEvent<HTMLElement>): void {
  const at = cellOf(event.target);
  if (!at || event.altKey || event.ctrlKey || event.metaKey) return;
  // In a list of choices the arrow keys choose.
  const isSelect = event.target instanceof HTMLSelectElement;
  const step = event.key === 'Enter' || (event.key === 'ArrowDown' && !isSelect) ? 1 : 0;
  const back = event.key === 'ArrowUp' && !isSelect ? -1 : 0;
  if (step + back === 0) return;
  event.preventDefault();
  const next = event.currentTarget.querySelector<HTMLInputElement | HTMLSelectElement>(
    `[name="members.${at.row + step + back}.${at.column}"]`,
  );
  next?.focus();
  if (next instanceof HTMLInputElement) next.select();
}
