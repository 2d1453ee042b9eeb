import { useLayoutEffect, useRef, useState, type RefObject } from 'react';

/**
 * The width of an element, measured as it changes, so that a drawing keeps its text at reading size.
 * @param initial used before the first measure, and where nothing can be measured
 */
export function useWidth<Element extends HTMLElement>(initial: number): [RefObject<Element | null>, number] {
  const ref = useRef<Element>(null);
  const [width, setWidth] = useState(initial);
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element || typeof ResizeObserver === 'undefined') return undefined;
    const measure = () => setWidth((before) => Math.floor(element.clientWidth) || before);
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    measure();
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
