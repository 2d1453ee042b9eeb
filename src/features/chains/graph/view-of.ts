import type { DisplayList, Plate } from '#shared/drawing/display-list.ts';
import { PLATE } from '#shared/drawing/geometry.ts';
import { BRIEF_BELOW } from './brief-plate.ts';

/** What is drawn and what must stay in sight, in the drawing's own px. */
export interface Drawing {
  left: number;
  width: number;
  height: number;
  /** Middle of the weight itself: shown where the whole does not fit. */
  focusX: number;
}

/** Where the drawing stands in its frame: its origin there, and its scale. */
export interface View {
  x: number;
  y: number;
  zoom: number;
}

/** Below this even the large number of a plate drawn small can no longer be read. */
const LEAST_ZOOM = 0.36;
/** Room around the drawing, px; at the top also for the controls. */
const MARGIN = { side: 20, top: 48, foot: 20 } as const;
const BOX = { least: 416, most: 1600 } as const;
/** Where a finger moves the drawing, its frame leaves room to scroll the page past it. */
const SHARE_BY_FINGER = 0.76;

/** Bounds of the drawing, the band's included. */
export function boundsOf(list: DisplayList): Drawing {
  const left = Math.min(0, list.band.x);
  const width = Math.max(list.width, list.band.width);
  const focus = list.plates.find((plate) => plate.isFocus)!;
  return { left, width, height: list.height, focusX: focus.x + PLATE.width / 2 };
}

/** Height of the frame, px: as high as the drawing needs at the size that the width allows. */
export function boxHeight(
  drawing: Drawing,
  width: number,
  window: { height: number; isByFinger: boolean },
): number {
  const most = window.isByFinger ? Math.round(window.height * SHARE_BY_FINGER) : BOX.most;
  const needed = Math.ceil(drawing.height * zoomFor(drawing, width)) + MARGIN.top + MARGIN.foot;
  return Math.round(Math.min(most, Math.max(Math.min(BOX.least, most), needed)));
}

/**
 * Where the drawing stands in its frame: whole where it can be read so, its plates drawn small if need be; else
 * around the weight at its foot, with plates that can be read.
 */
export function viewOf(
  drawing: Drawing,
  box: { width: number; height: number },
): View & { isWhole: boolean } {
  const room = { width: box.width - 2 * MARGIN.side, height: box.height - MARGIN.top - MARGIN.foot };
  const fitting = Math.min(room.width / drawing.width, room.height / drawing.height, 1);
  const zoom = fitting < LEAST_ZOOM ? BRIEF_BELOW : fitting;
  const [width, height] = [drawing.width * zoom, drawing.height * zoom];
  const start = drawing.left * zoom;
  const isWhole = width <= room.width + 1;
  const middled = box.width / 2 - drawing.focusX * zoom;
  const x = isWhole
    ? (box.width - width) / 2 - start
    : Math.min(MARGIN.side - start, Math.max(box.width - MARGIN.side - width - start, middled));
  const isAllHigh = height <= room.height + 1;
  const y = isAllHigh ? MARGIN.top + (room.height - height) / 2 : box.height - MARGIN.foot - height;
  return { x, y, zoom, isWhole: isWhole && isAllHigh };
}

function zoomFor(drawing: Drawing, width: number): number {
  const fitting = (width - 2 * MARGIN.side) / drawing.width;
  return fitting < LEAST_ZOOM ? BRIEF_BELOW : Math.min(1, fitting);
}

/** The view moved as little as needed for a plate to stand in the frame; null where it stands there already. */
export function bringIntoSight(
  { x, y }: Pick<Plate, 'x' | 'y'>,
  view: View,
  box: { width: number; height: number },
): View | null {
  const shift = (start: number, length: number, room: number) => {
    if (start < MARGIN.side) return MARGIN.side - start;
    return Math.min(0, room - MARGIN.side - start - length);
  };
  const dx = shift(x * view.zoom + view.x, PLATE.width * view.zoom, box.width);
  const dy = shift(y * view.zoom + view.y, PLATE.height * view.zoom, box.height);
  return dx === 0 && dy === 0 ? null : { x: view.x + dx, y: view.y + dy, zoom: view.zoom };
}
