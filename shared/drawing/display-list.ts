import type { ChainResponse } from '#shared/contracts/chains.ts';
import { DOCUMENT_STYLE } from '#shared/numbers/ink-spans.ts';
import type { NumberStyle } from '#shared/numbers/quantity-text.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import type { State } from '#shared/states.ts';
import type { DrawnChain, DrawnLink, DrawnNode } from './drawn-chain.ts';
import { linkKey, type DrawingQuestion } from './drawing-question.ts';
import { BAND, OPENING } from './geometry.ts';
import { ribbonHatching, ribbonOutline } from './hatching.ts';
import { placeLabels, type PlacedLabel, type WantedLabel } from './label-places.ts';
import type { PlacedRibbon, Placement, Point } from './layout-input.ts';
import { ownStates } from './own-states.ts';
import { plateWords, type PlateWords } from './plate-words.ts';
import { brokenPath, ribbonMiddle, ribbonPath } from './ribbon-path.ts';
import { stubOf, type Stub } from './stub.ts';

/** A plate: a value, a shared effect or a group, in its place. `PLATE` says how large it is. */
export interface Plate extends PlateWords {
  id: string;
  x: number;
  y: number;
  node: DrawnNode;
  /** How it is outlined: a root doubly, an effect dashed, a group as the uppermost of a pile. */
  rule: 'single' | 'double' | 'dashed' | 'pile';
  /** The worst of the value's own checks and its standing. */
  state: State;
  isFocus: boolean;
  /** The second of two weights. */
  isSecond: boolean;
  /** Of two weights: only the second leans on it. */
  isBeside: boolean;
  /** Of two weights: both lean on it; ringed in brass, and marked with the word. */
  isShared: boolean;
  stub: Stub | null;
  /** Why the chain has a loose end here, above the plate; null at a root and wherever it goes on. */
  looseEnd: string | null;
  /** One short word set on the plate's edge in brass: what is to be noticed of it. */
  mark: string | null;
}

/** A link as it is drawn. */
export interface Ribbon {
  id: string;
  link: DrawnLink;
  /** Its middle line, whole. */
  path: string;
  /** What is stroked of it: two pieces where it is broken in its middle. */
  strokes: string[];
  /**
   * solid: as wide as its flow; hairline: too thin for the scale, or without flow; negative: dashed, its edges
   * outlined; informing: dotted, nothing flows; beside: of the second weight, dashed hairline without flow.
   */
  look: 'solid' | 'hairline' | 'negative' | 'informing' | 'beside';
  width: number;
  isToScale: boolean;
  isNegative: boolean;
  /** Named above a consensus value, without flow. */
  isInforming: boolean;
  /** Both edges of a negative flow that is wide enough to be outlined. */
  outline: string | null;
  /** Oblique lines across it: a check warns. */
  hatching: string | null;
  state: State;
  middle: Point;
  /** Where it leaves its parent's foot and enters its child's head. */
  ends: [Point, Point];
  /** Its share, in the middle or beside the mark; null where it is not to scale, or would stand on another. */
  label: PlacedLabel | null;
  /** One short word at the ribbon's middle in brass: what is to be noticed of it. */
  mark: string | null;
}

/** Everything that is drawn of a chain, in numbers and words: the screen and every export are made from it. */
export interface DisplayList {
  width: number;
  height: number;
  /** The definition in force when the roots were determined. */
  band: { x: number; width: number; height: number; definition: ChainResponse['definition'] };
  plates: Plate[];
  ribbons: Ribbon[];
}

/** What is to be noticed: a plate's id or a link's key, and one short word. */
export type Marks = ReadonlyMap<string, string>;

const NO_MARKS: Marks = new Map();

/** Puts the chain's facts in the places that the layout found. */
export function displayList(
  chain: DrawnChain,
  placement: Placement,
  question: DrawingQuestion,
  marks: Marks = NO_MARKS,
  style: NumberStyle = DOCUMENT_STYLE,
): DisplayList {
  const around = { chain, question, marks, style };
  const states = ownStates(chain, question.verdict);
  const placeOf = new Map(placement.plates.map((plate) => [plate.id, plate]));
  const leaning = new Set(chain.links.map((link) => link.childUid));
  const labels = labelsOf(placement, around);
  return {
    width: placement.width,
    height: placement.height,
    band: bandOver(placement.width, chain.definition),
    plates: chain.nodes.map((node) => {
      const { x, y } = placeOf.get(node.uid)!;
      const state = node.type === 'group' ? node.state : (states.get(node.uid) ?? 'sound');
      return { ...plateOf(node, state, around), x, y, looseEnd: looseEnd(node, leaning, question) };
    }),
    ribbons: placement.ribbons.map((ribbon, index) => ({
      ...ribbonOf(chain.links[index]!, ribbon, around),
      label: labels[index]!,
    })),
  };
}

interface Around {
  chain: DrawnChain;
  question: DrawingQuestion;
  marks: Marks;
  style: NumberStyle;
}

function plateOf(node: DrawnNode, state: State, { chain, question, marks, style }: Around) {
  const { second } = chain;
  const isShared = second !== null && membersOf(node).some((uid) => second.shared.has(uid));
  const noticed = membersOf(node).flatMap((uid) => marks.get(uid) ?? []);
  return {
    ...plateWords(node, state, style),
    id: node.uid,
    node,
    rule: ruleOf(node),
    state,
    isFocus: node.uid === chain.focusUid,
    isSecond: node.uid === second?.focusUid,
    isBeside: second?.beside.has(node.uid) ?? false,
    isShared,
    stub: stubOf(node, question.draw === 'plain'),
    mark: noticed[0] ?? (node.uid === second?.focusUid ? 'second weight' : isShared ? 'shared' : null),
  };
}

/** A group is marked where one of its members is. */
function membersOf(node: DrawnNode): string[] {
  return node.type === 'group' ? node.members : [node.uid];
}

function ruleOf(node: DrawnNode): Plate['rule'] {
  if (node.type === 'source') return 'dashed';
  if (node.type === 'group') return 'pile';
  return node.rootKind === null ? 'single' : 'double';
}

/** A root ends a chain; any other value that leans on nothing leaves it loose. Parts left out leave no loose ends. */
function looseEnd(node: DrawnNode, leaning: ReadonlySet<string>, question: DrawingQuestion): string | null {
  if (node.type !== 'value' || node.rootKind !== null || leaning.has(node.uid)) return null;
  return question.only === 'fails' ? null : 'ends here: no reference named';
}

function labelsOf({ ribbons }: Placement, around: Around): Ribbon['label'][] {
  const { links } = around.chain;
  const marked = ribbons.filter((_, index) => isMarked(links[index]![around.question.verdict]));
  return placeLabels(
    ribbons.map((ribbon, index) => wantedLabel(links[index]!, ribbon, around)),
    marked.map(({ points }) => ribbonMiddle(points)),
  );
}

function ribbonOf(link: DrawnLink, placed: PlacedRibbon, around: Around): Omit<Ribbon, 'label'> {
  const { points, width, isToScale, isNegative } = placed;
  const state = link[around.question.verdict];
  const look = lookOf(link, placed, around.chain);
  const path = ribbonPath(points);
  return {
    id: linkKey(link),
    link,
    path,
    strokes: state === 'broken' ? brokenPath(points, OPENING) : [path],
    look,
    width,
    isToScale,
    isNegative,
    isInforming: link.role === 'informs',
    outline: look === 'negative' && width >= 3 ? ribbonOutline(points, width) : null,
    hatching: state === 'caution' ? ribbonHatching(points, width) : null,
    state,
    middle: ribbonMiddle(points),
    ends: [points[0]!, points.at(-1)!],
    mark: link.of.flatMap((key) => around.marks.get(key) ?? [])[0] ?? null,
  };
}

function lookOf(link: DrawnLink, placed: PlacedRibbon, { second }: DrawnChain): Ribbon['look'] {
  if (second?.beside.has(link.childUid)) return 'beside';
  if (link.role === 'informs') return 'informing';
  if (placed.isNegative) return 'negative';
  return placed.isToScale ? 'solid' : 'hairline';
}

function wantedLabel(
  { flow, role, ...link }: DrawnLink,
  ribbon: PlacedRibbon,
  { question, style }: Around,
): WantedLabel | null {
  if (flow === null || role === 'informs' || !ribbon.isToScale) return null;
  const isBesideMark = isMarked(link[question.verdict]);
  return { text: shareText(flow, style.decimalMark, 0), ribbon, isBesideMark };
}

function isMarked(state: State): boolean {
  return state === 'broken' || state === 'caution';
}

/** As wide as the drawing, or centred over it and as wide as its words. */
function bandOver(drawn: number, definition: ChainResponse['definition']): DisplayList['band'] {
  const width = Math.max(drawn, BAND.leastWidth);
  return { x: (drawn - width) / 2, width, height: BAND.height, definition };
}
