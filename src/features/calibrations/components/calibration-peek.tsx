import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { LinkButton } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { SideSheet } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { Facts } from '#src/components/layout/facts.tsx';
import type { CalibrationResponse } from '#shared/contracts/calibrations.ts';
import { stateOfValue } from '#shared/states.ts';
import { calibrationQuery } from '../api.ts';
import { PerformedText } from './performed-text.tsx';

/** The short facts of one calibration, beside the list. */
export function CalibrationPeek({ revisionId, onClose }: { revisionId: string; onClose: () => void }) {
  const { data, error, refetch } = useQuery(calibrationQuery(revisionId));
  const title = data ? (
    <span className="font-mono text-base">{data.calibration.certificateNo}</span>
  ) : (
    'Calibration'
  );
  return (
    <SideSheet title={title} onClose={onClose}>
      {data ? (
        <Peek {...data} />
      ) : error ? (
        <ErrorNotice error={error} onRetry={() => void refetch()} />
      ) : (
        <Waiting>Reading the certificate</Waiting>
      )}
    </SideSheet>
  );
}

function Peek({ calibration, lines }: CalibrationResponse) {
  const [first] = lines;
  return (
    <>
      <Facts
        facts={[
          ['Stands', <StateMark state={stateOfValue(calibration.state)}>{calibration.state}</StateMark>],
          ['Issued by', calibration.issuer.name],
          ['Issued', <DateText value={calibration.issuedOn} />],
          ['Performed', <PerformedText {...calibration} />],
          ['Method', calibration.method],
          ['Revision', calibration.revisionN > 1 ? calibration.revisionN : null],
        ]}
      />
      <Table caption="Results">
        <thead>
          <tr>
            <Head>Weight</Head>
            <Head align="right">Deviation</Head>
            <Head align="right">U</Head>
            <Head>Chain</Head>
          </tr>
        </thead>
        <tbody>
          {lines.map(({ uid, standard, quantity, deviation, expandedU, k }) => (
            <Row key={uid}>
              <Cell isHeading>
                <Link to={paths.standard.href(standard.id)} className="hover:underline">
                  <span className="font-mono text-sm">{standard.registryNo}</span>
                </Link>
                <span className="ml-2 whitespace-nowrap text-ink-2">{standard.marking}</span>
                <span className="block text-sm whitespace-nowrap text-ink-2">{quantity}</span>
              </Cell>
              <Cell align="right">
                <Quantity
                  value={deviation}
                  kind="deviation"
                  shownIn="auto"
                  expandedUncertainty={expandedU}
                  coverageFactor={k}
                  hidesUncertainty
                />
              </Cell>
              <Cell align="right">
                {expandedU ? (
                  <Quantity value={expandedU} kind="uncertainty" shownIn="auto" coverageFactor={k} />
                ) : (
                  'not stated'
                )}
              </Cell>
              <Cell>
                <Link to={paths.chain.href(uid)} className="underline underline-offset-3">
                  open
                </Link>
              </Cell>
            </Row>
          ))}
        </tbody>
      </Table>
      <div className="flex flex-wrap gap-2">
        <LinkButton to={paths.calibration.href(calibration.revisionId)} weight="primary">
          Open the sheet
        </LinkButton>
        {first && lines.length === 1 && (
          <LinkButton to={paths.chain.href(first.uid)}>Open the chain</LinkButton>
        )}
      </div>
    </>
  );
}
