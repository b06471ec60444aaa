import type { ReactElement, ReactNode, Ref } from 'react';
import { View, type StyleProp, type ViewStyle } from 'react-native';
import { colors, type ColorName, type Space } from '@/components/theme/tokens';

export interface BoxProps {
  children?: ReactNode;
  padding?: Space;
  paddingX?: Space;
  paddingY?: Space;
  /** Distance between the children [px]. */
  gap?: Space;
  background?: ColorName;
  grow?: boolean;
  /** What it is to assistive technology; `list`, `group` and `region` want a label. */
  role?: 'list' | 'listitem' | 'group' | 'region' | 'img' | 'status' | 'alert' | 'none';
  'aria-label'?: string;
  'aria-labelledby'?: string;
  'aria-hidden'?: boolean;
  id?: string;
  testID?: string;
  style?: StyleProp<ViewStyle>;
  ref?: Ref<View>;
}

/** A plain area. */
export function Box({ padding, paddingX, paddingY, gap, background, grow, id, style, ...rest }: BoxProps): ReactElement {
  return (
    <View
      {...rest}
      nativeID={id}
      style={[
        padding !== undefined && { padding },
        paddingX !== undefined && { paddingHorizontal: paddingX },
        paddingY !== undefined && { paddingVertical: paddingY },
        gap !== undefined && { gap },
        background && { backgroundColor: colors[background] },
        grow && { flexGrow: 1, flexShrink: 1, flexBasis: 0, minWidth: 0 },
        style,
      ]}
    />
  );
}
