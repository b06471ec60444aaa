import { useLayoutEffect, useRef, useState, type ReactElement, type ReactNode } from 'react';

/** Room for a table wider than its place. When it scrolls, it can be reached and scrolled with the keyboard, and says what it holds. */
export function TableScroll({ label, className, children }: { label: string; className?: string; children: ReactNode }): ReactElement {
  const ref = useRef<HTMLDivElement>(null);
  const [scrolls, setScrolls] = useState(false);
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element) return undefined;
    const measure = (): void => setScrolls(element.scrollWidth > element.clientWidth);
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    if (element.firstElementChild) observer.observe(element.firstElementChild);
    return () => observer.disconnect();
  }, []);
  const reach = scrolls ? { tabIndex: 0, role: 'region', 'aria-label': label } : {};
  return <div ref={ref} className={className ? `d-table-scroll ${className}` : 'd-table-scroll'} {...reach}>{children}</div>;
}
