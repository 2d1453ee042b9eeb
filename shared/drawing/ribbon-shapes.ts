import { shareText } from '#shared/numbers/share-text.ts';
import type { Ribbon } from './display-list.ts';
import type { Ink } from './inks.ts';
import type { Figure, Shape } from './shapes.ts';

/** Radius of the opening in a broken link, beyond half its width. */
const OPENING = 8;
const MARKS = { broken: 'M-4 -4L4 4M4 -4L-4 4', caution: 'M0 -5L5 4H-5Z' } as const;

/** A link as wide as what flows through it: broken in its middle where a check fails, hatched where one warns. */
export function ribbonFigure(ribbon: Ribbon): Figure {
  const { path: d, width } = ribbon;
  const shapes: Shape[] = [{ kind: 'path', d, stroke: strokeOf(ribbon) }];
  if (ribbon.isNegative && width > 3)
    shapes.push({ kind: 'path', d, stroke: { ink: 'paper', width: width - 2 } });
  if (ribbon.state === 'caution')
    shapes.push({ kind: 'path', d, stroke: { ink: 'caution', width: Math.max(3, width), dash: [1.5, 7] } });
  return {
    kind: 'ribbon',
    id: ribbon.id,
    title: titleOf(ribbon),
    isFaint: ribbon.isFaint,
    shapes: [...shapes, ...middleMark(ribbon), ...label(ribbon)],
  };
}

function strokeOf(ribbon: Ribbon): NonNullable<Extract<Shape, { kind: 'path' }>['stroke']> {
  if (ribbon.isInforming) return { ink: 'ink-3', width: 1.5, dash: [1, 5], isRound: true };
  if (ribbon.isNegative) return { ink: 'ink-2', width: Math.max(1, ribbon.width), dash: [6, 4] };
  return { ink: ribbon.isToScale ? 'flow' : 'ink-3', width: ribbon.width };
}

function middleMark(ribbon: Ribbon): Shape[] {
  if (ribbon.state !== 'broken' && ribbon.state !== 'caution') return [];
  const { x, y } = ribbon.middle;
  const radius = ribbon.state === 'broken' ? ribbon.width / 2 + OPENING : OPENING;
  const ink: Ink = ribbon.state;
  return [
    { kind: 'circle', x, y, radius, fill: 'paper' },
    { kind: 'path', d: MARKS[ribbon.state], at: { x, y }, stroke: { ink, width: 2 } },
  ];
}

function label(ribbon: Ribbon): Shape[] {
  const { flow } = ribbon.link;
  if (flow === null || ribbon.isInforming || !ribbon.isToScale) return [];
  const isMarked = ribbon.state === 'broken' || ribbon.state === 'caution';
  return [
    {
      kind: 'text',
      x: ribbon.middle.x + (isMarked ? ribbon.width / 2 + OPENING + 4 : 0),
      y: ribbon.middle.y + 4,
      anchor: isMarked ? 'start' : 'middle',
      spans: [{ text: shareText(flow, '.', 0), face: 'mono', size: 12, ink: 'ink-2' }],
      halo: 'paper',
    },
  ];
}

function titleOf({ link, isToScale, state }: Ribbon): string {
  if (link.role === 'informs') return 'Informs the consensus value; nothing flows';
  const share =
    link.flow === null ? 'share not computable' : `${shareText(link.flow, '.', 2)} of the variance`;
  const scale = isToScale || link.flow === null ? '' : ', not to scale';
  return `${share}${scale}; sensitivity ${link.sensitivity.toPrecision(6)}; ${state}`;
}
