import { shareText } from '#shared/numbers/share-text.ts';
import type { Plate } from './display-list.ts';
import { PLATE } from './geometry.ts';
import type { Ink } from './inks.ts';
import { stubShapes } from './stub-shapes.ts';
import type { Figure, Shape, TextSpan } from './shapes.ts';
import { STATE_GLYPHS, STATE_INKS } from './state-glyphs.ts';
import { cutToFit, sizeToFit, textWidth, type Face } from './text-width.ts';

const PADDING = 8;
const ROOM = PLATE.width - 2 * PADDING;
/** Baselines of the lines of a plate, from its top. */
const LINES = { first: 18, second: 38, third: 57, fourth: 75 } as const;
const SIZE = { number: 13, small: 12, value: 15.4, least: 9 } as const;
const GLYPH = { size: 12, room: 16 } as const;

/** A value of the chain, an effect it shares or a group, as a plate; what it adds of its own enters from the left. */
export function plateFigure(plate: Plate): Figure {
  return {
    kind: 'plate',
    id: plate.id,
    title: titleOf(plate),
    shapes: [
      ...stubShapes(plate),
      ...looseEnd(plate),
      ...outline(plate),
      ...headLine(plate),
      ...(plate.node.type === 'source' ? effectName(plate) : [...valueLine(plate), ...footLine(plate)]),
      ...standing(plate),
      ...noticed(plate),
    ],
  };
}

function outline(plate: Plate): Shape[] {
  const { x, y, rule } = plate;
  const isBrass = plate.isFocus || plate.isSecond;
  const ink: Ink = isBrass ? 'brass' : 'ink';
  const box = (inset: number, width: number, dash?: readonly number[]): Shape => ({
    kind: 'rect',
    x: x + inset,
    y: y + inset,
    width: PLATE.width - 2 * inset,
    height: PLATE.height - 2 * inset,
    fill: 'raised',
    stroke: { ink, width, ...(dash && { dash }) },
  });
  const sheet = (by: number): Shape => ({
    kind: 'rect',
    x: x + 0.5 + by,
    y: y + 0.5 - by,
    width: PLATE.width - 1,
    height: PLATE.height - 1,
    fill: 'raised',
    stroke: { ink: 'ink', width: 1 },
  });
  const ring: Shape[] = plate.isShared
    ? [{ ...(box(-3.5, 2) as Extract<Shape, { kind: 'rect' }>), stroke: { ink: 'brass', width: 2 } }]
    : [];
  if (rule === 'dashed') return [...ring, box(0.5, 1, [3, 2])];
  if (rule === 'double') return [...ring, box(0.5, 1), box(3, 1)];
  if (rule === 'pile') return [...ring, sheet(6), sheet(3), box(0.5, 1)];
  return [...ring, box(isBrass ? 1 : 0.5, isBrass ? 2 : 1)];
}

/** Registry number or laboratory at the left; what it is at the right, smaller or cut where it would run over. */
function headLine(plate: Plate): Shape[] {
  const face: Face = plate.node.type === 'group' ? 'sans' : 'mono';
  const corner = textWidth(plate.corner, 'sans', SIZE.small);
  const isLong = plate.node.type === 'group';
  const name = cutToFit(plate.name, face, SIZE.number, isLong ? ROOM - corner - 8 : ROOM);
  const room = ROOM - textWidth(name, face, SIZE.number) - 6;
  const size = sizeToFit([{ text: plate.corner, face: 'sans' }], SIZE.small, room, SIZE.least);
  const what = cutToFit(plate.corner, 'sans', size, room);
  return [
    line(plate, LINES.first, [{ text: name, face, size: SIZE.number, ink: 'ink' }]),
    ...(room < 12 ? [] : [endLine(plate, LINES.first, [{ text: what, face: 'sans', size, ink: 'ink-2' }])]),
  ];
}

function valueLine(plate: Plate): Shape[] {
  if (plate.value.length === 0) return [];
  const pieces = plate.value.map(({ text }) => ({ text, face: 'serif' as Face }));
  const size = sizeToFit(pieces, SIZE.value, ROOM, SIZE.least);
  return [
    line(
      plate,
      LINES.second,
      plate.value.map((span) => ({
        text: span.text,
        face: 'serif',
        size,
        ink: span.isBeyond ? 'ink-3' : 'ink',
      })),
    ),
  ];
}

function footLine(plate: Plate): Shape[] {
  const size = sizeToFit([{ text: plate.foot, face: 'sans' }], SIZE.small, ROOM, 11);
  const text = cutToFit(plate.foot, 'sans', size, ROOM);
  return [line(plate, LINES.third, [{ text, face: 'sans', size, ink: 'ink-2' }])];
}

/** How it stands: a mark and a word. */
function standing(plate: Plate): Shape[] {
  if (plate.stands === null) return [];
  const ink = STATE_INKS[plate.state];
  const glyph: Shape = {
    kind: 'path',
    d: STATE_GLYPHS[plate.state],
    at: {
      x: plate.x + PADDING - 1,
      y: plate.y + LINES.fourth - GLYPH.size + 2,
      scale: GLYPH.size / 14,
    },
    stroke: { ink, width: 1.6, ...(plate.state === 'not judged' && { dash: [2.2, 1.6] }) },
  };
  const text = cutToFit(plate.stands, 'sans', SIZE.small, ROOM - GLYPH.room);
  return [
    glyph,
    {
      kind: 'text',
      x: plate.x + PADDING + GLYPH.room,
      y: plate.y + LINES.fourth,
      anchor: 'start',
      spans: [{ text, face: 'sans', size: SIZE.small, ink }],
    },
  ];
}

function effectName(plate: Plate): Shape[] {
  const [first, second] = twoLines(plate.foot);
  const small = (text: string): TextSpan[] => [{ text, face: 'sans', size: SIZE.small, ink: 'ink' }];
  return [
    line(plate, LINES.second + 4, small(first)),
    ...(second === '' ? [] : [line(plate, LINES.third + 4, small(second))]),
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

/** Where a chain ends without a root: a line that leads nowhere, a cross and the reason. */
function looseEnd(plate: Plate): Shape[] {
  if (plate.looseEnd === null) return [];
  const x = plate.x + PLATE.width / 2;
  return [
    {
      kind: 'path',
      d: `M${x},${plate.y}v-9M${x - 4},${plate.y - 19}l8,8m0,-8l-8,8`,
      stroke: { ink: 'broken', width: 2 },
    },
    {
      kind: 'text',
      x,
      y: plate.y - 24,
      anchor: 'middle',
      spans: [{ text: plate.looseEnd, face: 'sans', size: SIZE.small, ink: 'broken' }],
      halo: 'paper',
    },
  ];
}

/** A word on the plate's lower edge, with a mark: colour alone says nothing. */
function noticed(plate: Plate): Shape[] {
  if (plate.mark === null) return [];
  const edge = plate.y + PLATE.height;
  const width = textWidth(plate.mark, 'sans', SIZE.small) + 20;
  const x = plate.x + PLATE.width - PADDING - width;
  return [
    { kind: 'rect', x, y: edge - 9, width, height: 17, fill: 'raised' },
    { kind: 'path', d: 'M4 0 8 4 4 8 0 4Z', at: { x: x + 4, y: edge - 4.5 }, fill: 'brass' },
    {
      kind: 'text',
      x: x + 16,
      y: edge + 4,
      anchor: 'start',
      spans: [{ text: plate.mark, face: 'sans', size: SIZE.small, ink: 'brass' }],
    },
  ];
}

function line(plate: Plate, baseline: number, spans: TextSpan[]): Shape {
  return { kind: 'text', x: plate.x + PADDING, y: plate.y + baseline, anchor: 'start', spans };
}

function endLine(plate: Plate, baseline: number, spans: TextSpan[]): Shape {
  return { kind: 'text', x: plate.x + PLATE.width - PADDING, y: plate.y + baseline, anchor: 'end', spans };
}

/** The plate in words. */
function titleOf({ node, name, corner, value, foot, stands, isFocus, mark, looseEnd: end }: Plate): string {
  const noticedWord = mark === null ? '' : `; ${mark}`;
  if (node.type === 'source') return `Shared effect: ${node.name}${noticedWord}`;
  const share = node.share === null ? '' : `; ${shareText(node.share)} of the variance passes through it`;
  const rest = `${stands}${share}${end === null ? '' : `; ${end}`}${noticedWord}`;
  if (node.type === 'group')
    return `Group of ${corner}, ${[name, node.common, foot].filter(Boolean).join(', ')}; ${rest}`;
  const subject = isFocus ? 'The weight itself: ' : '';
  const written = value.map(({ text }) => text).join('');
  return `${subject}${name}, certificate ${node.certificateNo}, ${corner}, ${written}, ${foot}, ${rest}`;
}
