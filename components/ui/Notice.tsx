import CircleAlert from 'lucide-react-native/icons/circle-alert';
import Droplet from 'lucide-react-native/icons/droplet';
import Info from 'lucide-react-native/icons/info';
import Sprout from 'lucide-react-native/icons/sprout';
import TriangleAlert from 'lucide-react-native/icons/triangle-alert';
import type { ReactElement, ReactNode } from 'react';
import { radius, type ColorName } from '@/components/theme/tokens';
import { Box } from '@/components/ui/Box';
import { Icon, type IconComponent } from '@/components/ui/Icon';
import { Text } from '@/components/ui/Text';

export interface NoticeProps {
  /** `info` a fact, `water` advice on water, `seed` about seeded ground, `caution` where work can hurt or break a rule, `problem` what went wrong. */
  tone?: 'info' | 'water' | 'seed' | 'caution' | 'problem';
  title?: string;
  children?: ReactNode;
  /** Buttons or links. */
  actions?: ReactNode;
  /** Reads itself out when it appears; on for `problem`. */
  announce?: boolean;
}

const looks: Record<NonNullable<NoticeProps['tone']>, { icon: IconComponent; word: string; background: ColorName; ink: ColorName }> = {
  info: { icon: Info, word: 'Note', background: 'neutralTint', ink: 'ink' },
  water: { icon: Droplet, word: 'Water', background: 'waterTint', ink: 'waterInk' },
  seed: { icon: Sprout, word: 'Seed', background: 'seedTint', ink: 'seedInk' },
  caution: { icon: TriangleAlert, word: 'Caution', background: 'sunTint', ink: 'ink' },
  problem: { icon: CircleAlert, word: 'Problem', background: 'dryTint', ink: 'dryInk' },
};

/** A few sentences that matter here, with an icon whose meaning is also heard. Children are words or elements. */
export function Notice({ tone = 'info', title, children, actions, announce = tone === 'problem' }: NoticeProps): ReactElement {
  const { icon, word, background, ink } = looks[tone];
  return (
    <Box role={announce ? 'alert' : undefined} background={background} padding={16} style={{ borderRadius: radius.card, flexDirection: 'row', gap: 12 }}>
      <Box style={{ paddingTop: 1 }}>
        <Icon icon={icon} label={word} color={ink} />
      </Box>
      <Box grow gap={4}>
        {title !== undefined && <Text variant="heading3" level="none" color={ink}>{title}</Text>}
        {typeof children === 'string' ? <Text color={ink}>{children}</Text> : children}
        {actions !== undefined && <Box gap={8} style={{ flexDirection: 'row', flexWrap: 'wrap', paddingTop: 8 }}>{actions}</Box>}
      </Box>
    </Box>
  );
}
