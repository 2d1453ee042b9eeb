import { Quantity } from './quantity.tsx';
import { Cell } from './table.tsx';

interface ValueCellProps {
  /** Deviation from nominal, grams. */
  deviation: string;
  /** Grams; null where the certificate states none. */
  expandedU: string | null;
  k: string | null;
}

/** Deviation and U in two cells of a row, in one unit; a U that is not stated is not invented. */
export function ValueCells({ deviation, expandedU, k }: ValueCellProps) {
  return (
    <>
      <Cell align="right">
        <Quantity
          value={deviation}
          expandedUncertainty={expandedU}
          coverageFactor={k}
          kind="deviation"
          shownIn="auto"
          hidesUncertainty
        />
      </Cell>
      <Cell align="right">
        {expandedU === null ? (
          <span className="text-ink-3">not stated</span>
        ) : (
          <Quantity
            value={expandedU}
            kind="uncertainty"
            coverageFactor={k}
            shownIn={sharedUnit(deviation, expandedU)}
          />
        )}
      </Cell>
    </>
  );
}

function sharedUnit(deviation: string, expandedU: string): 'g' | 'mg' | 'ug' {
  const size = Math.max(Math.abs(Number(deviation)), Number(expandedU));
  if (size < 0.001) return 'ug';
  return size < 1 ? 'mg' : 'g';
}
