import { memo, useEffect, useMemo, useRef } from 'react';
import { Handle, Position, type NodeProps } from 'reactflow';
import type { Plate } from '#shared/drawing/display-list.ts';
import { plateFigure } from '#shared/drawing/plate-shapes.ts';

export interface PlateData {
  plate: Plate;
  isSelected: boolean;
  /** The one plate that Tab reaches; arrow keys walk from there. */
  isTabStop: boolean;
  /** Walked to: takes the focus as soon as it stands. */
  takesFocus: boolean;
}

/**
 * A plate as a button, unseen: what the eye sees of it stands in the picture below. What it does when pressed, and
 * where arrow keys lead, is the drawing's.
 */
export const PlateNode = memo(function PlateNode({ data }: NodeProps<PlateData>) {
  const { plate, isSelected, isTabStop, takesFocus } = data;
  const button = useRef<HTMLDivElement>(null);
  const title = useMemo(() => plateFigure(plate).title, [plate]);
  useEffect(() => {
    if (takesFocus) button.current?.focus({ preventScroll: true });
  }, [takesFocus]);
  return (
    <>
      <Handle type="source" position={Position.Bottom} className="hidden" isConnectable={false} />
      <Handle type="target" position={Position.Top} className="hidden" isConnectable={false} />
      <div
        ref={button}
        role="button"
        tabIndex={isTabStop ? 0 : -1}
        data-plate={plate.id}
        aria-label={plate.node.type === 'group' ? `${title}; opens in place` : title}
        aria-pressed={plate.node.type === 'group' ? undefined : isSelected}
        className="block size-full cursor-pointer"
      />
    </>
  );
});
