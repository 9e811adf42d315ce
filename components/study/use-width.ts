'use client';

import { type RefObject, useEffect, useState } from 'react';

/** The width of an element in CSS pixels, followed as it changes; `initial` until it is known. */
export function useWidth(ref: RefObject<HTMLElement | null>, initial = 0): number {
  const [width, setWidth] = useState(initial);
  useEffect(() => {
    const element = ref.current;
    if (!element) return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry) setWidth(Math.floor(entry.contentRect.width));
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [ref]);
  return width;
}
