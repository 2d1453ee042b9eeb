import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { whatToDo } from '../what-to-do.ts';
import { Amount, Shift } from './amount.tsx';
import { toPlain } from './contributions.tsx';
import type { ValueNode } from './selection-sheet.tsx';

/** The weight as certified and as now known, side by side: how far it moved, and whether that matters. */
export function BothChains({ chain }: { chain: ChainResponse }) {
  const { decimalMark } = usePreferences();
  const now = chain.asNowKnown;
  const focus = chain.nodes.find((node): node is ValueNode => node.uid === chain.focusUid)!;
  if (!now) {
    return (
      <Section title="As now known">
        <p className="text-ink-2">
          Nothing that this value rests on was corrected or withdrawn by {chain.question.day}, as known on{' '}
          {chain.question.known}.
        </p>
      </Section>
    );
  }
  const ofU = shiftOverU(now.shift, focus.expandedU);
  return (
    <Section title="As certified, and as now known">
      <Table caption="The weight as certified and as now known">
        <thead>
          <tr>
            <Head>Links</Head>
            <Head align="right">Deviation</Head>
            <Head align="right">U, k = {chain.uncertainty.k}</Head>
          </tr>
        </thead>
        <tbody>
          <Result name="As certified" deviation={focus.deviation} u={focus.expandedU} k={focus.k} />
          <Result
            name="As now known"
            deviation={now.deviation}
            u={now.expandedU === null ? null : toPlain(now.expandedU)}
            k={focus.k}
          />
          {now.shift !== null && (
            <Row>
              <Cell isHeading>Shift</Cell>
              <Cell align="right">
                <Shift grams={now.shift} expandedU={focus.expandedU} k={focus.k} />
              </Cell>
              <Cell align="right">{ofU === null ? '' : `${shareText(ofU, decimalMark)} of U`}</Cell>
            </Row>
          )}
        </tbody>
      </Table>
      <p>{whatToDo(now, ofU, decimalMark)}</p>
      {now.replaced.length + now.notices.length > 0 && (
        <ul className="text-sm text-ink-2">
          {now.replaced.map((row) => (
            <li key={row.uid}>
              <span className="font-mono">{row.registryNo}</span>: certificate {row.certificateNo}{' '}
              {row.byUid === null ? 'was withdrawn' : 'was replaced'}
              {row.shift !== null && Number(row.shift) !== 0 && (
                <>
                  {' '}
                  and brings <Amount grams={row.shift} kind="deviation" />
                </>
              )}
              .
            </li>
          ))}
          {now.notices.map((notice) => (
            <li key={notice.id}>
              Notice {notice.number}, {notice.title}, in force from {notice.effectiveOn},{' '}
              {Number(notice.shift) === 0 ? (
                <>
                  adds to the standard uncertainty: <Amount grams={toPlain(notice.u)} kind="uncertainty" />.
                </>
              ) : (
                <>
                  brings <Amount grams={notice.shift} kind="deviation" />.
                </>
              )}
            </li>
          ))}
        </ul>
      )}
    </Section>
  );
}

interface ResultProps {
  name: string;
  deviation: string | null;
  u: string | null;
  k: string | null;
}

function Result({ name, deviation, u, k }: ResultProps) {
  return (
    <Row>
      <Cell isHeading>{name}</Cell>
      <Cell align="right">
        {deviation === null ? (
          'not computable'
        ) : (
          <Quantity
            value={deviation}
            expandedUncertainty={u}
            coverageFactor={k}
            kind="deviation"
            shownIn="auto"
            hidesUncertainty
          />
        )}
      </Cell>
      <Cell align="right">
        {u === null ? (
          <span className="text-ink-3">{deviation === null ? '' : 'unknown'}</span>
        ) : (
          <Quantity value={u} kind="uncertainty" coverageFactor={k} shownIn="auto" />
        )}
      </Cell>
    </Row>
  );
}

/** The size of a shift as a part of the U that the certificate states; null where either is not there. */
function shiftOverU(shift: string | null, expandedU: string | null): number | null {
  return shift === null || expandedU === null ? null : Math.abs(Number(shift)) / Number(expandedU);
}
