import type { ReactElement } from 'react';
import { View } from 'react-native';
import { colors, radius, type ColorName } from '@/components/theme/tokens';
import { Icon, type IconComponent } from '@/components/ui/Icon';
import { Text } from '@/components/ui/Text';

/** What a short label is about. The words say it too. */
export type Tone = 'water' | 'dry' | 'seed' | 'shade' | 'hose' | 'neutral';

/** Ground and ink of a tone. */
export const toneColors: Record<Tone, { background: ColorName; ink: ColorName }> = {
  water: { background: 'waterTint', ink: 'waterInk' },
  dry: { background: 'dryTint', ink: 'dryInk' },
  seed: { background: 'seedTint', ink: 'seedInk' },
  shade: { background: 'shadeTint', ink: 'shadeInk' },
  hose: { background: 'hoseTint', ink: 'hose' },
  neutral: { background: 'neutralTint', ink: 'inkSoft' },
};

/** A few words in a pill. */
export function Tag({ label, tone = 'neutral', icon }: { label: string; tone?: Tone; icon?: IconComponent }): ReactElement {
  const { background, ink } = toneColors[tone];
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', alignSelf: 'flex-start', maxWidth: '100%', gap: 4, paddingHorizontal: 10, paddingVertical: 3, borderRadius: radius.pill, backgroundColor: colors[background] }}>
      {icon && <Icon icon={icon} size={16} color={ink} />}
      <Text variant="small" bold color={ink} style={{ flexShrink: 1 }}>{label}</Text>
    </View>
  );
}
