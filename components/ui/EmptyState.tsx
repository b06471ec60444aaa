import type { ReactElement, ReactNode } from 'react';
import { Discs } from '@/components/ui/Discs';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';

export interface EmptyStateProps {
  /** What is not there yet: "No catch-cup test yet". */
  title: string;
  /** What to do and what it will bring. */
  children: string;
  /** The button or link that does it. */
  action?: ReactNode;
  level?: 2 | 3;
}

/** What a list shows while it is empty: what to do next. */
export function EmptyState({ title, children, action, level = 2 }: EmptyStateProps): ReactElement {
  return (
    <Stack gap={8} padding={20} align="center" style={{ maxWidth: 480, alignSelf: 'center' }}>
      <Discs width={96} height={64} color="hose" opacity={0.14} discs={[{ x: 34, y: 32, r: 24 }, { x: 62, y: 30, r: 26 }, { x: 50, y: 46, r: 18 }]} />
      <Text variant="heading3" level={level} align="center">{title}</Text>
      <Text color="inkSoft" align="center">{children}</Text>
      {action}
    </Stack>
  );
}
