import { useEffect, useMemo, useRef, type RefObject } from 'react';
import type { View } from './view-of.ts';

/** A pinch comes as many small moves: the drawing counts as moving until none has come for this long. */
const REST_MS = 160;

/**
 * Marks the drawing while it moves, so that it moves as one layer, and shifts the window in its map along: by
 * transform only, past React, so that a move costs no painting.
 */
export function useMotion(box: RefObject<HTMLElement | null>) {
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => () => clearTimeout(timer.current), []);
  return useMemo(
    () => ({
      start: () => {
        clearTimeout(timer.current);
        box.current?.classList.add('is-moving');
      },
      follow: (view: View) => {
        const mapWindow = box.current?.querySelector<HTMLElement>('[data-map-window]');
        if (mapWindow) mapWindow.style.transform = windowTransform(mapWindow.dataset, view);
      },
      end: () => {
        clearTimeout(timer.current);
        timer.current = setTimeout(() => box.current?.classList.remove('is-moving'), REST_MS);
      },
    }),
    [box],
  );
}

/** Where the frame stands in the map: its origin and scale from the map's own data. */
export function windowTransform(map: DOMStringMap, { x, y, zoom }: View): string {
  const [left, scale] = [Number(map['left']), Number(map['scale'])];
  return `translate(${(-x / zoom - left) * scale}px, ${(-y / zoom) * scale}px) scale(${1 / zoom})`;
}
