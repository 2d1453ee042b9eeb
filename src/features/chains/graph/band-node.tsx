import { memo, type ReactNode } from 'react';
import type { NodeProps } from 'reactflow';
import type { ChainResponse } from '#shared/contracts/chains.ts';

export interface BandData {
  definition: ChainResponse['definition'];
  width: number;
  height: number;
}

/** The definition in force when the roots were determined: one band across the top. */
export const BandNode = memo(function BandNode({ data }: NodeProps<BandData>) {
  return (
    <div
      className="flex items-center justify-center border border-ink bg-raised px-3 text-center font-serif"
      style={{ width: data.width, height: data.height }}
    >
      <p>The kilogram: {SAYINGS[data.definition]}</p>
    </div>
  );
});

/** The Planck constant, exact since 2019-05-20 (26th CGPM, Resolution 1). */
const PLANCK = (
  <>
    <i>h</i> = 6.626 070 15 × 10<sup>−34</sup> J s, exactly
  </>
);
const PROTOTYPE = 'the mass of the international prototype, until 2019-05-20';

const SAYINGS: Record<BandData['definition'], ReactNode> = {
  'planck constant': PLANCK,
  'international prototype': PROTOTYPE,
  both: (
    <>
      {PROTOTYPE}; since then {PLANCK}
    </>
  ),
};
