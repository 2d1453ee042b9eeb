import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import type { MassUnit } from '#shared/contracts/common.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Checkbox } from '#src/components/ui/checkbox.tsx';
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
import { putRows, understandRows, whyLeftOut, type UnderstoodRow } from './paste-lines.ts';
import { decimalSignOf, readPastedRows, readPastedTable, type Column } from './read-paste.ts';

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
  const [saysComma, setSaysComma] = useState<boolean | null>(null);
  const [turnsSign, setTurnsSign] = useState<boolean | null>(null);
  const others = useQuery({
    queryKey: ['standards', 'to match', laboratoryId],
    queryFn: ({ signal }) => findStandards(laboratoryId, '', WEIGHTS_LOOKED_AT, signal),
  });

  const read = useMemo(() => readPastedTable(text), [text]);
  const table = { ...read, columns: columns ?? read.columns };
  const sign = decimalSignOf(table);
  const isComma = saysComma ?? (sign === ',' || (sign === 'ambiguous' && decimalMark === ','));
  const unit = usualUnit(lines.map((line) => line.unit));
  const uUnit = usualUnit(lines.map((line) => line.uUnit));
  const sets = new Map(
    (others.data ?? []).flatMap(({ set: one }) => (one ? [[one.id, one.registryNo] as const] : [])),
  );
  const candidates = (others.data ?? []).filter((row) => set === '' || row.set?.id === set);
  const inResults = lines.flatMap(({ standardId }) => known.standards.get(standardId ?? '') ?? []);
  const rows = understandRows(
    readPastedRows(table, { unit, uUnit, decimalMark: isComma ? ',' : '.' }),
    inResults,
    candidates.map(knownFromRow),
  );
  const asksSign = read.isCorrection && turnsSign === null;
  const goingIn = rows.filter((row) => whyLeftOut(row) === null);
  const result = putRows(lines, goingIn, turnsSign ?? false);
  const isTooLong = result.length > LONGEST_DRAFT;

  function put(): void {
    known.learnStandards(others.data ?? []);
    const names = new Map<string, string>();
    setValue('lines', putRows(getValues('lines'), goingIn, turnsSign ?? false, names), { shouldDirty: true });
    onPut(names);
    onClose();
  }

  return (
    <Dialog
      title="Paste from a spreadsheet"
      onClose={onClose}
      actions={
        <>
          <Button weight="primary" disabled={goingIn.length === 0 || asksSign || isTooLong} onClick={put}>
            {`Put ${countOfRows(goingIn.length, rows.length)} in`}
          </Button>
          <Button onClick={onClose}>Put nothing in</Button>
          {goingIn.length === 0 && (
            <span className="self-center text-sm text-ink-2">
              {rows.length === 0 ? 'No rows are pasted yet.' : 'No row can be read.'}
            </span>
          )}
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
          setSaysComma(null);
        }}
      />
      {(sign === ',' || sign === 'ambiguous') && (
        <Checkbox
          label="The comma is the decimal sign"
          hint={
            sign === 'ambiguous'
              ? 'Each number has exactly three digits after its comma, so it can be read in two ways.'
              : undefined
          }
          checked={isComma}
          onChange={(event) => setSaysComma(event.target.checked)}
        />
      )}
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
      <LeftOut rows={rows} />
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

/** The unit most lines have; milligrams where there are none. */
function usualUnit(units: readonly MassUnit[]): MassUnit {
  const count = (unit: MassUnit): number => units.filter((one) => one === unit).length;
  return units.toSorted((a, b) => count(b) - count(a))[0] ?? 'mg';
}

/** The rows that stay out, each with the reason. */
function LeftOut({ rows }: { rows: readonly UnderstoodRow[] }) {
  const out = rows.flatMap((row, at) => {
    const why = whyLeftOut(row);
    return why === null ? [] : [{ at, weight: row.row.weight, why }];
  });
  if (out.length === 0) return null;
  return (
    <Notice
      tone="caution"
      role="status"
      title={
        out.length === 1
          ? '1 row cannot be read and stays out'
          : `${out.length} rows cannot be read and stay out`
      }
    >
      <ul className="max-h-32 overflow-auto">
        {out.map(({ at, weight, why }) => (
          <li key={at}>
            Row {at + 1}
            {weight && `, ${weight}`}: {why}
          </li>
        ))}
      </ul>
    </Notice>
  );
}

/** "1 row", "12 rows", or "10 of 12 rows" where some stay out. */
function countOfRows(goingIn: number, all: number): string {
  const rows = all === 1 ? 'row' : 'rows';
  return goingIn === all ? `${all} ${rows}` : `${goingIn} of ${all} ${rows}`;
}
