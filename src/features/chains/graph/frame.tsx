import { useEffect, useRef, useState, type ReactNode } from 'react';
import type { ReactFlowInstance } from 'reactflow';
import type { DisplayList } from '#shared/drawing/display-list.ts';
import { glide } from './glide.ts';
import { boundsOf, boxHeight, viewOf, type View } from './view-of.ts';

export interface FrameParts {
  /** Takes the drawing's instance once it stands. */
  show: (instance: ReactFlowInstance) => void;
  /** False where part of the drawing is outside. */
  isWhole: boolean;
  width: number;
  height: number;
}

interface FrameProps {
  /** Null while the chain is laid out for the first time. */
  list: DisplayList | null;
  children: (parts: FrameParts) => ReactNode;
  /** Said under the frame. */
  note: (view: View & { isWhole: boolean }) => ReactNode;
}

/** The drawing's frame: as high as the chain needs to be read, and fitted anew when its width or the chain changes. */
export function Frame({ list, children, note }: FrameProps) {
  const box = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(0);
  const [instance, setInstance] = useState<ReactFlowInstance | null>(null);
  useEffect(() => {
    const observer = new ResizeObserver(([entry]) => setWidth(Math.round(entry!.contentRect.width)));
    observer.observe(box.current!);
    return () => observer.disconnect();
  }, []);
  const bounds = list && boundsOf(list);
  const height = bounds && width > 0 ? boxHeight(bounds, width, windowNow()) : undefined;
  const view = bounds && height ? viewOf(bounds, { width, height }) : null;
  useStanding(box, instance, list, view);
  return (
    <>
      <div
        ref={box}
        className="relative min-h-80 overflow-hidden border-y border-rule print:hidden"
        style={{ height }}
      >
        {children({ show: setInstance, isWhole: view?.isWhole ?? true, width, height: height ?? 0 })}
      </div>
      {view && note(view)}
    </>
  );
}

/** Brings the drawing to its view; when the chain has changed, what stays glides there from where it stood. */
function useStanding(
  box: React.RefObject<HTMLDivElement | null>,
  instance: ReactFlowInstance | null,
  list: DisplayList | null,
  view: View | null,
): void {
  const shown = useRef<{ list: DisplayList; view: View } | null>(null);
  const { x, y, zoom } = view ?? {};
  useEffect(() => {
    if (!instance || !list || x === undefined || y === undefined || zoom === undefined) return;
    const wanted = { x, y, zoom };
    const former = shown.current;
    const before = instance.getViewport();
    // A reader's own place in the drawing stays, unless the drawing asks for another.
    const isSameView = former && former.view.x === x && former.view.y === y && former.view.zoom === zoom;
    if (!isSameView) instance.setViewport(wanted);
    shown.current = { list, view: wanted };
    // The drawing's own effects have put the new plates on their way: they stand when this task ends.
    if (former && former.list !== list) {
      const after = { list, view: isSameView ? before : wanted };
      queueMicrotask(() => box.current && glide(box.current, { list: former.list, view: before }, after));
    }
  }, [box, instance, list, x, y, zoom]);
}

function windowNow() {
  return { height: window.innerHeight, isByFinger: window.matchMedia('(pointer: coarse)').matches };
}
