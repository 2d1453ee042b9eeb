import type { NoticeSummary, ScaleVersion } from '#shared/contracts/notices.ts';
import { paths } from '#src/app/paths.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { Word } from '#src/components/ui/word.tsx';
import { AddedUText, NoticeStateMark, ScalesText, ShiftText } from './notice-words.tsx';

interface ScaleHistoryProps {
  scaleVersions: readonly ScaleVersion[];
  notices: readonly NoticeSummary[];
}

type Entry = { day: string; scale: ScaleVersion } | { day: string; notice: NoticeSummary };

/** Scale versions and notices in the order of their days, the first on top: how the mass scale came to what it is. */
export function ScaleHistory({ scaleVersions, notices }: ScaleHistoryProps) {
  const entries: Entry[] = [
    ...scaleVersions.map((scale) => ({ day: scale.validFrom, scale })),
    ...notices.map((notice) => ({ day: notice.effectiveOn, notice })),
  ].sort((a, b) => (a.day < b.day ? -1 : a.day > b.day ? 1 : 0));
  return (
    <Table caption="Scale versions and notices" isScrolled>
      <thead>
        <tr>
          <Head>What</Head>
          <Head>From</Head>
          <Head>Kind</Head>
          <Head align="right">Shift at 1 kg</Head>
          <Head align="right">Added u at 1 kg</Head>
          <Head>Scale version</Head>
          <Head>Stands</Head>
        </tr>
      </thead>
      <tbody>
        {entries.map((entry) =>
          'scale' in entry ? (
            <ScaleRow key={entry.scale.id} scale={entry.scale} />
          ) : (
            <NoticeRow key={entry.notice.id} notice={entry.notice} />
          ),
        )}
      </tbody>
    </Table>
  );
}

function ScaleRow({ scale }: { scale: ScaleVersion }) {
  return (
    <Row>
      <Cell isHeading>{scale.name}</Cell>
      <Cell className="whitespace-nowrap">
        <DateText value={scale.validFrom} />
      </Cell>
      <Cell className="whitespace-nowrap">scale version</Cell>
      <Cell colSpan={3} className="text-ink-2">
        {scale.basis}
      </Cell>
      <Cell className="whitespace-nowrap text-ink-2">{valuesText(scale.values)}</Cell>
    </Row>
  );
}

function NoticeRow({ notice }: { notice: NoticeSummary }) {
  return (
    <Row>
      <Cell isHeading>
        <RowLink to={paths.notice.href(notice.id)}>
          <span className="font-mono text-sm">{notice.number}</span> {notice.title}
        </RowLink>
      </Cell>
      <Cell className="whitespace-nowrap">
        <DateText value={notice.effectiveOn} />
        {notice.isBackDated && (
          <>
            {' '}
            <Word>back-dated</Word>
          </>
        )}
      </Cell>
      <Cell className="whitespace-nowrap">{notice.kind}</Cell>
      <Cell align="right">
        <ShiftText grams={notice.largestShift} />
      </Cell>
      <Cell align="right">
        <AddedUText grams={notice.largestAddedU} />
      </Cell>
      <Cell>
        <ScalesText notice={notice} />
      </Cell>
      <Cell className="whitespace-nowrap">
        <NoticeStateMark state={notice.state} />
      </Cell>
    </Row>
  );
}

function valuesText(values: number): string {
  if (values === 0) return 'no values';
  return values === 1 ? '1 value' : `${values} values`;
}
