import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { toPlain } from './contributions.tsx';

/** Mass and conventional mass side by side; the one to type into a balance is named. */
export function BothKinds({ chain }: { chain: ChainResponse }) {
  if (chain.sideBySide.length === 0) return null;
  return (
    <Section title="Mass and conventional mass">
      <Table caption="Mass and conventional mass of the weight">
        <thead>
          <tr>
            <Head>Kind</Head>
            <Head align="right">Deviation</Head>
            <Head align="right">U, k = {chain.uncertainty.k}</Head>
          </tr>
        </thead>
        <tbody>
          {chain.sideBySide.map((side) => (
            <Row key={side.quantity}>
              <Cell isHeading>
                {side.quantity}
                {side.origin !== 'stated' && <span className="block text-xs text-ink-3">{side.origin}</span>}
                {side.isTheOneToType && (
                  <span className="block text-xs text-brass">type this one into a balance</span>
                )}
              </Cell>
              <Cell align="right">
                <Quantity
                  value={side.deviation}
                  expandedUncertainty={side.expandedU === null ? null : toPlain(side.expandedU)}
                  coverageFactor={chain.uncertainty.k}
                  kind="deviation"
                  shownIn="auto"
                  hidesUncertainty
                />
              </Cell>
              <Cell align="right">
                {side.expandedU === null ? (
                  'not stated'
                ) : (
                  <Quantity
                    value={toPlain(side.expandedU)}
                    kind="uncertainty"
                    coverageFactor={chain.uncertainty.k}
                    shownIn="auto"
                  />
                )}
              </Cell>
            </Row>
          ))}
        </tbody>
      </Table>
      {chain.sideBySideNote && <p className="text-sm text-ink-2">{chain.sideBySideNote}</p>}
    </Section>
  );
}
