import { describe, expect, it } from 'vitest';
import { asDrawn } from './as-drawn.ts';
import { displayList, type DisplayList } from './display-list.ts';
import type { DrawingQuestion } from './drawing-question.ts';
import { generatedChain } from './generated-chain.ts';
import { PLATE, SCALE } from './geometry.ts';
import { LAMP, PAPER } from './inks.ts';
import { layoutInput } from './layout-of.ts';
import { layoutChain } from './layout.ts';
import { pictureOf } from './picture.ts';
import type { Picture, Shape } from './shapes.ts';
import { textWidth } from './text-width.ts';
import { toSvg } from './to-svg.ts';

const QUESTION: DrawingQuestion = { draw: 'flow', verdict: 'today', effects: 'all' };
const WORDS = {
  title: 'A chain',
  description: 'For a test',
  caption: ['What was asked. '.repeat(20).trim()],
};

function drawn(plates: number, question = QUESTION): { list: DisplayList; picture: Picture } {
  const { chain } = asDrawn(generatedChain({ plates }), question);
  const list = displayList(chain, layoutChain(layoutInput(chain, question.draw)), question);
  return { list, picture: pictureOf(list, WORDS) };
}

/** The elements of well-formed XML without entities of its own; throws on the first that is not closed. */
function elementsOf(xml: string): { name: string; attributes: Record<string, string>; text: string }[] {
  const open: string[] = [];
  const found: { name: string; attributes: Record<string, string>; text: string }[] = [];
  const pattern = /<(\/?)([\w:]+)((?:\s+[\w:-]+="[^"<]*")*)\s*(\/?)>|([^<]+)/g;
  let end = 0;
  for (const match of xml.matchAll(pattern)) {
    if (match.index !== end) throw new Error(`Not XML at ${xml.slice(end, end + 60)}`);
    end += match[0].length;
    const [, closes, name = '', attributes = '', isEmpty, text] = match;
    if (text !== undefined) {
      if (/&(?!(amp|lt|gt|quot);)/.test(text)) throw new Error(`A bare ampersand in ${text}`);
      found.at(-1)!.text += text;
    } else if (closes) {
      const last = open.pop();
      if (last !== name) throw new Error(`</${name}> closes ${last}`);
    } else {
      const pairs = [...attributes.matchAll(/([\w:-]+)="([^"]*)"/g)].map(([, key, value]) => [key, value]);
      if (new Set(pairs.map(([key]) => key)).size !== pairs.length)
        throw new Error(`Twice in <${name}${attributes}>`);
      found.push({ name, attributes: Object.fromEntries(pairs), text: '' });
      if (!isEmpty) open.push(name);
    }
  }
  if (end !== xml.length || open.length > 0) throw new Error(`Not closed: ${open.join(' ')}`);
  return found;
}

/** The box around a shape, as far as its anchor points say. */
function boxOf(shape: Shape): { left: number; right: number; top: number; bottom: number } {
  if (shape.kind === 'rect')
    return { left: shape.x, right: shape.x + shape.width, top: shape.y, bottom: shape.y + shape.height };
  if (shape.kind === 'circle') {
    const { x, y, radius } = shape;
    return { left: x - radius, right: x + radius, top: y - radius, bottom: y + radius };
  }
  if (shape.kind === 'text') {
    const width = shape.spans.reduce((sum, span) => sum + textWidth(span.text, span.face, span.size), 0);
    const left = shape.x - { start: 0, middle: width / 2, end: width }[shape.anchor];
    const size = Math.max(...shape.spans.map((span) => span.size));
    return { left, right: left + width, top: shape.y - size, bottom: shape.y + size * 0.3 };
  }
  if (shape.at) return { left: shape.at.x, right: shape.at.x, top: shape.at.y, bottom: shape.at.y };
  const [xs, ys] = [[], []] as [number[], number[]];
  for (const [, x, y] of shape.d.matchAll(/(-?[\d.]+)[, ](-?[\d.]+)/g)) {
    xs.push(Number(x));
    ys.push(Number(y));
  }
  return { left: Math.min(...xs), right: Math.max(...xs), top: Math.min(...ys), bottom: Math.max(...ys) };
}

describe('a drawing as SVG', () => {
  it.each([11, 40, 120])('is well-formed and holds every plate and ribbon of %i', (plates) => {
    const { list, picture } = drawn(plates);
    const elements = elementsOf(toSvg(picture, { inks: PAPER, hasGround: true, fontRules: '@font-face{}' }));
    const named = (kind: string) => elements.flatMap(({ attributes }) => attributes[`data-${kind}`] ?? []);
    expect(new Set(named('plate'))).toEqual(new Set(list.plates.map(({ id }) => id)));
    expect(new Set(named('ribbon'))).toEqual(new Set(list.ribbons.map(({ id }) => id)));
    expect(elements.filter(({ name }) => name === 'title')[0]!.text).toBe('A chain');
    expect(elements.filter(({ name }) => name === 'desc')[0]!.text).toBe('For a test');
  });

  it.each([
    ['flow', 60],
    ['plain', 60],
  ] as const)('draws nothing outside its box (%s)', (draw, plates) => {
    const { picture } = drawn(plates, { ...QUESTION, draw });
    for (const shape of picture.figures.flatMap(({ shapes }) => shapes)) {
      const box = boxOf(shape);
      expect(box.left).toBeGreaterThanOrEqual(picture.x);
      expect(box.right).toBeLessThanOrEqual(picture.x + picture.width);
      expect(box.top).toBeGreaterThanOrEqual(picture.y);
      expect(box.bottom).toBeLessThanOrEqual(picture.y + picture.height);
    }
  });

  it('lets no text run over its plate', () => {
    const { list, picture } = drawn(120);
    const byId = new Map(picture.figures.map((figure) => [figure.id, figure]));
    for (const plate of list.plates) {
      for (const shape of byId.get(plate.id)!.shapes) {
        if (shape.kind !== 'text' || shape.x < plate.x) continue;
        const box = boxOf(shape);
        expect(box.left).toBeGreaterThanOrEqual(plate.x);
        expect(box.right).toBeLessThanOrEqual(plate.x + PLATE.width + 1e-6);
      }
    }
  });

  it('strokes a ribbon as wide as its flow, and says which are not to scale', () => {
    const { list, picture } = drawn(60);
    const byId = new Map(picture.figures.map((figure) => [figure.id, figure]));
    const solid = list.ribbons.filter((ribbon) => ribbon.look === 'solid' && ribbon.isToScale);
    expect(solid.length).toBeGreaterThan(3);
    for (const ribbon of solid) {
      const strokes = byId
        .get(ribbon.id)!
        .shapes.flatMap((shape) =>
          shape.kind === 'path' && shape.stroke?.ink === 'flow' ? [shape.stroke] : [],
        );
      expect(strokes.length).toBeGreaterThan(0);
      for (const stroke of strokes) expect(stroke.width).toBeCloseTo(Math.abs(ribbon.link.flow!) * SCALE, 6);
    }
    for (const ribbon of list.ribbons.filter(({ isToScale }) => !isToScale)) expect(ribbon.width).toBe(1);
  });

  it('conserves the flow at every plate that is drawn', () => {
    const { list } = drawn(60);
    for (const plate of list.plates) {
      if (plate.node.type !== 'value' || plate.node.rootKind !== null || plate.node.share === null) continue;
      const entering = list.ribbons
        .filter(({ link }) => link.childUid === plate.id)
        .reduce((sum, { link }) => sum + (link.flow ?? 0), 0);
      expect(entering + (plate.stub?.share ?? 0)).toBeCloseTo(plate.node.share, 9);
    }
  });

  it('writes the inks it is given, and spells out what markup would take for its own', () => {
    const { list } = drawn(11);
    const words = { title: 'A & B <1 "kg">', description: 'a\u0000b' };
    const svg = toSvg(pictureOf(list, words), { inks: LAMP, hasGround: true });
    expect(svg).toContain(LAMP.raised);
    expect(svg).not.toContain(PAPER.paper);
    expect(elementsOf(svg).find(({ name }) => name === 'title')!.text).toBe(
      'A &amp; B &lt;1 &quot;kg&quot;&gt;',
    );
    expect(svg).not.toContain('\u0000');
  });
});
