import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { SeasonScreen } from '@/components/season/SeasonScreen';

export default function SeasonRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <SeasonScreen yardId={yardId} />;
}
