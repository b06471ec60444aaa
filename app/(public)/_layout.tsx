import { Slot } from 'expo-router';
import type { ReactElement } from 'react';
import { DemonstrationBar } from '@/components/clock/DemonstrationBar';
import { PublicShell } from '@/components/shell/PublicShell';

export default function PublicLayout(): ReactElement {
  return (
    <PublicShell top={<DemonstrationBar />}>
      <Slot />
    </PublicShell>
  );
}
