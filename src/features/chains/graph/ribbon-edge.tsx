import { memo } from 'react';
import type { EdgeProps } from 'reactflow';
import { usePreferences } from '#src/lib/preferences.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import type { Ribbon } from '#shared/drawing/display-list.ts';

export interface RibbonData {
  ribbon: Ribbon;
  isSelected: boolean;
}

/** Radius of the opening in a broken link, beyond half its width. */
const OPENING = 8;
const MARKS = { broken: 'M-4 -4L4 4M4 -4L-4 4', caution: 'M0 -5L5 4H-5Z' } as const;

/** A link as wide as what flows through it: broken in its middle where a check fails, hatched where one warns. */
export const RibbonEdge = memo(function RibbonEdge({ data }: EdgeProps<RibbonData>) {
  if (!data) return null;
  const { ribbon, isSelected } = data;
  return (
    <g className={ribbon.isFaint ? 'opacity-25' : ''}>
      <title>{titleOf(ribbon)}</title>
      <path d={ribbon.path} fill="none" stroke="transparent" strokeWidth={Math.max(14, ribbon.width)} />
      <path d={ribbon.path} fill="none" {...strokeOf(ribbon, isSelected)} />
      {ribbon.isNegative && ribbon.width > 3 && (
        <path d={ribbon.path} fill="none" className="stroke-paper" strokeWidth={ribbon.width - 2} />
      )}
      {ribbon.state === 'caution' && (
        <path
          d={ribbon.path}
          fill="none"
          className="stroke-caution"
          strokeWidth={Math.max(3, ribbon.width)}
          strokeDasharray="1.5 7"
        />
      )}
      <MiddleMark ribbon={ribbon} />
      <Label ribbon={ribbon} />
      <Noticed ribbon={ribbon} />
    </g>
  );
});

function strokeOf(ribbon: Ribbon, isSelected: boolean) {
  if (ribbon.isInforming)
    return {
      className: 'stroke-ink-3',
      strokeWidth: 1.5,
      strokeDasharray: '1 5',
      strokeLinecap: 'round' as const,
    };
  if (ribbon.isNegative)
    return {
      className: 'stroke-ink-2',
      strokeWidth: Math.max(1, ribbon.width),
      strokeDasharray: '6 4',
    };
  if (isSelected) return { className: 'stroke-brass', strokeWidth: Math.max(2, ribbon.width) };
  return { className: ribbon.isToScale ? 'stroke-flow' : 'stroke-ink-3', strokeWidth: ribbon.width };
}

function MiddleMark({ ribbon }: { ribbon: Ribbon }) {
  if (ribbon.state !== 'broken' && ribbon.state !== 'caution') return null;
  const { x, y } = ribbon.middle;
  const colour = ribbon.state === 'broken' ? 'stroke-broken' : 'stroke-caution';
  return (
    <g transform={`translate(${x} ${y})`}>
      {ribbon.state === 'broken' && <circle r={ribbon.width / 2 + OPENING} className="fill-paper" />}
      {ribbon.state === 'caution' && <circle r={8} className="fill-paper" />}
      <path d={MARKS[ribbon.state]} fill="none" className={colour} strokeWidth="2" />
    </g>
  );
}

function Label({ ribbon }: { ribbon: Ribbon }) {
  const { decimalMark } = usePreferences();
  const { flow } = ribbon.link;
  if (flow === null || ribbon.isInforming || !ribbon.isToScale) return null;
  const hasMark = ribbon.state === 'broken' || ribbon.state === 'caution';
  return (
    <text
      x={ribbon.middle.x + (hasMark ? ribbon.width / 2 + OPENING + 4 : 0)}
      y={ribbon.middle.y + 4}
      textAnchor={hasMark ? 'start' : 'middle'}
      className="fill-ink-2 stroke-paper font-mono text-xs"
      strokeWidth="4"
      paintOrder="stroke"
    >
      {shareText(flow, decimalMark, 0)}
    </text>
  );
}

/** A word under the ribbon's middle, with a mark: colour alone says nothing. */
function Noticed({ ribbon }: { ribbon: Ribbon }) {
  if (!ribbon.mark) return null;
  return (
    <g transform={`translate(${ribbon.middle.x} ${ribbon.middle.y + 19})`}>
      <path
        d="M-4 -4 0 -8 4 -4 0 0Z"
        className="fill-brass stroke-paper"
        strokeWidth="3"
        paintOrder="stroke"
      />
      <text x={8} className="fill-brass stroke-paper font-sans text-xs" strokeWidth="4" paintOrder="stroke">
        {ribbon.mark}
      </text>
    </g>
  );
}

function titleOf({ link, isToScale }: Ribbon): string {
  if (link.role === 'informs') return 'Informs the consensus value; nothing flows';
  const share =
    link.flow === null ? 'share not computable' : `${shareText(link.flow, '.', 2)} of the variance`;
  const scale = isToScale || link.flow === null ? '' : ', not to scale';
  return `${share}${scale}; sensitivity ${link.sensitivity.toPrecision(6)}`;
}
