import type { ReactElement } from 'react';
import { ActionSpecimens } from '@/components/gallery/ActionSpecimens';
import { FormSpecimens } from '@/components/gallery/FormSpecimens';
import { ListSpecimens } from '@/components/gallery/ListSpecimens';
import { LookSpecimens } from '@/components/gallery/LookSpecimens';
import { WordSpecimens } from '@/components/gallery/WordSpecimens';
import { useTheme } from '@/components/theme/ThemeProvider';
import { Screen } from '@/components/ui/Screen';
import { Segmented } from '@/components/ui/Segmented';

/** Every primitive in every state, for those who build screens. */
export function GalleryScreen(): ReactElement {
  const { choice, setChoice } = useTheme();
  return (
    <Screen
      title="Gallery"
      headline="What screens are made of"
      kicker="For those who build Dapple"
      actions={
        <Segmented
          label="Theme"
          value={choice}
          onChange={setChoice}
          options={[{ value: 'system', label: 'System' }, { value: 'light', label: 'Morning' }, { value: 'dark', label: 'Before dawn' }]}
        />
      }
    >
      <LookSpecimens />
      <WordSpecimens />
      <ActionSpecimens />
      <FormSpecimens />
      <ListSpecimens />
    </Screen>
  );
}
