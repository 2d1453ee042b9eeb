import { DateText } from '#src/components/ui/date-text.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { nominalUnit } from '#shared/numbers/nominal.ts';
import { bestU, type Line } from '../best-capability.ts';
import { stateOfRecognition } from '../recognition.ts';
import { BestCapability } from './best-capability.tsx';

/** What a laboratory may do and how well at best, line by line. */
export function ScopeTable({ lines }: { lines: readonly Line[] }) {
  return (
    <Table caption="Scope" isScrolled>
      <thead>
        <tr>
          <Head align="right">Line</Head>
          <Head>Quantity</Head>
          <Head>
            Nominal <span className="font-serif leading-none italic">m</span>
          </Head>
          <Head>Method</Head>
          <Head>Best U</Head>
          <Head>From, to</Head>
          <Head align="right">k</Head>
          <Head>Stands</Head>
          <Head>Valid</Head>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <Row key={line.line}>
            <Cell align="right" isHeading className="text-ink-2">
              {line.line}
            </Cell>
            <Cell className="whitespace-nowrap">{line.quantity}</Cell>
            <Cell>
              <NominalRange line={line} />
            </Cell>
            <Cell>{line.method}</Cell>
            <Cell>
              <BestCapability line={line} />
            </Cell>
            <Cell>
              <UAtEnds line={line} />
            </Cell>
            <Cell align="right">{line.k}</Cell>
            <Cell className="whitespace-nowrap">
              <StateMark state={stateOfRecognition(line.state)}>{line.state}</StateMark>
            </Cell>
            <Cell className="whitespace-nowrap">
              since <DateText value={line.validFrom} />
              {line.validTo && (
                <>
                  {' to '}
                  <DateText value={line.validTo} />
                </>
              )}
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function NominalRange({ line: { nominalFrom, nominalTo } }: { line: Line }) {
  return (
    <span className="whitespace-nowrap">
      <Quantity value={nominalFrom} shownIn={nominalUnit(nominalFrom)} />
      {nominalTo !== nominalFrom && (
        <>
          {' to '}
          <Quantity value={nominalTo} shownIn={nominalUnit(nominalTo)} />
        </>
      )}
    </span>
  );
}

/** The same function worked out at both ends of its range: what most people look for. */
function UAtEnds({ line }: { line: Line }) {
  const [low, high] = [bestU(line, line.nominalFrom), bestU(line, line.nominalTo)];
  return (
    <span className="whitespace-nowrap text-ink-2">
      <Quantity value={low} kind="uncertainty" coverageFactor={line.k} shownIn="auto" />
      {high !== low && (
        <>
          {', '}
          <Quantity value={high} kind="uncertainty" coverageFactor={line.k} shownIn="auto" />
        </>
      )}
    </span>
  );
}
