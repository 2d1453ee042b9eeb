import type { Edge, Node } from 'reactflow';
import type { DisplayList, Plate, Ribbon } from '#shared/drawing/display-list.ts';
import { PLATE } from '#shared/drawing/geometry.ts';
import { ribbonFigure } from '#shared/drawing/ribbon-shapes.ts';
import type { PictureData } from './picture-node.tsx';
import type { PlateData } from './plate-node.tsx';
import type { RibbonData } from './ribbon-edge.tsx';

/** What is chosen in the drawing and where the keyboard stands. */
export interface Standing {
  at: string | undefined;
  tabStop: string | undefined;
  /** Walked to just now. */
  takesFocus: boolean;
}

/** Name of the band among the drawing's elements. */
export const BAND_ID = 'definition';

/** The band and the plates' buttons, in their places. */
export function nodesOf(list: DisplayList, standing: Standing): Node[] {
  const band: Node = {
    id: BAND_ID,
    type: 'band',
    position: { x: list.band.x, y: 0 },
    style: placedAt(list.band.x, 0),
    width: list.band.width,
    height: list.band.height,
    data: list.band,
    selectable: false,
  };
  return [band, ...list.plates.map((plate) => nodeOf(plate, standing))];
}

function nodeOf(plate: Plate, { at, tabStop, takesFocus }: Standing): Node<PlateData> {
  const isTabStop = plate.id === tabStop;
  const isSelected = at !== undefined && isAbout(plate, at);
  return {
    id: plate.id,
    type: 'plate',
    position: { x: plate.x, y: plate.y },
    style: { ...placedAt(plate.x, plate.y), width: PLATE.width, height: PLATE.height },
    // Known beforehand: without it a plate that changes is hidden until it is measured anew, and loses the focus.
    width: PLATE.width,
    height: PLATE.height,
    data: { plate, isSelected, isTabStop, takesFocus: isTabStop && takesFocus },
  };
}

/** Places an element without a transform of its own: hundreds of those would each be a layer to sort in every frame. */
function placedAt(left: number, top: number) {
  return { left, top, transform: 'none' };
}

/** A group is chosen with any value or link inside it. */
function isAbout({ id, node }: Plate, at: string): boolean {
  if (node.type === 'group') return node.members.includes(at) || node.innerLinks.includes(at);
  return id === at;
}

/** The picture of all ribbons and plates, below everything that takes the pointer. */
export function pictureOf(list: DisplayList, at: string | undefined): Node<PictureData> {
  return {
    id: 'picture',
    type: 'picture',
    position: { x: 0, y: 0 },
    style: { ...placedAt(0, 0), width: list.width, height: list.height, pointerEvents: 'none' },
    width: list.width,
    height: list.height,
    data: { list, selected: selectedIn(list, at) },
    selectable: false,
  };
}

function selectedIn({ plates, ribbons }: DisplayList, at: string | undefined): ReadonlySet<string> {
  if (at === undefined) return new Set();
  return new Set([
    ...plates.filter((plate) => isAbout(plate, at)).map(({ id }) => id),
    ...ribbons.filter((ribbon) => holds(ribbon, at)).map(({ id }) => id),
  ]);
}

function holds(ribbon: Ribbon, at: string): boolean {
  return ribbon.id === at || ribbon.link.of.includes(at);
}

/** Where ribbons take the pointer, the widest first: a thin one that crosses it lies above. */
export function edgesOf(list: DisplayList): Edge<RibbonData>[] {
  return list.ribbons
    .toSorted((a, b) => b.width - a.width)
    .map((ribbon) => ({
      id: ribbon.id,
      type: 'ribbon',
      source: ribbon.link.parentUid,
      target: ribbon.link.childUid,
      data: { ribbon },
      ariaLabel: ribbonFigure(ribbon).title,
    }));
}
