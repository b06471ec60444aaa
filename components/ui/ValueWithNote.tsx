import type { ReactElement } from 'react';
import { useIsNarrow } from '@/components/theme/breakpoints';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';

/** A value in a table cell with a small line under it, such as its range; at the right where tables become cards. */
export function ValueWithNote({ value, note }: { value: string; note: string }): ReactElement {
  const narrow = useIsNarrow();
  return (
    <Stack gap={0} align={narrow ? 'flex-end' : undefined}>
      <Text tabular>{value}</Text>
      {note === '' ? null : <Text variant="small" tabular align={narrow ? 'right' : undefined}>{note}</Text>}
    </Stack>
  );
}
