import type { ReactElement, ReactNode } from 'react';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';

/** One heading of the gallery with its specimens. */
export function Section({ title, children }: { title: string; children: ReactNode }): ReactElement {
  return (
    <Stack gap={12} role="region" aria-label={title} style={{ paddingTop: 20 }}>
      <Text variant="heading2">{title}</Text>
      {children}
    </Stack>
  );
}
