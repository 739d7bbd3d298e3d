import { useEffect, useRef, useState } from 'react';

/** The width of an element as it stands now, CSS px; `before` until it is laid out. */
export function useWidth<Element extends HTMLElement>(before: number) {
  const element = useRef<Element>(null);
  const [widthPx, setWidthPx] = useState(before);
  useEffect(() => {
    if (!element.current) return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry) setWidthPx(Math.round(entry.contentRect.width));
    });
    observer.observe(element.current);
    return () => observer.disconnect();
  }, []);
  return { element, widthPx };
}
