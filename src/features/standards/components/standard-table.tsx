import type { StandardRow } from '#shared/contracts/standards.ts';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { ValueCells } from '#src/components/ui/value-cells.tsx';
import { dateAsKnown } from '../history/days.ts';
import { nextSort, sortOf, type ListSearch, type Sortable } from '../list-search.ts';
import { KIND_WORDS } from '../words.ts';
import { DueMark } from './due-mark.tsx';
import { Nominal } from './nominal.tsx';

interface StandardTableProps {
  rows: readonly StandardRow[];
  search: ListSearch;
  onSort: (sort: ListSearch['sort']) => void;
  /** Address that opens a row beside the list. */
  hrefOf: (standardId: string) => string;
}

/** The dense list: one line per standard, its value in force, and when the next calibration is due. */
export function StandardTable({ rows, search, onSort, hrefOf }: StandardTableProps) {
  const head = (column: Sortable) => ({
    sort: sortOf(search.sort, column),
    onSort: () => onSort(nextSort(search.sort, column)),
  });
  return (
    <Table caption="Standards">
      <thead>
        <tr>
          <Head {...head('registryNo')}>Number</Head>
          <Head align="right" {...head('nominal')}>
            Nominal
          </Head>
          <Head>Marking</Head>
          <Head>Class</Head>
          <Head>Holder</Head>
          <Head>Set</Head>
          <Head align="right">Deviation</Head>
          <Head align="right">U</Head>
          <Head>Quantity</Head>
          <Head {...head('calibrated')}>Calibrated</Head>
          <Head>Due</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={row.id} isSelected={row.id === search.open}>
            <Cell isHeading isMono>
              <RowLink to={hrefOf(row.id)} replace preventScrollReset>
                {row.registryNo}
              </RowLink>
            </Cell>
            <Cell align="right">
              <Nominal grams={row.nominal} />
            </Cell>
            <Cell className="whitespace-nowrap">{row.marking}</Cell>
            <Cell className="whitespace-nowrap">
              {row.class ?? (row.kind === 'weight' ? '' : KIND_WORDS[row.kind])}
            </Cell>
            <Cell className="max-w-56 truncate">
              <span className="max-[76rem]:hidden">{row.holder.name}</span>
              <span className="font-mono text-sm min-[76rem]:hidden" title={row.holder.name}>
                {row.holder.code}
              </span>
            </Cell>
            <Cell isMono>{row.set?.registryNo}</Cell>
            <CurrentValueCells value={row.value} />
            <Cell>{row.dueOn && <DueMark dueOn={row.dueOn} isShort />}</Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function CurrentValueCells({ value }: { value: StandardRow['value'] }) {
  if (!value) {
    return (
      <Cell colSpan={4} className="pl-6 text-ink-3">
        no value in force
      </Cell>
    );
  }
  return (
    <>
      <ValueCells {...value} />
      <Cell className="text-ink-2">{value.quantity === 'mass' ? 'mass' : 'conventional'}</Cell>
      <Cell className="whitespace-nowrap">{dateAsKnown(value)}</Cell>
    </>
  );
}
