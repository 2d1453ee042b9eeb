import { memo } from 'react';
import type { NodeProps } from 'reactflow';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { usePreferences } from '#src/lib/preferences.ts';

export interface BandData {
  definition: ChainResponse['definition'];
  /** Left edge; beyond the plates where they are few. */
  x: number;
  width: number;
  height: number;
}

/**
 * The definition in force when the roots were determined: one band across the top. The Planck constant is exact
 * since 2019-05-20 (26th CGPM, Resolution 1).
 */
export const BandNode = memo(function BandNode({ data }: NodeProps<BandData>) {
  const { decimalMark } = usePreferences();
  const planck = (
    <>
      <i>h</i> = 6{decimalMark}626 070 15 × 10<sup>−34</sup> J s, exactly
    </>
  );
  return (
    <div
      className="flex flex-col items-center justify-center border border-ink bg-raised text-center font-serif text-sm leading-tight whitespace-nowrap"
      style={{ width: data.width, height: data.height }}
    >
      {data.definition === 'planck constant' && <p>The kilogram: {planck}</p>}
      {data.definition !== 'planck constant' && <p>The kilogram: {PROTOTYPE}</p>}
      {data.definition === 'both' && <p>since then: {planck}</p>}
    </div>
  );
});

const PROTOTYPE = 'the mass of the international prototype, until 2019-05-20';
