import { useCallback, useState, type RefCallback } from 'react';

/** The width of an element, px, as it changes; 0 before it is laid out. */
export function useWidth(): [RefCallback<HTMLElement>, number] {
  const [width, setWidth] = useState(0);
  const watch = useCallback((element: HTMLElement | null) => {
    if (!element) return;
    const observer = new ResizeObserver(() => setWidth(element.clientWidth));
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [watch, width];
}
