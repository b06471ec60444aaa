import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { YardScreen } from '@/components/yard/YardScreen';

export default function YardRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <YardScreen yardId={yardId} />;
}
