import type { ReactElement } from 'react';
import { PublicCupTestScreen } from '@/components/catch-test/PublicCupTestScreen';

export default function CupTestRoute(): ReactElement {
  return <PublicCupTestScreen />;
}
