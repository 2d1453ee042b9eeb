/** What is drawn and what must stay in sight, in the drawing's own px. */
export interface Drawing {
  left: number;
  width: number;
  height: number;
  /** Middle of the weight itself: shown where the whole does not fit. */
  focusX: number;
}

/** Below this the text of a plate can no longer be read. */
const LEAST_ZOOM = 0.85;
/** Room around the drawing, px; at the top also for the controls. */
const MARGIN = { side: 20, top: 48, foot: 20 } as const;
const BOX = { least: 416, most: 1600 } as const;
/** Where a finger moves the drawing, its frame leaves room to scroll the page past it. */
const SHARE_BY_FINGER = 0.76;

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

/** Where the drawing stands in its frame: whole where it can be read so, else around the weight at its foot. */
export function viewOf(drawing: Drawing, box: { width: number; height: number }) {
  const room = { width: box.width - 2 * MARGIN.side, height: box.height - MARGIN.top - MARGIN.foot };
  const zoom = Math.max(LEAST_ZOOM, Math.min(zoomFor(drawing, box.width), room.height / drawing.height));
  const [width, height] = [drawing.width * zoom, drawing.height * zoom];
  const start = drawing.left * zoom;
  const isWhole = width <= room.width;
  const middled = box.width / 2 - drawing.focusX * zoom;
  const x = isWhole
    ? (box.width - width) / 2 - start
    : Math.min(MARGIN.side - start, Math.max(box.width - MARGIN.side - width - start, middled));
  const isAllHigh = height <= room.height + 1;
  const y = isAllHigh ? MARGIN.top + (room.height - height) / 2 : box.height - MARGIN.foot - height;
  return { x, y, zoom, isWhole: isWhole && isAllHigh };
}

function zoomFor(drawing: Drawing, width: number): number {
  return Math.min(1, Math.max(LEAST_ZOOM, (width - 2 * MARGIN.side) / drawing.width));
}
