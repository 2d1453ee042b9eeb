import { memo, useMemo } from 'react';
import type { NodeProps } from 'reactflow';
import type { DisplayList, Plate, Ribbon } from '#shared/drawing/display-list.ts';
import { PLATE } from '#shared/drawing/geometry.ts';
import { plateFigure } from '#shared/drawing/plate-shapes.ts';
import { ribbonFigure } from '#shared/drawing/ribbon-shapes.ts';
import { briefPlate, briefRibbon } from './brief-plate.ts';
import { useIsBrief } from './detail-level.ts';
import { ShapesView } from './shapes-view.tsx';
import { useBuilt } from './use-built.ts';

export interface PictureData {
  list: DisplayList;
  /** Ids of the plates and ribbons that are selected. */
  selected: ReadonlySet<string>;
}

/**
 * All ribbons and plates in one SVG: what the eye sees. Each in an element of its own would be a layer that the
 * browser sorts in every frame in which the drawing moves. Pointer, keyboard and screen readers meet the buttons and
 * lines that lie over it unseen. Drawn small it is a second SVG, built when it is first wanted: then one gives way to
 * the other without being built anew.
 */
export const PictureNode = memo(function PictureNode({ data }: NodeProps<PictureData>) {
  const isBrief = useIsBrief();
  const count = data.list.plates.length + data.list.ribbons.length;
  const full = useBuilt(count, !isBrief);
  const brief = useBuilt(count, isBrief);
  const isBriefShown = isBrief ? brief === count || full === 0 : full < count && brief > 0;
  return (
    <>
      <Face {...data} built={full} isShown={!isBriefShown} isBrief={false} />
      <Face {...data} built={brief} isShown={isBriefShown} isBrief />
    </>
  );
});

interface FaceProps extends PictureData {
  /** How many ribbons and plates are there yet, from the foot upwards. */
  built: number;
  isShown: boolean;
  isBrief: boolean;
}

const Face = memo(function Face({ list, selected, built, isShown, isBrief }: FaceProps) {
  // The widest first: what is drawn later lies above, and a thin line's label stays readable.
  const ribbons = useMemo(() => list.ribbons.toSorted((a, b) => b.width - a.width), [list]);
  const turns = useMemo(() => turnsFromFoot(list), [list]);
  if (built === 0) return null;
  const isBuilt = ({ id }: { id: string }) => turns.get(id)! < built;
  return (
    <svg
      width={list.width}
      height={list.height}
      className={`absolute top-0 left-0 overflow-visible ${isShown ? '' : 'opacity-0'}`}
      aria-hidden="true"
    >
      {ribbons.filter(isBuilt).map((ribbon) => (
        <RibbonView key={ribbon.id} isSelected={selected.has(ribbon.id)} {...{ ribbon, isBrief }} />
      ))}
      {list.plates.filter(isBuilt).map((plate) => (
        <PlateView key={plate.id} isSelected={selected.has(plate.id)} {...{ plate, isBrief }} />
      ))}
    </svg>
  );
});

/** The place of each plate and ribbon when all are counted from the foot upwards: there the drawing is opened. */
function turnsFromFoot({ plates, ribbons }: DisplayList): ReadonlyMap<string, number> {
  const feet = [
    ...plates.map(({ id, y }) => ({ id, y })),
    ...ribbons.map(({ id, ends }) => ({ id, y: ends[1].y })),
  ];
  return new Map(feet.toSorted((a, b) => b.y - a.y).map(({ id }, turn) => [id, turn]));
}

interface RibbonViewProps {
  ribbon: Ribbon;
  isSelected: boolean;
  isBrief: boolean;
}

/** A link, in the shapes that every export draws. */
const RibbonView = memo(function RibbonView({ ribbon, isSelected, isBrief }: RibbonViewProps) {
  const shapes = useMemo(
    () => (isBrief ? briefRibbon(ribbon) : ribbonFigure(ribbon).shapes),
    [ribbon, isBrief],
  );
  return (
    <g data-ribbon={ribbon.id}>
      {isSelected && (
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

interface PlateViewProps {
  plate: Plate;
  isSelected: boolean;
  isBrief: boolean;
}

/** A plate, in the shapes that every export draws; small in its frame, only its number and state. */
const PlateView = memo(function PlateView({ plate, isSelected, isBrief }: PlateViewProps) {
  const shapes = useMemo(() => (isBrief ? briefPlate(plate) : plateFigure(plate).shapes), [plate, isBrief]);
  const { x, y, node } = plate;
  return (
    <g data-plate-drawn={plate.id}>
      <ShapesView shapes={shapes} />
      {node.type === 'group' && !isBrief && <OpenSign x={x + PLATE.width - 24} y={y + PLATE.height - 24} />}
      {isSelected && (
        <rect
          x={x - 3}
          y={y - 3}
          width={PLATE.width + 6}
          height={PLATE.height + 6}
          fill="none"
          className="stroke-brass"
          strokeWidth="2"
        />
      )}
    </g>
  );
});

/** That a press opens the group in place; said on the screen only. */
function OpenSign({ x, y }: { x: number; y: number }) {
  return (
    <>
      <rect x={x + 0.5} y={y + 0.5} width="15" height="15" className="fill-raised stroke-brass" />
      <path
        d={`M${x + 8} ${y + 4}v8M${x + 4} ${y + 8}h8`}
        fill="none"
        className="stroke-brass"
        strokeWidth="1.5"
      />
    </>
  );
}
