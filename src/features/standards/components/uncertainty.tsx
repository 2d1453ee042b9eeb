import { Quantity } from '#src/components/ui/quantity.tsx';

interface UncertaintyProps {
  /** Grams; null where the certificate states none. */
  expandedU: string | null;
  k: string | null;
  /** Grams: the deviation beside it, whose unit U shares. */
  deviation: string;
}

/** A U in a column of its own, in the unit of the deviation beside it; none is invented. */
export function Uncertainty({ expandedU, k, deviation }: UncertaintyProps) {
  if (expandedU === null) return <span className="text-ink-3">not stated</span>;
  return (
    <Quantity
      value={expandedU}
      kind="uncertainty"
      coverageFactor={k}
      shownIn={sharedUnit(deviation, expandedU)}
    />
  );
}

function sharedUnit(deviation: string, expandedU: string): 'g' | 'mg' | 'ug' {
  const size = Math.max(Math.abs(Number(deviation)), Number(expandedU));
  if (size < 0.001) return 'ug';
  return size < 1 ? 'mg' : 'g';
}
