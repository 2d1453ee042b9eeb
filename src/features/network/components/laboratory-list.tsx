import { Link } from 'react-router';
import type { LaboratoryListResponse } from '#shared/contracts/network.ts';
import { paths } from '#src/app/paths.ts';
import { Page } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { stateOfRecognition } from '../recognition.ts';

/** Every laboratory of the network, with how it stands today. */
export function LaboratoryList({ laboratories }: LaboratoryListResponse) {
  const count = laboratories.length === 1 ? '1 laboratory' : `${laboratories.length} laboratories`;
  return (
    <Page
      title="Network"
      sub={
        <>
          {`${count} · `}
          <Link to={paths.massScale.href()} className="text-ink underline underline-offset-3">
            mass scale and notices
          </Link>
        </>
      }
    >
      {laboratories.length === 0 ? (
        <EmptyState>
          The laboratories of the network stand here once the registrar has admitted them.
        </EmptyState>
      ) : (
        <Table caption="Laboratories">
          <thead>
            <tr>
              <Head>Laboratory</Head>
              <Head>Code</Head>
              <Head>Kind</Head>
              <Head>Country</Head>
              <Head>Place</Head>
              <Head>Recognition</Head>
              <Head>By</Head>
              <Head align="right">Scope lines</Head>
            </tr>
          </thead>
          <tbody>
            {laboratories.map((laboratory) => (
              <Row key={laboratory.id}>
                <Cell isHeading>
                  <RowLink to={paths.laboratory.href(laboratory.id)}>{laboratory.name}</RowLink>
                </Cell>
                <Cell isMono>{laboratory.code}</Cell>
                <Cell className="whitespace-nowrap">{laboratory.kind}</Cell>
                <Cell>{laboratory.country}</Cell>
                <Cell className="whitespace-nowrap">{laboratory.place}</Cell>
                <Cell className="whitespace-nowrap">
                  <StateMark state={stateOfRecognition(laboratory.recognition)}>
                    {laboratory.recognition === 'none' ? 'none in the register' : laboratory.recognition}
                  </StateMark>
                </Cell>
                <Cell className="whitespace-nowrap text-ink-2">{laboratory.recognitionBody}</Cell>
                <Cell align="right">{laboratory.scopeLines}</Cell>
              </Row>
            ))}
          </tbody>
        </Table>
      )}
    </Page>
  );
}
