import { Slot } from 'expo-router';
import type { ReactElement } from 'react';
import { DemonstrationBar } from '@/components/clock/DemonstrationBar';
import { AppShell } from '@/components/shell/AppShell';

export default function PlainLayout(): ReactElement {
  return (
    <AppShell top={<DemonstrationBar />}>
      <Slot />
    </AppShell>
  );
}
