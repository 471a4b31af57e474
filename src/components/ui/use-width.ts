import { useLayoutEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';

/**
 * The width an element has, in whole px, followed as it changes; drawings are redrawn for it, never scaled.
 * @param start the width to draw for until it is measured
 */
export function useWidth<E extends HTMLElement>(start: number): [RefObject<E | null>, number] {
  const ref = useRef<E>(null);
  const [width, setWidth] = useState(start);
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element || typeof ResizeObserver === 'undefined') return;
    const measure = () => {
      const now = Math.floor(element.getBoundingClientRect().width);
      if (now > 0) setWidth(now);
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => {
      observer.disconnect();
    };
  }, []);
  return [ref, width];
}
