import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
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

/** A table from a spreadsheet: what was understood is shown before anything is put in. */
export function PasteDialog({ text: pasted, onClose }: { text: string; onClose: () => void }) {
  const { control, getValues, setValue } = useFormContext<DraftValues>();
  const { laboratoryId } = useDraft();
  const { decimalMark } = usePreferences();
  const known = useKnown();
  const lines = useWatch({ control, name: 'lines' });
  const [text, setText] = useState(pasted);
  const [columns, setColumns] = useState<Column[] | null>(null);
  const [turnsSign, setTurnsSign] = useState<boolean | null>(null);
  const others = useQuery({
    queryKey: ['standards', 'to match', laboratoryId],
    queryFn: ({ signal }) => findStandards(laboratoryId, '', WEIGHTS_LOOKED_AT, signal),
  });

  const read = useMemo(() => readPastedTable(text), [text]);
  const table = { ...read, columns: columns ?? read.columns };
  const { unit, uUnit } = lines[0] ?? { unit: 'mg' as const, uUnit: 'mg' as const };
  const inResults = lines.flatMap(({ standardId }) => known.standards.get(standardId ?? '') ?? []);
  const rows = understandRows(
    readPastedRows(table, { unit, uUnit, decimalMark }),
    inResults,
    (others.data ?? []).map(knownFromRow),
  );
  const asksSign = read.isCorrection && turnsSign === null;
  const result = putRows(lines, rows, turnsSign ?? false);
  const isTooLong = result.length > LONGEST_DRAFT;

  function put(): void {
    known.learnStandards(others.data ?? []);
    setValue('lines', putRows(getValues('lines'), rows, turnsSign ?? false), { shouldDirty: true });
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
