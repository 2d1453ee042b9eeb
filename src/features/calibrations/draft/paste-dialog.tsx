import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { Textarea } from '#src/components/ui/text-field.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { findStandards } from '../api.ts';
import { useDraft } from './draft-context.ts';
import type { DraftValues } from './draft-values.ts';
import { knownFromRow, useKnown } from './known.ts';
import { PastedPreview } from './pasted-preview.tsx';
import { putRows, understandRows } from './paste-lines.ts';
import { readPastedRows, readPastedTable, type Column } from './read-paste.ts';

const WEIGHTS_LOOKED_AT = 200;
const LONGEST_DRAFT = 200;

interface PasteDialogProps {
  text: string;
  /** Gets the pasted names of lines that found no weight, by key of the line. */
  onPut: (names: ReadonlyMap<string, string>) => void;
  onClose: () => void;
}

/** A table from a spreadsheet: what was understood is shown before anything is put in. */
export function PasteDialog({ text: pasted, onPut, onClose }: PasteDialogProps) {
  const { control, getValues, setValue } = useFormContext<DraftValues>();
  const { laboratoryId } = useDraft();
  const { decimalMark } = usePreferences();
  const known = useKnown();
  const lines = useWatch({ control, name: 'lines' });
  const [text, setText] = useState(pasted);
  const [columns, setColumns] = useState<Column[] | null>(null);
  const [set, setSet] = useState('');
  const [turnsSign, setTurnsSign] = useState<boolean | null>(null);
  const others = useQuery({
    queryKey: ['standards', 'to match', laboratoryId],
    queryFn: ({ signal }) => findStandards(laboratoryId, '', WEIGHTS_LOOKED_AT, signal),
  });

  const read = useMemo(() => readPastedTable(text), [text]);
  const table = { ...read, columns: columns ?? read.columns };
  const { unit, uUnit } = lines[0] ?? { unit: 'mg' as const, uUnit: 'mg' as const };
  const sets = new Map(
    (others.data ?? []).flatMap(({ set: one }) => (one ? [[one.id, one.registryNo] as const] : [])),
  );
  const candidates = (others.data ?? []).filter((row) => set === '' || row.set?.id === set);
  const inResults = lines.flatMap(({ standardId }) => known.standards.get(standardId ?? '') ?? []);
  const rows = understandRows(
    readPastedRows(table, { unit, uUnit, decimalMark }),
    inResults,
    candidates.map(knownFromRow),
  );
  const asksSign = read.isCorrection && turnsSign === null;
  const result = putRows(lines, rows, turnsSign ?? false);
  const isTooLong = result.length > LONGEST_DRAFT;

  function put(): void {
    known.learnStandards(others.data ?? []);
    const names = new Map<string, string>();
    setValue('lines', putRows(getValues('lines'), rows, turnsSign ?? false, names), { shouldDirty: true });
    onPut(names);
    onClose();
  }

  return (
    <Dialog
      title="Paste from a spreadsheet"
      onClose={onClose}
      actions={
        <>
          <Button weight="primary" disabled={rows.length === 0 || asksSign || isTooLong} onClick={put}>
            {rows.length === 1 ? 'Put 1 row in' : `Put ${rows.length} rows in`}
          </Button>
          <Button onClick={onClose}>Put nothing in</Button>
        </>
      }
    >
      <Textarea
        label="Rows, with or without a head"
        hint="Columns: marking, number or nominal of the weight; value; U; k"
        rows={3}
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          setColumns(null);
          setTurnsSign(null);
        }}
      />
      {sets.size > 0 && (
        <SelectField
          label="Weights of"
          placeholder="the results, then any set"
          className="max-w-64"
          choices={[...sets].map(([value, registryNo]) => ({ value, label: `set ${registryNo}` }))}
          value={set}
          onChange={(event) => setSet(event.target.value)}
        />
      )}
      {read.isCorrection && (
        <Notice
          tone="caution"
          title="Corrections or deviations?"
          answers={
            <>
              <Button weight="text" aria-pressed={turnsSign === true} onClick={() => setTurnsSign(true)}>
                Corrections: turn the signs
              </Button>
              <Button weight="text" aria-pressed={turnsSign === false} onClick={() => setTurnsSign(false)}>
                Deviations: keep the signs
              </Button>
            </>
          }
        >
          The head speaks of a correction. The register keeps value minus nominal, which has the opposite
          sign.
          {turnsSign !== null && (turnsSign ? ' The signs are turned.' : ' The signs are kept.')}
        </Notice>
      )}
      {isTooLong && (
        <Notice tone="broken" title="Too many lines">
          A draft takes {LONGEST_DRAFT} lines; with these it would have {result.length}.
        </Notice>
      )}
      {rows.length > 0 && (
        <PastedPreview
          columns={table.columns}
          cells={table.rows}
          rows={rows}
          turnsSign={turnsSign ?? false}
          onColumn={(at, column) =>
            setColumns(
              table.columns.map((one, index) => (index === at ? column : one === column ? 'nothing' : one)),
            )
          }
        />
      )}
    </Dialog>
  );
}
