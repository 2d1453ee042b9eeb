import { memo } from 'react';
import type { DraftLine } from '#shared/contracts/drafts.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { useKnown, type KnownStandard } from './known.ts';
import { readLine } from './read-line.ts';
import { isSameValue } from './same-value.ts';

/** What the entries mean: each result as the register will hold it, worked out while one types. */
export function ResultsAside({ lines }: { lines: readonly DraftLine[] }) {
  const known = useKnown();
  if (lines.length === 0) return null;
  return (
    <Section
      title="Results, as they are read"
      note="U at k = 2 against a third of the limit of its class; the value is not judged"
    >
      <div className="min-w-0 overflow-x-auto">
        <Table caption="Results, as they are read">
          <thead>
            <tr>
              <Head>Weight</Head>
              <Head align="right">Deviation</Head>
              <Head align="right">U</Head>
              <Head align="right">Since last</Head>
              <Head>U and limit</Head>
            </tr>
          </thead>
          <tbody>
            {lines.map((line, at) => (
              <ReadRow
                key={line.key}
                line={line}
                at={at}
                standard={known.standards.get(line.standardId ?? '')}
              />
            ))}
          </tbody>
        </Table>
      </div>
    </Section>
  );
}

interface ReadRowProps {
  line: DraftLine;
  at: number;
  standard: KnownStandard | undefined;
}

/** Drawn again only when its own line says something else: a certificate may have 200. */
const ReadRow = memo(
  function ReadRow({ line, at, standard }: ReadRowProps) {
    const { deviation, written, expandedU, writtenU, change, third } = readLine(line, standard);
    return (
      <Row>
        <Cell isHeading className="whitespace-nowrap">
          {standard?.marking ?? `line ${at + 1}`}
        </Cell>
        <Cell align="right">
          {deviation ? (
            <Quantity value={deviation} kind="deviation" shownIn={written.unit} decimals={written.decimals} />
          ) : (
            <Nothing />
          )}
        </Cell>
        <Cell align="right">
          {expandedU ? (
            <Quantity value={expandedU} shownIn={writtenU.unit} decimals={writtenU.decimals} />
          ) : line.uNotStated ? (
            'not stated'
          ) : (
            <Nothing />
          )}
        </Cell>
        <Cell align="right">{change ? <Change {...change} expandedU={expandedU} /> : <Nothing />}</Cell>
        <Cell>
          {third ? (
            <span className="whitespace-nowrap" title={`MPE of class ${third.class}, OIML R 111-1:2004, 5.2`}>
              <StateMark state={third.isWithin ? 'sound' : 'caution'}>
                {third.isWithin ? 'U \u2264 MPE/3' : 'U > MPE/3'}
              </StateMark>
              <span className="block text-xs text-ink-2">MPE of {third.class}</span>
            </span>
          ) : (
            <Nothing />
          )}
        </Cell>
      </Row>
    );
  },
  (before, after) =>
    before.at === after.at && before.standard === after.standard && isSameValue(before.line, after.line),
);

function Change({
  deviation,
  ratio,
  expandedU,
}: {
  deviation: string;
  ratio: number | null;
  expandedU: string | null;
}) {
  return (
    <span title={ratio === null ? undefined : `${ratio.toFixed(2)} of the U of the change`}>
      <Quantity
        value={deviation}
        kind="deviation"
        shownIn="auto"
        expandedUncertainty={expandedU}
        hidesUncertainty
        className={ratio !== null && ratio > 1 ? 'text-caution' : ''}
      />
      {ratio !== null && <span className="block text-xs text-ink-2">E = {ratio.toFixed(2)}</span>}
    </span>
  );
}

function Nothing() {
  return <span className="text-ink-3">–</span>;
}
