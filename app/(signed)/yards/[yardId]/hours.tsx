import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { HoursScreen } from '@/components/yard/HoursScreen';

export default function HoursRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <HoursScreen yardId={yardId} />;
}
