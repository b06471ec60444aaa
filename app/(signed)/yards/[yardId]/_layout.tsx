import { Slot, useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { DemonstrationBar } from '@/components/clock/DemonstrationBar';
import { AppShell } from '@/components/shell/AppShell';
import { yardNavigation } from '@/components/shell/navigation';
import { useYard } from '@/components/data/useYard';

export default function YardLayout(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  const yard = useYard(yardId);
  return (
    <AppShell items={yardNavigation(yardId)} itemsTitle={yard.data?.name} top={<DemonstrationBar />}>
      <Slot />
    </AppShell>
  );
}
