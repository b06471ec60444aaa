import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { TodayScreen } from '@/components/today/TodayScreen';

export default function TodayRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <TodayScreen yardId={yardId} />;
}
