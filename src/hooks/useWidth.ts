import { type RefObject, useLayoutEffect, useState } from 'react';

/** Width of an element in CSS pixels, kept up to date; `first` until it has been measured. */
export const useWidth = (ref: RefObject<HTMLElement | null>, first: number): number => {
  const [width, setWidth] = useState(first);
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element || typeof ResizeObserver === 'undefined') return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) setWidth(entry.contentRect.width);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [ref]);
  return width;
};
