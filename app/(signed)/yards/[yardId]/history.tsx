import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { HistoryScreen } from '@/components/history/HistoryScreen';

export default function HistoryRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <HistoryScreen yardId={yardId} />;
}
