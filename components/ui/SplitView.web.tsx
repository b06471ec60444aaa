import type { ReactElement, ReactNode } from 'react';
import { useIsWide } from '@/components/theme/breakpoints';

export interface SplitViewProps {
  list: ReactNode;
  /** The chosen thing; null while nothing is chosen. */
  detail: ReactNode;
  listLabel: string;
  detailLabel: string;
  /** Shown beside the list while nothing is chosen. */
  placeholder?: ReactNode;
  /** Share of the width for the list; default is a little less than half. */
  ratio?: 'even' | 'narrow-list';
}

/** List and detail side by side from 900 px; below that the list, or the detail once something is chosen (bring a way back in it). */
export function SplitView({ list, detail, listLabel, detailLabel, placeholder, ratio = 'even' }: SplitViewProps): ReactElement {
  const wide = useIsWide();
  const chosen = detail !== null && detail !== undefined && detail !== false;
  if (!wide) return <>{chosen ? detail : list}</>;
  return (
    <div className="d-split" data-ratio={ratio}>
      <section aria-label={listLabel}>{list}</section>
      <section aria-label={detailLabel}>{chosen ? detail : placeholder}</section>
    </div>
  );
}
