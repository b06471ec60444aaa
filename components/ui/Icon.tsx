import type { ComponentType, ReactElement } from 'react';
import { View } from 'react-native';
import { colors, type ColorName } from '@/components/theme/tokens';

/** An icon component from `lucide-react-native/icons/<name>`. */
export type IconComponent = ComponentType<{ size?: number; color?: string; strokeWidth?: number }>;

export interface IconProps {
  icon: IconComponent;
  /** Side [px]. Default 20. */
  size?: 16 | 20 | 24 | 32;
  /** Default: the colour of the text around it. */
  color?: ColorName;
  /** Only for an icon that says something no word beside it says. */
  label?: string;
}

/** One icon of the one set. Silent to assistive technology unless it has a label. */
export function Icon({ icon: Drawing, size = 20, color, label }: IconProps): ReactElement {
  const semantics = label === undefined ? ({ 'aria-hidden': true } as const) : ({ role: 'img', 'aria-label': label } as const);
  return (
    <View {...semantics} style={{ width: size, height: size, flexShrink: 0 }}>
      <Drawing size={size} color={color ? colors[color] : 'currentColor'} strokeWidth={2} />
    </View>
  );
}
