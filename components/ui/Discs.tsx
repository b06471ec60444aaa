import type { ReactElement } from 'react';
import Svg, { Circle } from 'react-native-svg';
import { colors, type ColorName } from '@/components/theme/tokens';

/** One disc in a drawing 100 units wide. */
export interface Disc {
  x: number;
  y: number;
  r: number;
  color?: ColorName;
}

export interface DiscsProps {
  discs: readonly Disc[];
  /** Width of the drawing on the screen [px]. */
  width: number;
  /** Height [px]; the drawing keeps 100 units to the width. */
  height: number;
  color?: ColorName;
  /** 0 to 1, of each disc; where they overlap it is denser. */
  opacity?: number;
  /** What the drawing says; without it, it is only the ground on which words stand. */
  label?: string;
}

/** Overlapping soft discs: wet circles, tree crowns, light under a tree. */
export function Discs({ discs, width, height, color = 'water', opacity = 0.35, label }: DiscsProps): ReactElement {
  const semantics = label === undefined ? ({ 'aria-hidden': true } as const) : ({ role: 'img', 'aria-label': label } as const);
  return (
    <Svg {...semantics} width={width} height={height} viewBox={`0 0 100 ${(100 * height) / width}`}>
      {discs.map((disc, index) => (
        <Circle key={index} cx={disc.x} cy={disc.y} r={disc.r} fill={colors[disc.color ?? color]} fillOpacity={opacity} />
      ))}
    </Svg>
  );
}
