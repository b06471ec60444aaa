import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { SunScreen } from '@/components/sun/SunScreen';

export default function SunRoute(): ReactElement {
  const { yardId, zoneId } = useLocalSearchParams<{ yardId: string; zoneId: string }>();
  return <SunScreen yardId={yardId} zoneId={zoneId} />;
}
