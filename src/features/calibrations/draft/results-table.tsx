import { memo, useState, type KeyboardEvent } from 'react';
import { useFieldArray, useFormContext } from 'react-hook-form';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { Button } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { Head, Table } from '#src/components/ui/table.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { useDraft } from './draft-context.ts';
import { newLine, type DraftValues } from './draft-values.ts';
import { focusField } from './focus-field.ts';
import { ForAllLines } from './for-all-lines.tsx';
import { PasteDialog } from './paste-dialog.tsx';
import { ResultRow } from './result-row.tsx';
import { StandardBox } from './standard-box.tsx';

interface ResultsTableProps {
  /** The line whose further fields are shown. */
  open: string | null;
  onOpen: (key: string | null) => void;
}

/** One line for each weight of the certificate: typed, added as a set, or pasted from a spreadsheet. */
export const ResultsTable = memo(function ResultsTable({ open, onOpen }: ResultsTableProps) {
  const { control, getValues } = useFormContext<DraftValues>();
  const { fields, append, remove } = useFieldArray({ control, name: 'lines', keyName: 'rowId' });
  const [pasted, setPasted] = useState<string | null>(null);
  const [names, setNames] = useState<ReadonlyMap<string, string>>(new Map());
  const { isLocked } = useDraft();

  function add(weights: readonly StandardRow[]): void {
    const lines = getValues('lines');
    const chosen = new Set(lines.map(({ standardId }) => standardId));
    const added = weights.filter(({ id }) => weights.length === 1 || !chosen.has(id));
    append(
      added.map(({ id }) => newLine(id, lines.at(-1))),
      { shouldFocus: false },
    );
    const first = lines.length;
    requestAnimationFrame(() => focusField(`lines.${first}.value`));
  }

  return (
    <Section
      title="Results"
      actions={
        !isLocked && (
          <Button weight="text" onClick={() => setPasted('')}>
            Paste from a spreadsheet
          </Button>
        )
      }
    >
      {/* A table on the clipboard is never meant for one field. */}
      <div
        className="flex min-w-0 flex-col gap-3"
        onKeyDown={moveInColumn}
        onPaste={(event) => {
          const text = event.clipboardData.getData('text/plain');
          if (isLocked || !/\t|\n./.test(text)) return;
          event.preventDefault();
          setPasted(text);
        }}
      >
        {fields.length > 0 && !isLocked && <ForAllLines />}
        {fields.length > 0 ? (
          <Table caption="Results">
            <thead>
              <tr>
                <Head>Weight</Head>
                <Head align="right">Value</Head>
                <Head align="right">U</Head>
                <Head align="right">k</Head>
                <Head>Reference</Head>
                <Head>
                  <span className="sr-only">Further fields</span>
                </Head>
              </tr>
            </thead>
            <tbody>
              {fields.map(({ rowId, key }, at) => (
                <ResultRow
                  key={rowId}
                  at={at}
                  pastedName={names.get(key)}
                  lineKey={key}
                  isOpen={open === key}
                  onOpen={onOpen}
                  onRemove={remove}
                />
              ))}
            </tbody>
          </Table>
        ) : (
          <EmptyState>
            Each weight of the certificate gets a line here. Add a weight or a whole set, or paste the table
            of results from a spreadsheet.
          </EmptyState>
        )}
        {!isLocked && (
          <div data-field="lines">
            <StandardBox label="Add a weight or a set" hasSets onChosen={add} className="max-w-120" />
          </div>
        )}
      </div>
      {pasted !== null && (
        <PasteDialog
          text={pasted}
          onPut={(found) => setNames(new Map([...names, ...found]))}
          onClose={() => setPasted(null)}
        />
      )}
    </Section>
  );
});

/** Enter and the arrow keys go to the same field of the next or the last line, as in a spreadsheet. */
function moveInColumn(event: KeyboardEvent<HTMLElement>): void {
  const step = { Enter: 1, ArrowDown: 1, ArrowUp: -1 }[event.key];
  if (step === undefined || event.defaultPrevented || !(event.target instanceof HTMLInputElement)) return;
  if (event.target.type !== 'text' || event.target.getAttribute('role') === 'combobox') return;
  const path = event.target.closest<HTMLElement>('[data-field]')?.dataset['field'];
  const match = /^lines\.(\d+)\.(value|expandedU|k)$/.exec(path ?? '');
  if (!match) return;
  event.preventDefault();
  const next = `lines.${Number(match[1]) + step}.${match[2]}`;
  if (document.querySelector(`[data-field="${next}"]`)) focusField(next);
}
