import type { DeskResponse } from '#shared/contracts/desk.ts';
import { paths } from '#src/app/paths.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';

/** Values of ours that lean on something which was superseded or withdrawn since; each opens its chain. */
export function UpstreamTable({ rows }: { rows: DeskResponse['upstream'] }) {
  return (
    <Table caption="Changed above you">
      <thead>
        <tr>
          <Head>Number</Head>
          <Head>Quantity</Head>
          <Head>Certificate</Head>
          <Head>Leans on</Head>
          <Head>Which was</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={`${row.valueUid} ${row.referenceRegistryNo} ${row.referenceCertificateNo}`}>
            <Cell isHeading isMono>
              <RowLink to={paths.chain.href(row.valueUid)}>{row.registryNo}</RowLink>
            </Cell>
            <Cell className="whitespace-nowrap">{row.quantity}</Cell>
            <Cell isMono>{row.certificateNo}</Cell>
            <Cell>
              <span className="font-mono text-sm whitespace-nowrap">{row.referenceRegistryNo}</span>
              <span className="block text-sm whitespace-nowrap text-ink-2">{row.referenceCertificateNo}</span>
            </Cell>
            <Cell>
              <StateMark state={row.what === 'withdrawn' ? 'broken' : 'caution'}>
                {row.what} <DateText value={row.on} />
              </StateMark>
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}
