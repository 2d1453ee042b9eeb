import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Cell, Row, RowButton } from '#src/components/ui/table.tsx';
import { nominalText } from '#shared/numbers/nominal.ts';
import { usePreferences } from '#src/lib/preferences.ts';

/** The rows of the group that is open, as far as they have come. */
export interface OpenedGroup<FetchedRow> {
  rows: readonly FetchedRow[];
  isWaiting: boolean;
  /** Asks for the next rows; left out when all are here. */
  onMore?: (() => void) | undefined;
  isFetchingMore: boolean;
  error: Error | null;
}

interface GroupNameCellProps {
  name: string;
  isOpen: boolean;
  onToggle: () => void;
  colSpan: number;
}

/** The first cell of a group: opens and closes it in place. */
export function GroupNameCell({ name, isOpen, onToggle, colSpan }: GroupNameCellProps) {
  return (
    <Cell isHeading colSpan={colSpan}>
      <RowButton aria-expanded={isOpen} onClick={onToggle} className="inline-flex items-baseline">
        <span aria-hidden="true" className="w-4 shrink-0 font-mono text-ink-3">
          {isOpen ? '−' : '+'}
        </span>
        {name}
      </RowButton>
    </Cell>
  );
}

/** Heads the columns of the rows below, once a group is open. */
export function InnerHead({
  heads,
}: {
  heads: readonly { name: string; align?: 'left' | 'right'; colSpan?: number }[];
}) {
  return (
    <Row>
      {heads.map(({ name, align = 'left', colSpan }, at) => (
        <Cell
          key={name}
          align={align}
          colSpan={colSpan}
          className={`text-sm text-ink-3 ${at === 0 ? 'pl-4' : ''}`}
        >
          {name}
        </Cell>
      ))}
    </Row>
  );
}

/** A nominal with its class, as one says it: "1 kg, E2". */
export function NominalText({ row }: { row: { nominal: string; class: string | null } }) {
  const { decimalMark } = usePreferences();
  return (
    <span className="whitespace-nowrap">
      {nominalText(row.nominal, decimalMark)}
      {row.class && <span className="text-ink-2">, {row.class}</span>}
    </span>
  );
}

interface OpenedFootProps {
  opened: OpenedGroup<unknown>;
  count: number;
  colSpan: number;
  onSave: () => void;
}

/** Below an open group: how much of it is here, and the way to the rest. */
export function OpenedFoot({ opened, count, colSpan, onSave }: OpenedFootProps) {
  const shown = opened.rows.length;
  return (
    <tr>
      <Cell colSpan={colSpan} className="pl-4">
        {opened.isWaiting && <Waiting>Reading the rows</Waiting>}
        {opened.error && <ErrorNotice error={opened.error} onRetry={opened.onMore} />}
        {shown > 0 && (
          <span className="flex flex-wrap items-baseline gap-x-4 text-sm text-ink-2">
            <span>{shown === count ? `All ${count} shown` : `${shown} of ${count} shown`}</span>
            {opened.onMore && (
              <Button weight="text" isBusy={opened.isFetchingMore} onClick={opened.onMore}>
                Show more
              </Button>
            )}
            <Button weight="text" onClick={onSave}>
              Save the rows shown as CSV
            </Button>
          </span>
        )}
      </Cell>
    </tr>
  );
}
