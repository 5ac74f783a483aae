import { useLayoutEffect, useRef, useState, type RefObject } from 'react';

/** An element's width in whole pixels, followed as the page is resized; 0 before it is known. */
export function useWidth<T extends HTMLElement>(): [RefObject<T | null>, number] {
  const ref = useRef<T>(null);
  const [width, setWidth] = useState(0);
  // Speaks to layout: measures once before the first paint, then whenever the browser reports a change.
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element) return;
    const measure = () => setWidth(Math.floor(element.clientWidth));
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
