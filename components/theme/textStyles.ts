import type { TextStyle } from 'react-native';
import { colors, fonts, typeSize } from '@/components/theme/tokens';

interface WebType {
  fontFamily: string;
  fontSize: string;
  lineHeight: string;
  fontWeight: number;
  letterSpacing: string;
  color: string;
}

// React Native types know only pixels; the web takes sizes relative to the reader's own text size, and weights between the hundreds.
function webType(type: WebType, more: TextStyle = {}): TextStyle {
  return { ...type, ...more } as unknown as TextStyle;
}

const rem = (px: number): string => `${px / 16}rem`;

function text(px: number, weight: number, lineHeight: number, color: string = colors.ink): TextStyle {
  return webType({ fontFamily: fonts.text, fontSize: rem(px), lineHeight: String(lineHeight), fontWeight: weight, letterSpacing: '0', color });
}

function display(px: number, lineHeight: number, more: TextStyle = {}): TextStyle {
  return webType({ fontFamily: fonts.display, fontSize: rem(px), lineHeight: String(lineHeight), fontWeight: 640, letterSpacing: '-0.02em', color: colors.ink }, more);
}

const tabular: TextStyle = { fontVariant: ['tabular-nums'] };

/** How each kind of text looks. */
export const textStyles = {
  body: text(typeSize.body, 400, 1.45),
  lead: text(typeSize.lead, 400, 1.45),
  small: text(typeSize.small, 400, 1.4, colors.inkSoft),
  label: text(typeSize.body, 600, 1.35),
  strong: text(typeSize.lead, 650, 1.3),
  heading1: display(typeSize.page, 1.14),
  heading2: display(typeSize.section, 1.16),
  heading3: display(typeSize.title, 1.2),
  figure: display(typeSize.page, 1.1, tabular),
  countdown: display(typeSize.countdown, 1, tabular),
} as const satisfies Record<string, TextStyle>;

/** The kinds of text. */
export type TextVariant = keyof typeof textStyles;
