import { boxHatching, ribbonHatching, ribbonOutline } from './hatching.ts';
import type { LegendSign } from './legend.ts';
import type { Shape } from './shapes.ts';

/** Size of a sample, px. */
export const SAMPLE = { width: 34, height: 16 } as const;

const MIDDLE = SAMPLE.height / 2;
const LINE = `M0,${MIDDLE}H${SAMPLE.width}`;
const ENDS = [
  { x: 0, y: MIDDLE },
  { x: SAMPLE.width, y: MIDDLE },
] as const;

/** A small sample of a sign, its left upper corner at the origin. */
export function legendSample(sign: LegendSign): Shape[] {
  return SAMPLES[sign];
}

function stroke(
  d: string,
  ink: 'flow' | 'ink-2' | 'ink-3' | 'brass' | 'broken' | 'caution',
  width: number,
): Shape {
  return { kind: 'path', d, stroke: { ink, width } };
}

function box(inset: number, ink: 'ink' | 'brass', by = 0): Shape {
  return {
    kind: 'rect',
    x: 6 + inset + by,
    y: 2 + inset - by,
    width: 20 - 2 * inset,
    height: 12 - 2 * inset,
    fill: 'raised',
    stroke: { ink, width: 1 },
  };
}

const SAMPLES: Readonly<Record<LegendSign, Shape[]>> = {
  flow: [stroke(LINE, 'flow', 9)],
  hairline: [stroke(LINE, 'ink-3', 1)],
  negative: [{ kind: 'path', d: ribbonOutline(ENDS, 9), stroke: { ink: 'ink-2', width: 1.2, dash: [5, 3] } }],
  informing: [{ kind: 'path', d: LINE, stroke: { ink: 'ink-3', width: 1.5, dash: [1, 5], isRound: true } }],
  beside: [{ kind: 'path', d: LINE, stroke: { ink: 'brass', width: 1, dash: [8, 3, 2, 3] } }],
  broken: [
    stroke(`M0,${MIDDLE}H9M25,${MIDDLE}H34`, 'flow', 7),
    stroke('M13 4L21 12M21 4L13 12', 'broken', 2),
  ],
  caution: [stroke(LINE, 'flow', 9), stroke(ribbonHatching(ENDS, 9), 'caution', 1.2)],
  'own part': [
    { kind: 'rect', x: 0, y: 3, width: 22, height: 10, fill: 'local' },
    { kind: 'path', d: 'M22.5,0V16', stroke: { ink: 'ink', width: 1 } },
  ],
  'unknown part': [
    { kind: 'rect', x: 0.5, y: 1.5, width: 33, height: 13, stroke: { ink: 'ink-3', width: 1 } },
    { kind: 'path', d: boxHatching(33, 13), at: { x: 0.5, y: 1.5 }, stroke: { ink: 'ink-3', width: 1 } },
  ],
  root: [box(0, 'ink'), box(2.5, 'ink')],
  group: [box(0, 'ink', 3), box(0, 'ink', 1.5), box(0, 'ink')],
  shared: [
    { kind: 'rect', x: 3, y: 0.5, width: 26, height: 15, stroke: { ink: 'brass', width: 2 } },
    box(0.5, 'ink'),
  ],
};
