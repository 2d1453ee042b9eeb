import type { ChainResponse } from '#shared/contracts/chains.ts';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { isPracticallyNone } from '../second-weight.ts';
import type { SecondWeight } from './use-second-weight.ts';

interface TogetherLineProps {
  chain: ChainResponse;
  second: SecondWeight;
  /** How many plates both lean on, and whether the second's own part is drawn. */
  shared: number;
  isBeside: boolean;
}

/** How two weights vary together, above the drawing that shows why. */
export function TogetherLine({ chain, second, shared, isBeside }: TogetherLineProps) {
  if (second.error) return <ErrorNotice error={second.error} />;
  if (!second.chain || !second.together) return <Waiting>Comparing the two chains</Waiting>;
  const names = [chain, second.chain].map(focusNumber);
  return (
    <p role="status" className="pb-2">
      <span className="font-mono text-sm">{names[0]}</span> and{' '}
      <span className="font-mono text-sm">{names[1]}</span>{' '}
      {shared === 0
        ? 'lean on nothing together'
        : `lean on ${shared} ${shared === 1 ? 'value or effect' : 'values and effects'} together, ringed and marked shared`}
      : <Numbers together={second.together} />{' '}
      <span className="text-ink-2">
        {isBeside
          ? 'The second weight’s own part is drawn beside, in dashed lines without flow.'
          : shared > 0 && 'Only what is shared is marked.'}
      </span>
    </p>
  );
}

function Numbers({ together }: { together: NonNullable<SecondWeight['together']> }) {
  const { decimalMark } = usePreferences();
  const { covariance, correlation, standardUncertainties } = together;
  const [one, other] = standardUncertainties;
  if (covariance === null || one === null || other === null)
    return <>their correlation cannot be computed, as something that they lean on states no U.</>;
  const ofDifference = Math.sqrt(Math.max(0, one ** 2 + other ** 2 - 2 * covariance));
  return (
    <>
      {isPracticallyNone(correlation) ? (
        'practically no correlation; '
      ) : (
        <>
          <i className="font-serif">r</i>{' '}
          {correlation === null
            ? 'unknown'
            : `= ${formatDecimal(correlation.toFixed(3), { decimalMark, decimals: 3 })}`}
          , covariance <Quantity value={covariance.toPrecision(3)} unit="g^2" isScientific decimals={2} />
          ;{' '}
        </>
      )}
      <i className="font-serif">u</i> of their difference{' '}
      <Quantity value={ofDifference.toFixed(15)} kind="uncertainty" coverageFactor={1} shownIn="auto" />.
    </>
  );
}

function focusNumber(chain: ChainResponse): string {
  const focus = chain.nodes.find((node) => node.uid === chain.focusUid);
  return focus?.type === 'value' ? focus.registryNo : '';
}
