import { useLayoutEffect, useRef, useState, type RefObject } from 'react';

/** Room for a drawing on a sheet of A4 or Letter with customary margins, in CSS pixels (96 per inch). */
const PAPER_WIDTH = 660;

/**
 * An element's width in whole pixels, followed as the page is resized; 0 before it is known. For printing it becomes
 * that of a sheet of paper.
 */
export function useWidth<T extends HTMLElement>(): [RefObject<T | null>, number] {
  const ref = useRef<T>(null);
  const [width, setWidth] = useState(0);
  // Speaks to layout: measures once before the first paint, then whenever the browser reports a change or prints.
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element) return;
    const measure = () => setWidth(Math.floor(element.clientWidth));
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    const fitPaper = () => setWidth(PAPER_WIDTH);
    window.addEventListener('beforeprint', fitPaper);
    window.addEventListener('afterprint', measure);
    return () => {
      observer.disconnect();
      window.removeEventListener('beforeprint', fitPaper);
      window.removeEventListener('afterprint', measure);
    };
  }, []);
  return [ref, width];
}
