import { Fragment } from 'react';
import type { DownstreamBy, DownstreamGroup, DownstreamRow } from '#shared/contracts/downstream.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { ValueCells } from '#src/components/ui/value-cells.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { GROUPED_BY, groupName } from '../groups.ts';
import { leaningCsv } from '../rows-csv.ts';
import { saveText } from '../save-text.ts';
import { GroupNameCell, InnerHead, OpenedFoot, type OpenedGroup } from './group-rows.tsx';
import { WeightCells } from './weight-cells.tsx';

interface LeaningTableProps {
  groups: readonly DownstreamGroup[];
  by: DownstreamBy;
  /** Key of the group that is open. */
  open: string | undefined;
  opened: OpenedGroup<DownstreamRow>;
  onOpen: (key: string | undefined) => void;
}

const INNER = [
  { name: 'Weight' },
  { name: 'Nominal' },
  { name: 'Deviation', align: 'right' },
  { name: 'U', align: 'right' },
  { name: 'Calibrated', align: 'right' },
] as const;

/** Who leans on a value: groups with their counts, one of them opened in place. */
export function LeaningTable({ groups, by, open, opened, onOpen }: LeaningTableProps) {
  const { decimalMark } = usePreferences();
  return (
    <Table caption="Who leans on it">
      <thead>
        <tr>
          <Head colSpan={3}>{GROUPED_BY[by]}</Head>
          <Head align="right">In all</Head>
          <Head align="right">Of others</Head>
        </tr>
      </thead>
      <tbody>
        {groups.map((group) => {
          const isOpen = group.key === open;
          return (
            <Fragment key={group.key}>
              <Row>
                <GroupNameCell
                  name={groupName(group, by, decimalMark)}
                  isOpen={isOpen}
                  onToggle={() => onOpen(isOpen ? undefined : group.key)}
                  colSpan={3}
                />
                <Cell align="right">{group.count}</Cell>
                <Cell align="right">{group.warned}</Cell>
              </Row>
              {isOpen && (
                <>
                  {opened.rows.length > 0 && <InnerHead heads={INNER} />}
                  {opened.rows.map((row) => (
                    <LeaningRow key={row.view === 'full' ? row.uid : row.registryNo} row={row} by={by} />
                  ))}
                  <OpenedFoot
                    opened={opened}
                    count={group.count}
                    colSpan={5}
                    onSave={() => saveText('who-leans-on-it.csv', leaningCsv(opened.rows))}
                  />
                </>
              )}
            </Fragment>
          );
        })}
      </tbody>
    </Table>
  );
}

function LeaningRow({ row, by }: { row: DownstreamRow; by: DownstreamBy }) {
  return (
    <Row>
      <WeightCells row={row} by={by} />
      {row.view === 'full' ? (
        <>
          <ValueCells deviation={row.deviation} expandedU={row.expandedU} k={row.k} />
          <Cell align="right">
            <DateText value={row.performedEnd.slice(0, DAY_LENGTH[row.datePrecision])} />
          </Cell>
        </>
      ) : (
        <Cell colSpan={3} align="right" className="text-ink-3">
          told to its holder
        </Cell>
      )}
    </Row>
  );
}

const DAY_LENGTH = { day: 10, month: 7, year: 4 };
