import { memo } from 'react';
import type { NodeProps } from 'reactflow';
import { bandFigure } from '#shared/drawing/band-shapes.ts';
import type { DisplayList } from '#shared/drawing/display-list.ts';
import { useIsBrief } from './detail-level.ts';
import { ShapesView } from './shapes-view.tsx';

/** The definition in force when the roots were determined: one band across the top. */
export const BandNode = memo(function BandNode({ data: band }: NodeProps<DisplayList['band']>) {
  const isBrief = useIsBrief();
  const figure = bandFigure({ ...band, x: 0 }, isBrief ? 22 : undefined);
  return (
    <svg width={band.width} height={band.height} className="block" role="img" aria-label={figure.title}>
      <ShapesView shapes={figure.shapes} />
    </svg>
  );
});
