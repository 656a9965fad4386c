import { useLayoutEffect, useState } from 'react';
import type { RefObject } from 'react';

/** The width in px that an element has been given, kept up to date; `assumed` until it is measured. */
export function useWidth(element: RefObject<HTMLElement | null>, assumed: number): number {
  const [width, setWidth] = useState(assumed);
  useLayoutEffect(() => {
    const target = element.current;
    if (!target) return undefined;
    const measure = () => {
      if (target.clientWidth > 0) setWidth(target.clientWidth);
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(target);
    return () => observer.disconnect();
  }, [element]);
  return width;
}
