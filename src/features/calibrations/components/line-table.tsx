import { Link } from 'react-router';
import type { CalibrationResponse } from '#shared/contracts/calibrations.ts';
import { Decimal } from '#shared/decimal.ts';
import { paths } from '#src/app/paths.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { stateOfValue } from '#shared/states.ts';
import { quantityWords, sharedFacts, type SharedFacts } from './shared-words.ts';

type Line = CalibrationResponse['lines'][number];

const LINK = 'underline decoration-rule underline-offset-3 hover:decoration-ink';

/** The results of a certificate, digit for digit as they were printed. */
export function LineTable({ lines }: { lines: readonly Line[] }) {
  const shared = sharedFacts(lines);
  return (
    <Table caption="Results">
      <thead>
        <tr>
          <Head>Weight</Head>
          {!shared.quantity && <Head>Quantity</Head>}
          <Head align="right">Deviation</Head>
          <Head align="right">U</Head>
          <Head align="right">k</Head>
          <Head>Class</Head>
          <Head>Stands</Head>
          <Head>Reference used</Head>
          <Head>Chain</Head>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <LineRow key={line.uid} line={line} shared={shared} />
        ))}
      </tbody>
    </Table>
  );
}

function LineRow({ line, shared }: { line: Line; shared: SharedFacts }) {
  const { standard, deviation, reportedUnit, reportedDecimals, reportedUDecimals, expandedU, k } = line;
  return (
    <Row>
      <Cell isHeading className="whitespace-nowrap">
        <Link to={paths.standard.href(standard.id)} className={`font-mono text-sm ${LINK}`}>
          {standard.registryNo}
        </Link>
        , {standard.marking}
      </Cell>
      {!shared.quantity && <Cell>{quantityWords(line).join(', ')}</Cell>}
      <Cell align="right">
        {/* As printed: the certificate can be read back digit for digit. */}
        <Quantity value={deviation} kind="deviation" shownIn={reportedUnit} decimals={reportedDecimals} />
      </Cell>
      <Cell align="right">
        {expandedU ? (
          <Quantity value={expandedU} shownIn={reportedUnit} decimals={reportedUDecimals ?? undefined} />
        ) : (
          <span className="text-ink-2">not stated</span>
        )}
      </Cell>
      <Cell align="right">{k && new Decimal(k).toFixed()}</Cell>
      <Cell>
        {line.class ?? ''}
        {!shared.accreditation && line.underAccreditation && (
          <span className="block text-sm text-ink-2">accredited</span>
        )}
      </Cell>
      <Cell className="whitespace-nowrap">
        <StateMark state={stateOfValue(line.state)}>
          {line.state}
          {line.stateSince && line.state !== 'in force' && ` ${line.stateSince}`}
        </StateMark>
      </Cell>
      <Cell>
        <References references={line.references} />
      </Cell>
      <Cell>
        <Link to={paths.chain.href(line.uid)} className="underline underline-offset-3">
          open
        </Link>
      </Cell>
    </Row>
  );
}

function References({ references }: { references: Line['references'] }) {
  if (references.length === 0) return <span className="text-ink-2">end of the chain</span>;
  return references.map(({ valueUid, registryNo, certificateNo, usedAs, sensitivity, usedBegin, state }) => (
    <span
      key={valueUid}
      className="block whitespace-nowrap"
      title={`${certificateNo}, used as ${usedAs} from ${usedBegin}, sensitivity ${sensitivity}`}
    >
      <Link to={paths.chain.href(valueUid)} className={`font-mono text-sm ${LINK}`}>
        {registryNo}
      </Link>{' '}
      <StateMark state={stateOfValue(state)} isMarkOnly={state === 'in force'}>
        {state}
      </StateMark>
      <span className="ml-2 text-ink-2">
        {certificateNo}
        {sensitivity !== 1 && `, × ${sensitivity}`}
      </span>
    </span>
  ));
}
