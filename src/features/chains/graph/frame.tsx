import { useEffect, useRef, useState, type ReactNode } from 'react';
import type { ReactFlowInstance } from 'reactflow';
import { boxHeight, viewOf, type Drawing } from './view-of.ts';

interface FrameProps {
  /** Null while the chain is laid out. */
  drawing: Drawing | null;
  /** The drawing; it hands over its instance once it stands. */
  children: (show: (instance: ReactFlowInstance) => void) => ReactNode;
}

/** The drawing's frame: as high as the chain needs to be read, and fitted anew when its width changes. */
export function Frame({ drawing, children }: FrameProps) {
  const box = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(0);
  const [instance, setInstance] = useState<ReactFlowInstance | null>(null);
  useEffect(() => {
    const observer = new ResizeObserver(([entry]) => setWidth(Math.round(entry!.contentRect.width)));
    observer.observe(box.current!);
    return () => observer.disconnect();
  }, []);
  const height = drawing && width > 0 ? boxHeight(drawing, width, windowNow()) : undefined;
  const view = drawing && height ? viewOf(drawing, { width, height }) : null;
  const { x, y, zoom } = view ?? {};
  useEffect(() => {
    if (instance && x !== undefined && y !== undefined && zoom !== undefined)
      instance.setViewport({ x, y, zoom });
  }, [instance, x, y, zoom]);
  return (
    <>
      <div ref={box} className="min-h-80 border-y border-rule" style={{ height }}>
        {children(setInstance)}
      </div>
      {view?.isWhole === false && (
        <p className="text-sm text-ink-2">
          The drawing is larger than its frame: drag it, or show all of it with the last of its buttons.
        </p>
      )}
    </>
  );
}

function windowNow() {
  return { height: window.innerHeight, isByFinger: window.matchMedia('(pointer: coarse)').matches };
}
