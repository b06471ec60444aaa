import type { ReactElement } from 'react';
import { colors, radius } from '@/components/theme/tokens';
import { Box, type BoxProps } from '@/components/ui/Box';

export interface CardProps extends BoxProps {
  /** `sheet` is the usual card; `hero` the one that answers the screen's question; `seed` for seeded ground. */
  tone?: 'sheet' | 'hero' | 'seed' | 'quiet';
}

const tones = {
  sheet: { backgroundColor: colors.sheet, borderColor: colors.line, borderRadius: radius.card },
  hero: { backgroundColor: colors.hero, borderColor: colors.hero, borderRadius: radius.hero },
  seed: { backgroundColor: colors.seedSheet, borderColor: colors.seedTint, borderRadius: radius.card },
  quiet: { backgroundColor: colors.neutralTint, borderColor: colors.neutralTint, borderRadius: radius.card },
} as const;

/** A sheet with rounded corners. Words on a `hero` take `color="onHero"` or `"onHeroSoft"`. A whole card is pressed through a `TextLink stretched` inside it. */
export function Card({ tone = 'sheet', padding = 16, gap = 8, style, ...rest }: CardProps): ReactElement {
  return <Box padding={padding} gap={gap} {...rest} style={[{ borderWidth: 1, overflow: tone === 'hero' ? 'hidden' : 'visible' }, tones[tone], style]} />;
}
