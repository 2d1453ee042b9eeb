import type { NoticeResponse, NoticeOwnRow, NoticeRow } from '#shared/contracts/notices.ts';
import { Decimal } from '#shared/decimal.ts';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { paths } from '#src/app/paths.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { ShiftText, WhatToDo, WordMark } from './notice-words.tsx';

interface OwnValuesProps {
  total: NoticeResponse['total'];
  rows: readonly NoticeRow[];
  /** Asks for the next rows; left out when all are here. */
  onMore?: (() => void) | undefined;
  isFetchingMore: boolean;
}

/** What a notice brings to the values that one may see: one's own before and after, others by one word. */
export function OwnValues({ total, rows, onMore, isFetchingMore }: OwnValuesProps) {
  const own = rows.filter((row) => row.view === 'full');
  const warned = rows.filter((row) => row.view === 'warning');
  if (total.count === 0) {
    return (
      <Section title="Your values">
        <EmptyState>
          This notice reaches no value in force that you may see: nothing is to be done here.
        </EmptyState>
      </Section>
    );
  }
  return (
    <>
      {own.length > 0 && (
        <Section title="Values that you see in full, before and after" note={countsText(total)}>
          <OwnTable rows={own} />
        </Section>
      )}
      {warned.length > 0 && (
        <Section title="Weights of others that lean on yours" note={`${total.warned} in all`}>
          <WarningTable rows={warned} />
        </Section>
      )}
      {onMore && (
        <p>
          <Button weight="text" isBusy={isFetchingMore} onClick={onMore}>
            {`Show more (${rows.length} of ${total.count} shown)`}
          </Button>
        </p>
      )}
    </>
  );
}

function countsText({ fullWords: words }: NoticeResponse['total']): string {
  const parts = [
    words.verdictChanges > 0 ? `${words.verdictChanges} change a verdict` : '',
    words.material > 0 ? `${words.material} material` : '',
    words.none > 0 ? `${words.none} need no action` : '',
  ];
  return parts.filter(Boolean).join(', ');
}

function OwnTable({ rows }: { rows: readonly NoticeOwnRow[] }) {
  const { decimalMark } = usePreferences();
  return (
    <Table caption="Values that you see in full, before and after" isScrolled>
      <thead>
        <tr>
          <Head>Weight</Head>
          <Head>What to do</Head>
          <Head align="right">Before</Head>
          <Head align="right">U before</Head>
          <Head align="right">Shift</Head>
          <Head align="right">After</Head>
          <Head align="right">U after</Head>
          <Head align="right">Shifts/U</Head>
          <Head>Certificate</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={row.uid}>
            <Cell isHeading>
              <RowLink to={paths.chain.href(row.uid)}>
                <span className="font-mono text-sm whitespace-nowrap">{row.registryNo}</span>
              </RowLink>
              <span className="block whitespace-nowrap text-sm text-ink-2">
                {nominalText(row.nominal, decimalMark)}
                {row.class && `, ${row.class}`}
              </span>
            </Cell>
            <Cell className="min-w-56">
              <WhatToDo row={row} />
            </Cell>
            <Cell align="right">
              <Deviation value={row.deviationBefore} u={row.expandedUBefore} k={row.k} />
            </Cell>
            <Cell align="right">
              <Expanded value={row.expandedUBefore} k={row.k} />
            </Cell>
            <Cell align="right">
              <ShiftText grams={Number(row.shift)} />
            </Cell>
            <Cell align="right">
              <Deviation value={row.deviationAfter} u={row.expandedUAfter} k={row.k} />
            </Cell>
            <Cell align="right">
              <Expanded value={row.expandedUAfter} k={row.k} />
            </Cell>
            <Cell align="right">{row.ratio === null ? '' : ratioText(row.ratio, decimalMark)}</Cell>
            <Cell className="whitespace-nowrap">
              <span className="font-mono text-sm">{row.certificateNo}</span>
              <span className="block text-sm text-ink-2">{`${row.quantity}, ${row.performedEnd}`}</span>
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function WarningTable({ rows }: { rows: readonly Extract<NoticeRow, { view: 'warning' }>[] }) {
  const { decimalMark } = usePreferences();
  return (
    <Table caption="Weights of others that lean on yours" isScrolled>
      <thead>
        <tr>
          <Head>Weight</Head>
          <Head>Laboratory</Head>
          <Head>Nominal</Head>
          <Head align="right">Shift</Head>
          <Head>For its holder</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={`${row.laboratory.id} ${row.registryNo}`}>
            <Cell isHeading isMono>
              {row.registryNo}
            </Cell>
            <Cell>{row.laboratory.name}</Cell>
            <Cell className="whitespace-nowrap">
              {nominalText(row.nominal, decimalMark)}
              {row.class && `, ${row.class}`}
            </Cell>
            <Cell align="right">
              <ShiftText grams={Number(row.shift)} />
            </Cell>
            <Cell className="whitespace-nowrap">
              <WordMark word={row.word} />
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function Deviation({ value, u, k }: { value: string; u: number | null; k: string | null }) {
  return (
    <Quantity
      value={value}
      kind="deviation"
      shownIn="auto"
      expandedUncertainty={u === null ? null : plain(u)}
      coverageFactor={k ?? 2}
      hidesUncertainty
    />
  );
}

function Expanded({ value, k }: { value: number | null; k: string | null }) {
  if (value === null) return <span className="text-ink-3">not stated</span>;
  return <Quantity value={plain(value)} kind="uncertainty" coverageFactor={k ?? 2} shownIn="auto" />;
}

function ratioText(ratio: number, decimalMark: '.' | ','): string {
  if (ratio !== 0 && Math.abs(ratio) < 0.005) return `below\u20090${decimalMark}01`;
  return formatDecimal(ratio.toFixed(2), { decimalMark, decimals: 2, isSigned: ratio !== 0 });
}

function plain(grams: number): string {
  return new Decimal(grams).toSignificantDigits(12).toFixed();
}
