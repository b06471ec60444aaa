import type { ReactElement, ReactNode } from 'react';
import { Text } from '@/components/ui/Text';
import { useElementWidth } from '@/components/ui/useElementWidth';

export interface DrawingProps {
  /** What the drawing says, in a sentence. */
  label: string;
  /** Height for a width [px]. */
  height: (width: number) => number;
  children: (width: number, height: number) => ReactNode;
}

/** A plain SVG as wide as its place, so that its words keep their size. */
export function Drawing({ label, height, children }: DrawingProps): ReactElement {
  const [holder, width] = useElementWidth<HTMLDivElement>();
  const tall = height(width === 0 ? 320 : width);
  return (
    <div ref={holder} className="k-drawing" style={{ minHeight: tall }}>
      {width === 0 ? null : (
        <svg role="img" aria-label={label} width={width} height={tall} viewBox={`0 0 ${width} ${tall}`}>{children(width, tall)}</svg>
      )}
    </div>
  );
}

/** Three figures under a drawing, each with its words. */
export function Figures({ figures }: { figures: readonly { value: string; words: string }[] }): ReactElement {
  return (
    <dl className="k-figures">
      {figures.map(({ value, words }) => (
        <div key={words}>
          <dt>{words}</dt>
          <dd>{value}</dd>
        </div>
      ))}
    </dl>
  );
}

/** The answer in words, read out again when it changes. */
export function Headline({ children }: { children: string }): ReactElement {
  return <div role="status"><Text variant="heading2">{children}</Text></div>;
}
