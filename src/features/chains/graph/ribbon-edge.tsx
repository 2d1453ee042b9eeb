import { memo, useMemo } from 'react';
import type { EdgeProps } from 'reactflow';
import type { Ribbon } from '#shared/drawing/display-list.ts';
import { ribbonFigure } from '#shared/drawing/ribbon-shapes.ts';
import { briefRibbon } from './brief-plate.ts';
import { useIsBrief } from './detail-level.ts';
import { ShapesView } from './shapes-view.tsx';

export interface RibbonData {
  ribbon: Ribbon;
  isSelected: boolean;
}

/** A link, in the shapes that every export draws; a wider unseen line takes the pointer. */
export const RibbonEdge = memo(function RibbonEdge({ data }: EdgeProps<RibbonData>) {
  const ribbon = data?.ribbon;
  const isBrief = useIsBrief();
  const shapes = useMemo(
    () => ribbon && (isBrief ? briefRibbon(ribbon) : ribbonFigure(ribbon).shapes),
    [ribbon, isBrief],
  );
  if (!ribbon || !shapes) return null;
  return (
    <g data-ribbon={ribbon.id}>
      <path d={ribbon.path} fill="none" stroke="transparent" strokeWidth={Math.max(14, ribbon.width)} />
      {data.isSelected && (
        <path
          d={ribbon.path}
          fill="none"
          className="stroke-brass"
          strokeWidth={Math.max(4, ribbon.width + 4)}
        />
      )}
      <ShapesView shapes={shapes} />
    </g>
  );
});
