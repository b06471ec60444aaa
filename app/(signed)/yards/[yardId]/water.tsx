import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { WaterScreen } from '@/components/budget/WaterScreen';

export default function WaterRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <WaterScreen yardId={yardId} />;
}
