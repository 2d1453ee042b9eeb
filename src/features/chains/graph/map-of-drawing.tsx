import { memo, type MouseEvent } from 'react';
import type { ReactFlowInstance } from 'reactflow';
import type { DisplayList, Plate } from '#shared/drawing/display-list.ts';
import { PLATE } from '#shared/drawing/geometry.ts';
import { windowTransform } from './use-motion.ts';
import { boundsOf } from './view-of.ts';

/** The map fits a box of this size, px. */
const MAP = { width: 200, height: 140 } as const;

interface MapOfDrawingProps {
  list: DisplayList;
  frame: { width: number; height: number };
  instance: ReactFlowInstance;
}

/** Where the frame stands in a drawing larger than itself; for the pointer only: a press goes there. */
export const MapOfDrawing = memo(function MapOfDrawing({ list, frame, instance }: MapOfDrawingProps) {
  const bounds = boundsOf(list);
  const scale = Math.min(MAP.width / bounds.width, MAP.height / bounds.height);
  const goTo = (event: MouseEvent<HTMLDivElement>) => {
    const map = event.currentTarget.getBoundingClientRect();
    const { zoom } = instance.getViewport();
    instance.setCenter((event.clientX - map.left) / scale + bounds.left, (event.clientY - map.top) / scale, {
      zoom,
    });
  };
  const data = { left: bounds.left, scale };
  return (
    <div
      aria-hidden="true"
      onClick={goTo}
      className="absolute right-3 bottom-3 z-5 overflow-hidden border border-rule bg-raised max-sm:hidden"
      style={{ width: bounds.width * scale, height: bounds.height * scale }}
    >
      <svg
        width="100%"
        height="100%"
        viewBox={`${bounds.left} 0 ${bounds.width} ${bounds.height}`}
        className="block"
      >
        {list.plates.map((plate) => (
          <rect
            key={plate.id}
            x={plate.x}
            y={plate.y}
            width={PLATE.width}
            height={PLATE.height}
            className={inkOf(plate)}
          />
        ))}
      </svg>
      <div
        data-map-window=""
        data-left={data.left}
        data-scale={data.scale}
        className="absolute top-0 left-0 origin-top-left bg-brass/20 outline-brass will-change-transform"
        style={{
          width: frame.width * scale,
          height: frame.height * scale,
          transform: windowTransform(
            { left: String(data.left), scale: String(scale) },
            instance.getViewport(),
          ),
        }}
      />
    </div>
  );
});

/** Broken plates and the weight itself can be found in the map. */
function inkOf({ state, isFocus }: Plate): string {
  if (isFocus) return 'fill-brass';
  return state === 'broken' ? 'fill-broken' : 'fill-ink-3';
}
