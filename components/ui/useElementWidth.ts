import { useEffect, useRef, useState, type RefObject } from 'react';

/** Width of an element [px], followed as it changes; 0 before the first measurement. Drawings need it to keep their text at its size. */
export function useElementWidth<E extends HTMLElement>(): [RefObject<E | null>, number] {
  const element = useRef<E>(null);
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const target = element.current;
    if (!target) {
      return undefined;
    }
    const measure = () => setWidth(Math.floor(target.getBoundingClientRect().width));
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(target);
    return () => observer.disconnect();
  }, []);
  return [element, width];
}
