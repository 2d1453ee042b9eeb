import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { groupDigits } from '#shared/numbers/format-decimal.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { unitSymbol } from '#shared/numbers/quantity-text.ts';
import { turned, type UnderstoodRow } from './paste-lines.ts';
import type { Column, PastedNumber } from './read-paste.ts';

const COLUMNS: readonly Column[] = ['weight', 'value', 'U', 'k', 'nothing'];

interface PastedPreviewProps {
  columns: readonly Column[];
  cells: readonly string[][];
  rows: readonly UnderstoodRow[];
  turnsSign: boolean;
  onColumn: (at: number, column: Column) => void;
}

/** The pasted cells under what each column was taken for, and beside them what will be put in. */
export function PastedPreview({ columns, cells, rows, turnsSign, onColumn }: PastedPreviewProps) {
  return (
    <Table caption="What was understood" isScrolled>
      <thead>
        <tr>
          <Head>Put in as</Head>
          {columns.map((column, at) => (
            <Head key={at}>
              <select
                aria-label={`Column ${at + 1} holds`}
                value={column}
                onChange={(event) => onColumn(at, event.target.value as Column)}
                className="bg-transparent"
              >
                {COLUMNS.map((one) => (
                  <option key={one} value={one}>
                    {one}
                  </option>
                ))}
              </select>
            </Head>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((understood, at) => (
          <Row key={at}>
            <Cell isHeading className="align-top">
              <Understood {...understood} turnsSign={turnsSign} />
            </Cell>
            {columns.map((_, column) => (
              <Cell key={column} isMono className="align-top text-ink-2">
                {cells[at]?.[column]}
              </Cell>
            ))}
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function Understood({ row, standard, isWhole, turnsSign }: UnderstoodRow & { turnsSign: boolean }) {
  const { decimalMark } = usePreferences();
  const shown = (number: PastedNumber, isTurned = false): string | null => {
    if (!number || 'problem' in number) return null;
    const text = isTurned ? turned(number.text) : number.text;
    return `${groupDigits(text, decimalMark)}\u2009${unitSymbol(number.unit)}`;
  };
  const problems = [row.value, row.expandedU].flatMap((one) =>
    one && 'problem' in one ? [one.problem] : [],
  );
  const value = shown(row.value, turnsSign && !isWhole);
  const U = shown(row.expandedU);
  return (
    <span className="flex flex-col">
      {standard ? (
        <span className="whitespace-nowrap">
          {standard.marking} <span className="font-mono text-xs text-ink-2">{standard.registryNo}</span>
        </span>
      ) : (
        <StateMark state="caution">a line without a weight</StateMark>
      )}
      <span className="font-mono text-sm whitespace-nowrap">
        {value ?? 'no value'}
        {isWhole && ' (whole value)'}, {U ? `U ${U}` : 'no U'}
        {row.k && `, k ${row.k}`}
      </span>
      {problems.map((problem) => (
        <span key={problem} className="max-w-60 text-sm text-broken">
          {problem}
        </span>
      ))}
    </span>
  );
}
