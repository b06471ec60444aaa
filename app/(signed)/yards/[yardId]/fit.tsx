import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { MonthFitScreen } from '@/components/fit/MonthFitScreen';

export default function FitRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <MonthFitScreen yardId={yardId} />;
}
