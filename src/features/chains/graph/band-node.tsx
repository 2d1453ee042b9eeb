import { memo } from 'react';
import type { NodeProps } from 'reactflow';

export interface BandData {
  text: string;
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
      {data.text}
    </div>
  );
});
