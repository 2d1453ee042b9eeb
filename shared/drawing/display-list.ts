import type { ChainResponse } from '#shared/contracts/chains.ts';
import { stateOfValue, type State } from '#shared/states.ts';
import { groupBy } from '#shared/group-by.ts';
import { countingChecks, worstOf } from './counting-checks.ts';
import { linkKey, type DrawingQuestion } from './drawing-question.ts';
import { BAND, PLATE, SCALE } from './geometry.ts';
import type { LayoutInput, Placement, Point } from './layout-input.ts';
import { ribbonMiddle, ribbonPath } from './ribbon-path.ts';

type Node = ChainResponse['nodes'][number];
type Link = ChainResponse['links'][number];

/** A plate: a value or a shared effect, in its place. */
export interface Plate {
  id: string;
  x: number;
  y: number;
  node: Node;
  /** The worst of the value's own checks and its standing. */
  state: State;
  isFocus: boolean;
  isFaint: boolean;
  stub: Stub | null;
  /** One short word set on the plate's edge in brass: what is to be noticed of it. */
  mark: string | null;
}

/** What a value adds of its own, entering from the side at the same scale. */
export interface Stub {
  /** Drawn height; null: the own part is not known. */
  height: number | null;
  share: number | null;
  isToScale: boolean;
  isNegative: boolean;
}

/** A link as it is drawn. */
export interface Ribbon {
  id: string;
  link: Link;
  path: string;
  width: number;
  isToScale: boolean;
  isNegative: boolean;
  /** Named above a consensus value, without flow. */
  isInforming: boolean;
  state: State;
  isFaint: boolean;
  middle: Point;
  /** One short word at the ribbon's middle in brass: what is to be noticed of it. */
  mark: string | null;
}

/** Everything that is drawn of a chain, in numbers: the screen and every export are made from it. */
export interface DisplayList {
  width: number;
  height: number;
  /** The definition in force when the roots were determined. */
  band: { x: number; width: number; height: number; definition: ChainResponse['definition'] };
  plates: Plate[];
  ribbons: Ribbon[];
}

/** What the layout needs of a chain. In the plain drawing every link is a hairline. */
export function layoutInput(chain: ChainResponse, draw: DrawingQuestion['draw']): LayoutInput {
  const isPlain = draw === 'plain';
  // A consensus value that runs inform is a root with something above it: it stays below them.
  const informed = new Set(chain.links.map((link) => link.childUid));
  return {
    nodes: chain.nodes.map((node) => ({
      id: node.uid,
      tier: node.tier,
      isRoot: node.type === 'value' && node.rootKind !== null && !informed.has(node.uid),
      hasStub: stubOf(node, isPlain) !== null,
    })),
    links: chain.links.map((link) => ({
      child: link.childUid,
      parent: link.parentUid,
      flow: isPlain || link.role === 'informs' ? 0 : link.flow,
    })),
  };
}

/** What is to be noticed: a plate's id or a link's key, and one short word. */
export type Marks = ReadonlyMap<string, string>;

/** Puts the chain's facts in the places that the layout found. */
export function displayList(
  chain: ChainResponse,
  placement: Placement,
  question: DrawingQuestion,
  marks: Marks = new Map(),
): DisplayList {
  const isPlain = question.draw === 'plain';
  const failing = failingNodes(chain, question);
  const isFaint = (uid: string) => failing !== null && !failing.has(uid);
  const own = ownChecks(chain, question);
  const placeOf = new Map(placement.plates.map((plate) => [plate.id, plate]));
  return {
    width: placement.width,
    height: placement.height,
    band: bandOver(placement.width, chain.definition),
    plates: chain.nodes.map((node) => ({
      id: node.uid,
      x: placeOf.get(node.uid)!.x,
      y: placeOf.get(node.uid)!.y,
      node,
      state: node.type === 'value' ? worstOf(own.get(node.uid) ?? [], stateOfValue(node.state)) : 'sound',
      isFocus: node.uid === chain.focusUid,
      isFaint: isFaint(node.uid),
      stub: stubOf(node, isPlain),
      mark: marks.get(node.uid) ?? null,
    })),
    ribbons: placement.ribbons.map((ribbon, index) => {
      const link = chain.links[index]!;
      return {
        id: linkKey(link),
        link,
        path: ribbonPath(ribbon.points),
        width: ribbon.width,
        isToScale: ribbon.isToScale,
        isNegative: ribbon.isNegative,
        isInforming: link.role === 'informs',
        state: link[question.verdict],
        isFaint: isFaint(link.childUid) || isFaint(link.parentUid),
        middle: ribbonMiddle(ribbon.points),
        mark: marks.get(linkKey(link)) ?? null,
      };
    }),
  };
}

/** As wide as the drawing, or centred over it and as wide as its words. */
function bandOver(drawn: number, definition: ChainResponse['definition']): DisplayList['band'] {
  const width = Math.max(drawn, BAND.leastWidth);
  return { x: (drawn - width) / 2, width, height: BAND.height, definition };
}

function ownChecks(chain: ChainResponse, question: DrawingQuestion) {
  const ofValues = countingChecks(chain, question.verdict).flatMap((check) =>
    check.subject.type === 'value' ? [{ uid: check.subject.uid, check }] : [],
  );
  const byUid = groupBy(ofValues, ({ uid }) => uid);
  return new Map([...byUid].map(([uid, rows]) => [uid, rows.map(({ check }) => check)]));
}

function stubOf(node: Node, isPlain: boolean): Stub | null {
  if (isPlain || node.type !== 'value' || node.share === null) return null;
  if (node.localShare === null) return { height: null, share: null, isToScale: false, isNegative: false };
  if (node.localShare === 0) return null;
  const height = Math.min(PLATE.height, Math.abs(node.localShare) * SCALE);
  const isToScale = height >= 1;
  return { height: Math.max(1, height), share: node.localShare, isToScale, isNegative: node.localShare < 0 };
}

/** Nodes at either end of a link that is broken or calls for caution; null where everything is shown. */
function failingNodes(chain: ChainResponse, question: DrawingQuestion): Set<string> | null {
  if (question.only !== 'fails') return null;
  const failing = chain.links.filter((link) => ['broken', 'caution'].includes(link[question.verdict]));
  return new Set(failing.flatMap((link) => [link.childUid, link.parentUid]));
}
