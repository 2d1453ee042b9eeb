import { memo, useEffect, useMemo, useRef } from 'react';
import { Handle, Position, type NodeProps } from 'reactflow';
import type { Plate } from '#shared/drawing/display-list.ts';
import { PLATE } from '#shared/drawing/geometry.ts';
import { plateFigure } from '#shared/drawing/plate-shapes.ts';
import { briefPlate } from './brief-plate.ts';
import { useIsBrief } from './detail-level.ts';
import { ShapesView } from './shapes-view.tsx';

export interface PlateData {
  plate: Plate;
  isSelected: boolean;
  /** The one plate that Tab reaches; arrow keys walk from there. */
  isTabStop: boolean;
  /** Walked to: takes the focus as soon as it stands. */
  takesFocus: boolean;
}

/**
 * A plate as a button. It draws the shapes that every export draws; small in its frame, only its number and state.
 * What it does when pressed, and where arrow keys lead, is the drawing's.
 */
export const PlateNode = memo(function PlateNode({ data }: NodeProps<PlateData>) {
  const { plate, isSelected, isTabStop, takesFocus } = data;
  const isBrief = useIsBrief();
  const button = useRef<HTMLDivElement>(null);
  const figure = useMemo(() => plateFigure({ ...plate, x: 0, y: 0 }), [plate]);
  const shapes = useMemo(
    () => (isBrief ? briefPlate({ ...plate, x: 0, y: 0 }) : figure.shapes),
    [plate, figure, isBrief],
  );
  useEffect(() => {
    if (takesFocus) button.current?.focus({ preventScroll: true });
  }, [takesFocus]);
  return (
    <>
      <Handle type="source" position={Position.Bottom} className="invisible" isConnectable={false} />
      <Handle type="target" position={Position.Top} className="invisible" isConnectable={false} />
      <div
        ref={button}
        role="button"
        tabIndex={isTabStop ? 0 : -1}
        data-plate={plate.id}
        aria-label={plate.node.type === 'group' ? `${figure.title}; opens in place` : figure.title}
        aria-pressed={plate.node.type === 'group' ? undefined : isSelected}
        className={`block cursor-pointer ${isSelected ? 'outline-2 outline-offset-2 outline-brass' : ''}`}
      >
        <svg width={PLATE.width} height={PLATE.height} className="block overflow-visible" aria-hidden="true">
          <ShapesView shapes={shapes} />
          {plate.node.type === 'group' && !isBrief && <OpenSign />}
        </svg>
      </div>
    </>
  );
});

/** That a press opens the group in place; said on the screen only. */
function OpenSign() {
  return (
    <g transform={`translate(${PLATE.width - 24} ${PLATE.height - 24})`}>
      <rect x="0.5" y="0.5" width="15" height="15" className="fill-raised stroke-brass" />
      <path d="M8 4V12M4 8H12" className="stroke-brass" strokeWidth="1.5" />
    </g>
  );
}
