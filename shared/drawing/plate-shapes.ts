import { nominalUnit } from '#shared/numbers/nominal.ts';
import { quantitySpans } from '#shared/numbers/ink-spans.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import type { Plate, Stub } from './display-list.ts';
import { PLATE } from './geometry.ts';
import type { Ink } from './inks.ts';
import type { Figure, Shape, TextSpan } from './shapes.ts';
import { STATE_GLYPHS, STATE_INKS } from './state-glyphs.ts';
import { cutToFit, sizeToFit, textWidth, type Face } from './text-width.ts';

type ValueNode = Extract<Plate['node'], { type: 'value' }>;
type SourceNode = Extract<Plate['node'], { type: 'source' }>;

const PADDING = 8;
const ROOM = PLATE.width - 2 * PADDING;
/** Baselines of the three lines of a plate, from its top. */
const LINES = { first: 18, second: 41, third: 61 } as const;
const SIZE = { number: 13, small: 12, value: 15.4, least: 9 } as const;
const MARK = { size: 12, room: 16 } as const;
const STUB_LENGTH = 34;

/** A value of the chain, or an effect it shares, as a plate; what it adds of its own enters from the left. */
export function plateFigure(plate: Plate): Figure {
  const face = plate.node.type === 'value' ? valueFace(plate, plate.node) : sourceFace(plate, plate.node);
  return {
    kind: 'plate',
    id: plate.id,
    title: titleOf(plate),
    isFaint: plate.isFaint,
    shapes: [...(plate.stub ? stubShapes(plate, plate.stub) : []), ...frame(plate), ...face],
  };
}

function frame(plate: Plate): Shape[] {
  const { x, y, node } = plate;
  const ink: Ink = plate.isFocus ? 'brass' : 'ink';
  const isRoot = node.type === 'value' && node.rootKind !== null;
  const box = (inset: number, width: number, dash?: readonly number[]): Shape => ({
    kind: 'rect',
    x: x + inset,
    y: y + inset,
    width: PLATE.width - 2 * inset,
    height: PLATE.height - 2 * inset,
    fill: 'raised',
    stroke: { ink, width, ...(dash && { dash }) },
  });
  if (node.type === 'source') return [box(0.5, 1, [3, 2])];
  if (isRoot) return [box(0.5, 1), box(3, 1)];
  return [box(plate.isFocus ? 1 : 0.5, plate.isFocus ? 2 : 1)];
}

function valueFace(plate: Plate, node: ValueNode): Shape[] {
  return [
    ...headLine(plate, node.registryNo, node.rootKind ?? nominalAndClass(node)),
    ...valueLine(plate, node),
    stateMark(plate),
    ...footLine(plate, node),
  ];
}

/** The registry number at the left; what it is at the right, smaller or cut where it would run over. */
function headLine(plate: Plate, left: string, right: string): Shape[] {
  const number = cutToFit(left, 'mono', SIZE.number, ROOM);
  const room = ROOM - textWidth(number, 'mono', SIZE.number) - 6;
  const size = sizeToFit([{ text: right, face: 'sans' }], SIZE.small, room, SIZE.least);
  const what = cutToFit(right, 'sans', size, room);
  return [
    line(plate, LINES.first, [{ text: number, face: 'mono', size: SIZE.number, ink: 'ink' }]),
    ...(room < 12 ? [] : [endLine(plate, LINES.first, [{ text: what, face: 'sans', size, ink: 'ink-2' }])]),
  ];
}

function valueLine(plate: Plate, node: ValueNode): Shape[] {
  const spans = quantitySpans({
    value: node.deviation,
    expandedUncertainty: node.expandedU,
    coverageFactor: node.k,
    kind: 'deviation',
    shownIn: 'auto',
  });
  const pieces = spans.map(({ text }) => ({ text, face: 'serif' as Face }));
  const size = sizeToFit(pieces, SIZE.value, ROOM - MARK.room, SIZE.least);
  return [
    line(
      plate,
      LINES.second,
      spans.map((span) => ({ text: span.text, face: 'serif', size, ink: span.isBeyond ? 'ink-3' : 'ink' })),
    ),
  ];
}

function stateMark(plate: Plate): Shape {
  const at = { x: plate.x + PLATE.width - PADDING - MARK.size, y: plate.y + LINES.second - MARK.size + 1 };
  return {
    kind: 'path',
    d: STATE_GLYPHS[plate.state],
    at: { ...at, scale: MARK.size / 14 },
    stroke: {
      ink: STATE_INKS[plate.state],
      width: 1.6,
      ...(plate.state === 'not judged' && { dash: [2.2, 1.6] }),
    },
  };
}

const STANDING: Readonly<Record<ValueNode['state'], { text: string; ink: Ink }>> = {
  'in force': { text: '', ink: 'ink-2' },
  superseded: { text: 'superseded', ink: 'caution' },
  withdrawn: { text: 'withdrawn', ink: 'broken' },
  'not yet in force': { text: 'not yet', ink: 'unjudged' },
};

/** Day and issuer; the issuer's code where its name would run over, and the standing where it is not in force. */
function footLine(plate: Plate, node: ValueNode): Shape[] {
  const standing = STANDING[node.state];
  const taken = standing.text === '' ? 0 : textWidth(standing.text, 'sans', SIZE.small) + 6;
  const day = datedTo(node.performedEnd, node.datePrecision);
  const full = `${day} · ${node.issuer.name}`;
  const isRoomy = taken === 0 && textWidth(full, 'sans', SIZE.small) <= ROOM;
  const text = isRoomy ? full : cutToFit(`${day} · ${node.issuer.code}`, 'sans', SIZE.small, ROOM - taken);
  const small = (words: string, ink: Ink): TextSpan[] => [
    { text: words, face: 'sans', size: SIZE.small, ink },
  ];
  return [
    line(plate, LINES.third, small(text, 'ink-2')),
    ...(taken === 0 ? [] : [endLine(plate, LINES.third, small(standing.text, standing.ink))]),
  ];
}

function sourceFace(plate: Plate, node: SourceNode): Shape[] {
  const [first, second] = twoLines(node.name);
  const small = (text: string): TextSpan[] => [{ text, face: 'sans', size: SIZE.small, ink: 'ink' }];
  return [
    ...headLine(plate, node.registryNo ?? node.kind, 'shared effect'),
    line(plate, second === '' ? LINES.second + 8 : LINES.second - 1, small(first)),
    ...(second === '' ? [] : [line(plate, LINES.third - 3, small(second))]),
  ];
}

/** A name over at most two lines, cut at its end where it is longer. */
function twoLines(name: string): [string, string] {
  const fits = (text: string) => textWidth(text, 'sans', SIZE.small) <= ROOM;
  if (fits(name)) return [name, ''];
  const words = name.split(' ');
  let first = '';
  while (words.length > 0 && fits(`${first} ${words[0]}`.trim())) first = `${first} ${words.shift()}`.trim();
  if (first === '') return [cutToFit(name, 'sans', SIZE.small, ROOM), ''];
  return [first, cutToFit(words.join(' '), 'sans', SIZE.small, ROOM)];
}

function stubShapes(plate: Plate, stub: Stub): Shape[] {
  const height = stub.height ?? 14;
  const x = plate.x - STUB_LENGTH;
  const middle = plate.y + PLATE.height / 2;
  const dashed: Ink = stub.height === null ? 'ink-3' : 'ink-2';
  const isOutlined = stub.height === null || stub.isNegative;
  const text = stub.share === null ? '?' : stub.isToScale ? shareText(stub.share, '.', 0) : '';
  return [
    {
      kind: 'rect',
      x,
      y: middle - height / 2,
      width: STUB_LENGTH,
      height,
      ...(isOutlined
        ? { stroke: { ink: dashed, width: 1, dash: [3, 2] } }
        : { fill: stub.isToScale ? ('local' as Ink) : ('ink-3' as Ink) }),
    },
    ...(text === ''
      ? []
      : [
          {
            kind: 'text',
            x: x - 4,
            y: middle + 4,
            anchor: 'end',
            spans: [{ text, face: 'mono', size: 11, ink: 'ink-2' }],
          } satisfies Shape,
        ]),
  ];
}

function line(plate: Plate, baseline: number, spans: TextSpan[]): Shape {
  return { kind: 'text', x: plate.x + PADDING, y: plate.y + baseline, anchor: 'start', spans };
}

function endLine(plate: Plate, baseline: number, spans: TextSpan[]): Shape {
  return { kind: 'text', x: plate.x + PLATE.width - PADDING, y: plate.y + baseline, anchor: 'end', spans };
}

function nominalAndClass(node: ValueNode): string {
  const nominal = quantitySpans({ value: node.nominal, shownIn: nominalUnit(node.nominal) });
  return nominal.map(({ text }) => text).join('') + (node.class ? ` ${node.class}` : '');
}

/** A date no more exact than it is known. */
export function datedTo(day: string, precision: 'day' | 'month' | 'year'): string {
  return { day, month: day.slice(0, 7), year: day.slice(0, 4) }[precision];
}

function titleOf({ node, state, isFocus }: Plate): string {
  if (node.type === 'source') return `Shared effect: ${node.name}`;
  const value = quantitySpans({
    value: node.deviation,
    expandedUncertainty: node.expandedU,
    coverageFactor: node.k,
    kind: 'deviation',
    shownIn: 'auto',
  });
  const share = node.share === null ? '' : `; ${shareText(node.share)} of the variance passes through it`;
  const subject = isFocus ? 'The weight itself: ' : '';
  return `${subject}${node.registryNo}, certificate ${node.certificateNo}, ${value.map(({ text }) => text).join('')}, ${state}, ${node.state}${share}`;
}
