import type { CalibrationListResponse } from '#shared/contracts/calibrations.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { stateOfValue } from '#shared/states.ts';
import { changeListSearch, writeListSearch, type ListSearch } from '../list-search.ts';
import { PerformedText } from './performed-text.tsx';

interface CalibrationTableProps {
  rows: CalibrationListResponse['calibrations'];
  search: ListSearch;
  onSearch: (change: Partial<ListSearch>) => void;
}

/** Issued calibrations; a row opens its short facts beside the list. */
export function CalibrationTable({ rows, search, onSearch }: CalibrationTableProps) {
  const sortable = (field: 'certificateNo' | 'issuedOn') => ({
    sort: sortOf(search.sort, field),
    onSort: () => onSearch({ sort: search.sort === `-${field}` ? field : `-${field}` }),
  });
  return (
    <Table caption="Issued calibrations">
      <thead>
        <tr>
          <Head {...sortable('certificateNo')}>Certificate</Head>
          <Head>Issued by</Head>
          <Head {...sortable('issuedOn')}>Issued</Head>
          <Head>Performed</Head>
          <Head align="right">Weights</Head>
          <Head>First weight</Head>
          <Head>Stands</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={row.revisionId} isSelected={row.revisionId === search.open}>
            <Cell isHeading isMono>
              <RowLink
                preventScrollReset
                to={{ search: String(writeListSearch(changeListSearch(search, { open: row.revisionId }))) }}
              >
                {row.certificateNo}
              </RowLink>
              {row.revisionN > 1 && <span className="ml-2 text-ink-2">revision {row.revisionN}</span>}
            </Cell>
            <Cell>{row.issuer.name}</Cell>
            <Cell>
              <DateText value={row.issuedOn} />
            </Cell>
            <Cell>
              <PerformedText {...row} />
            </Cell>
            <Cell align="right">{row.weights}</Cell>
            <Cell isMono>{row.firstRegistryNo}</Cell>
            <Cell className="whitespace-nowrap">
              <StateMark state={stateOfValue(row.state)}>{row.state}</StateMark>
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function sortOf(sort: ListSearch['sort'], field: string): 'ascending' | 'descending' | 'none' {
  if (sort === field) return 'ascending';
  return sort === `-${field}` ? 'descending' : 'none';
}
