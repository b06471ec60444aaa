import type { ReactElement, ReactNode, Ref } from 'react';
import { Text as NativeText, type StyleProp, type TextProps as NativeTextProps, type TextStyle } from 'react-native';
import { textStyles, type TextVariant } from '@/components/theme/textStyles';
import { colors, type ColorName } from '@/components/theme/tokens';

export interface TextProps {
  children?: ReactNode;
  /** How it looks; headings also say so to assistive technology. Default `body`. */
  variant?: TextVariant;
  /** Heading level in the outline of the page when it differs from the look; `none` for text that only looks like one. */
  level?: 1 | 2 | 3 | 4 | 'none';
  /** A colour token; default is the variant's own. */
  color?: ColorName;
  align?: 'left' | 'center' | 'right';
  /** Figures of equal width, for columns and numbers that change. */
  tabular?: boolean;
  bold?: boolean;
  numberOfLines?: number;
  /** DOM id. */
  id?: string;
  /** Announces changes: `alert` at once, `status` when the reader is free. */
  role?: 'alert' | 'status';
  'aria-label'?: string;
  'aria-hidden'?: boolean;
  testID?: string;
  style?: StyleProp<TextStyle>;
  ref?: Ref<NativeText>;
}

const headingLevels: Partial<Record<TextVariant, 1 | 2 | 3>> = { heading1: 1, heading2: 2, heading3: 3 };

/** All words on a screen. Headings become real `h1` to `h4`. */
export function Text({ variant = 'body', level, color, align, tabular, bold, style, id, role, ...rest }: TextProps): ReactElement {
  const headingLevel = level === 'none' ? undefined : level ?? headingLevels[variant];
  const semantics: NativeTextProps = headingLevel ? { role: 'heading', 'aria-level': headingLevel } : role ? { role } : {};
  return (
    <NativeText
      {...rest}
      {...semantics}
      nativeID={id}
      style={[
        textStyles[variant],
        color && { color: colors[color] },
        align && { textAlign: align },
        tabular && { fontVariant: ['tabular-nums'] },
        bold && { fontWeight: '600' },
        style,
      ]}
    />
  );
}
