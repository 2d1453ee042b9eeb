import { Fragment } from 'react';
import type { WhatIfGroup, WhatIfRow, WhatIfSort, DownstreamBy } from '#shared/contracts/downstream.ts';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { GROUPED_BY, groupName, inOrder } from '../groups.ts';
import { whatIfCsv } from '../rows-csv.ts';
import { saveText } from '../save-text.ts';
import { GroupNameCell, InnerHead, OpenedFoot, type OpenedGroup } from './group-rows.tsx';
import { WeightCells } from './weight-cells.tsx';
import type { WhatIfColumn } from './what-if-columns.tsx';
import { ClassVerdicts, WhatIfWordMark } from './what-if-word.tsx';

interface WhatIfTableProps {
  groups: readonly WhatIfGroup[];
  /** What is told between a weight and its word. */
  columns: readonly WhatIfColumn[];
  by: DownstreamBy;
  sort: WhatIfSort;
  /** Key of the group that is open. */
  open: string | undefined;
  opened: OpenedGroup<WhatIfRow>;
  onOpen: (key: string | undefined) => void;
  onSort: (sort: WhatIfSort) => void;
}

/** What a change would do, group by group and, in the group that is open, row by row; the worst first. */
export function WhatIfTable(props: WhatIfTableProps) {
  const { groups, columns, by, sort, open, opened, onOpen, onSort } = props;
  const { decimalMark } = usePreferences();
  const colSpan = columns.length + 5;
  return (
    <Table caption="What it would do">
      <thead>
        <GroupHeads {...{ columns, by, sort, onSort }} />
      </thead>
      <tbody>
        {inOrder(groups, sort).map((group) => {
          const isOpen = group.key === open;
          return (
            <Fragment key={group.key}>
              <Row>
                <GroupNameCell
                  name={groupName(group, by, decimalMark)}
                  isOpen={isOpen}
                  onToggle={() => onOpen(isOpen ? undefined : group.key)}
                  colSpan={2}
                />
                <Cell align="right">{group.words.verdictChanges}</Cell>
                <Cell align="right">{group.words.material}</Cell>
                {columns.map((column) => (
                  <Cell key={column.name} align="right">
                    {column.ofGroup(group)}
                  </Cell>
                ))}
                <Cell align="right">{group.count}</Cell>
              </Row>
              {isOpen && (
                <>
                  {opened.rows.length > 0 && <InnerHead heads={innerHeads(columns)} />}
                  {opened.rows.map((row) => (
                    <RowOfGroup
                      key={row.view === 'full' ? row.uid : row.registryNo}
                      {...{ row, columns, by }}
                    />
                  ))}
                  <OpenedFoot
                    opened={opened}
                    count={group.count}
                    colSpan={colSpan}
                    onSave={() => saveText('what-it-would-do.csv', whatIfCsv(opened.rows))}
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

function GroupHeads({
  columns,
  by,
  sort,
  onSort,
}: Pick<WhatIfTableProps, 'columns' | 'by' | 'sort' | 'onSort'>) {
  const sorted = (own: WhatIfSort | undefined) =>
    own && { sort: sort === own ? ('descending' as const) : ('none' as const), onSort: () => onSort(own) };
  return (
    <tr>
      <Head colSpan={2}>{GROUPED_BY[by]}</Head>
      <Head align="right" {...sorted('word')}>
        Verdict changes
      </Head>
      <Head align="right">Material</Head>
      {columns.map((column) => (
        <Head key={column.name} align="right" {...sorted(column.sort)}>
          {column.groupName ?? column.name}
        </Head>
      ))}
      <Head align="right">In all</Head>
    </tr>
  );
}

function innerHeads(columns: readonly WhatIfColumn[]) {
  return [
    { name: 'Weight' },
    { name: 'Nominal' },
    { name: 'Comes to', align: 'right', colSpan: 2 },
    ...columns.map(({ name }) => ({ name, align: 'right' }) as const),
    { name: 'Class', align: 'right' },
  ] as const;
}

function RowOfGroup({ row, columns, by }: { row: WhatIfRow } & Pick<WhatIfTableProps, 'columns' | 'by'>) {
  return (
    <Row>
      <WeightCells row={row} by={by} />
      <Cell colSpan={2} align="right">
        <WhatIfWordMark word={row.word} />
      </Cell>
      {columns.map((column) => (
        <Cell key={column.name} align="right">
          {column.ofRow(row)}
        </Cell>
      ))}
      <Cell align="right">{row.view === 'full' && <ClassVerdicts row={row} />}</Cell>
    </Row>
  );
}
