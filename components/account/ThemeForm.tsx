import type { ReactElement } from 'react';
import { useTheme } from '@/components/theme/ThemeProvider';
import type { ThemeChoice } from '@/components/theme/themeChoice';
import { Segmented } from '@/components/ui/Segmented';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';

const options: readonly { value: ThemeChoice; label: string }[] = [
  { value: 'system', label: 'As the device' },
  { value: 'light', label: 'Morning' },
  { value: 'dark', label: 'Before dawn' },
];

/** Light or dark on this device. */
export function ThemeForm(): ReactElement {
  const { choice, setChoice } = useTheme();
  return (
    <Stack gap={12}>
      <Text variant="heading3" level={2}>Light or dark</Text>
      <Segmented label="Light or dark" options={options} value={choice} onChange={setChoice} />
    </Stack>
  );
}
