import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { RoundScreen } from '@/components/round/RoundScreen';

export default function RoundRoute(): ReactElement {
  const { yardId, roundId } = useLocalSearchParams<{ yardId: string; roundId: string }>();
  return <RoundScreen yardId={yardId} roundId={roundId} />;
}
