import { useState } from 'react';
import type { TogetherResponse } from '#shared/contracts/together.ts';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { U } from './u.tsx';

const MATRICES = [
  { value: 'correlation', label: 'r' },
  { value: 'covariance', label: 'Covariance' },
] as const;
/** Covariances are set in square micrograms, the unit in which they can be read. */
const SQUARE_MICROGRAMS = 1e12;

/** The standard uncertainty of each weight, and of each two how far they move together. */
export function CorrelationSection({ together }: { together: TogetherResponse }) {
  const { weights, standardUncertainties: us, correlation, covariance, valueUids } = together;
  const { decimalMark } = usePreferences();
  const [shown, setShown] = useState<(typeof MATRICES)[number]['value']>('correlation');
  const entry = (i: number, j: number) => {
    const value = (shown === 'correlation' ? correlation : covariance)[i]![j]!;
    if (value === null) return <span className="text-ink-3">not declared</span>;
    if (shown === 'correlation') return <>{formatDecimal(value.toFixed(3), { decimalMark, decimals: 3 })}</>;
    return (
      <>
        {Number((value * SQUARE_MICROGRAMS).toPrecision(3))
          .toLocaleString('en', { useGrouping: false, maximumSignificantDigits: 3 })
          .replace('.', decimalMark)}
      </>
    );
  };
  return (
    <Section
      title={shown === 'correlation' ? 'How far they move together' : 'Covariance'}
      note={shown === 'covariance' ? 'µg²' : 'r: 1 fully, 0 not at all'}
      actions={<Switch label="Shown" isLabelHidden value={shown} onChange={setShown} choices={MATRICES} />}
    >
      <Table caption={shown === 'correlation' ? 'Correlation' : 'Covariance'} isScrolled>
        <thead>
          <tr>
            <Head>Weight</Head>
            <Head align="right">u</Head>
            {weights.map((weight, j) => (
              <Head key={valueUids[j]} align="right">
                <span className="font-mono text-sm">{weight.registryNo}</span>
              </Head>
            ))}
          </tr>
        </thead>
        <tbody>
          {weights.map((weight, i) => (
            <Row key={valueUids[i]}>
              <Cell isHeading isMono>
                {weight.registryNo}
              </Cell>
              <Cell align="right">
                <U grams={us[i]!} />
              </Cell>
              {weights.map((_, j) => (
                <Cell key={valueUids[j]} align="right">
                  {entry(i, j)}
                </Cell>
              ))}
            </Row>
          ))}
        </tbody>
      </Table>
    </Section>
  );
}
