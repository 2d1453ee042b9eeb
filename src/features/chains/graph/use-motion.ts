import { useEffect, useMemo, useRef, type RefObject } from 'react';
import type { DetailLevel } from './detail-level.ts';
import type { View } from './view-of.ts';

/** Moves come one by one, and no end is told of some: the drawing counts as moving until none has come for this long. */
const REST_MS = 200;

/**
 * Marks the drawing while it moves, so that it moves as one layer, and shifts the window in its map along: by
 * transform only, past React, so that a move costs no painting. At rest it takes the detail that its zoom allows.
 */
export function useMotion(box: RefObject<HTMLElement | null>, level: DetailLevel) {
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => () => clearTimeout(timer.current), []);
  return useMemo(
    () => ({
      /** @param isByHand whether a hand moves it, which may move on */
      follow: (view: View, isByHand: boolean) => {
        const mapWindow = box.current?.querySelector<HTMLElement>('[data-map-window]');
        if (mapWindow) mapWindow.style.transform = windowTransform(mapWindow.dataset, view);
        if (!isByHand) level.follow(view.zoom);
        else {
          level.move();
          box.current?.classList.add('is-moving');
          clearTimeout(timer.current);
          timer.current = setTimeout(() => {
            box.current?.classList.remove('is-moving');
            level.rest(view.zoom);
          }, REST_MS);
        }
      },
    }),
    [box, level],
  );
}

/** Where the frame stands in the map: its origin and scale from the map's own data. */
export function windowTransform(map: DOMStringMap, { x, y, zoom }: View): string {
  const [left, scale] = [Number(map['left']), Number(map['scale'])];
  return `translate(${(-x / zoom - left) * scale}px, ${(-y / zoom) * scale}px) scale(${1 / zoom})`;
}
