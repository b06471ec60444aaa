import type { ReactElement } from 'react';
import Svg, { Circle } from 'react-native-svg';
import { colors } from '@/components/theme/tokens';

/** The three discs. Size is the side [px]. */
export function LogoMark({ size = 32 }: { size?: number }): ReactElement {
  return (
    <Svg aria-hidden width={size} height={size} viewBox="0 0 64 64">
      <Circle cx={25} cy={26} r={19} fill={colors.water} fillOpacity={0.8} />
      <Circle cx={42} cy={33} r={17} fill={colors.hose} fillOpacity={0.8} />
      <Circle cx={29} cy={47} r={12} fill={colors.sun} fillOpacity={0.9} />
    </Svg>
  );
}

/** The discs and the name. Plain elements, for the front page is HTML before any style sheet of the app's runtime is there. */
export function Logo({ size = 'medium' }: { size?: 'small' | 'medium' }): ReactElement {
  return (
    <span className="d-logo" data-size={size}>
      <LogoMark size={size === 'small' ? 28 : 34} />
      <span>Dapple</span>
    </span>
  );
}
