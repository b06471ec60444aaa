import type { ReactElement } from 'react';
import { LandingScreen } from '@/components/landing/LandingScreen';
import { PublicShell } from '@/components/shell/PublicShell';

export default function Index(): ReactElement {
  return (
    <PublicShell>
      <LandingScreen />
    </PublicShell>
  );
}
