import type { StandardResponse } from '#shared/contracts/standards.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { ORIGIN_WORDS, PROPERTIES } from '../words.ts';

/** A property with its U and where it comes from; an assumed density is never shown as if it were measured. */
export function PropertyValue({ property }: { property: StandardResponse['properties'][number] }) {
  const { value, expandedU, k, origin, kind } = property;
  return (
    <>
      <Quantity
        value={value}
        expandedUncertainty={expandedU}
        coverageFactor={k}
        unit={PROPERTIES[kind].unit}
      />
      {`, ${ORIGIN_WORDS[origin]}`}
      {expandedU === null && <span className="text-ink-3">, U not stated</span>}
    </>
  );
}
