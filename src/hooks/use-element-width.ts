import { type RefCallback, useCallback, useState } from 'react';

/** The content width of an element in CSS pixels, following its size; 0 until it is on the page. */
export function useElementWidth<Kind extends Element>(): [RefCallback<Kind>, number] {
  const [width, setWidth] = useState(0);
  const ref = useCallback((element: Kind | null) => {
    if (element === null) return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry !== undefined) setWidth(Math.floor(entry.contentRect.width));
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
