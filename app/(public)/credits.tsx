import type { ReactElement } from 'react';
import { CreditsScreen } from '@/components/credits/CreditsScreen';

export default function CreditsRoute(): ReactElement {
  return <CreditsScreen />;
}
