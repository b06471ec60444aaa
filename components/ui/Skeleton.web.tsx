import type { ReactElement } from 'react';

export interface SkeletonProps {
  /** What is being loaded, heard once: "Loading the plan". */
  label: string;
  /** Grey lines in place of words. */
  lines?: number;
  /** Or one block of this height [px], for a card or a chart. */
  height?: number;
}

/** Holds the place of what is on its way; fades in after 300 ms so that quick answers do not flicker. */
export function Skeleton({ label, lines = 3, height }: SkeletonProps): ReactElement {
  return (
    <div className="d-skeleton" role="status">
      <span className="d-hidden">{label}</span>
      {height === undefined
        ? Array.from({ length: lines }, (_, index) => <span key={index} className="d-skeleton-line" style={{ width: index === lines - 1 ? '62%' : '100%' }} />)
        : <span className="d-skeleton-block" style={{ height }} />}
    </div>
  );
}
