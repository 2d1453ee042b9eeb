import type { DeskResponse } from '#shared/contracts/desk.ts';
import { paths } from '#src/app/paths.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';

const DAY_MS = 86_400_000;

/** Weights whose next calibration is near or past. */
export function DueTable({ rows, day }: { rows: DeskResponse['due']; day: string }) {
  return (
    <Table caption="Due for calibration">
      <thead>
        <tr>
          <Head>Number</Head>
          <Head>Marking</Head>
          <Head>Holder</Head>
          <Head>Last calibrated</Head>
          <Head>Due</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={row.standardId}>
            <Cell isHeading isMono>
              <RowLink to={paths.standard.href(row.standardId)}>{row.registryNo}</RowLink>
            </Cell>
            <Cell>{row.marking}</Cell>
            <Cell>{row.holder.name}</Cell>
            <Cell>{row.lastCalibrated ? <DateText value={row.lastCalibrated} /> : 'never'}</Cell>
            <Cell>
              <DueMark dueOn={row.dueOn} day={day} />
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function DueMark({ dueOn, day }: { dueOn: string; day: string }) {
  const days = Math.round((Date.parse(dueOn) - Date.parse(day)) / DAY_MS);
  const distance = days === 0 ? 'today' : days > 0 ? `in ${dayCount(days)}` : `${dayCount(-days)} ago`;
  return (
    <StateMark state={days < 0 ? 'broken' : 'caution'}>
      <DateText value={dueOn} />, {distance}
    </StateMark>
  );
}

function dayCount(days: number): string {
  return days === 1 ? '1 day' : `${days} days`;
}
