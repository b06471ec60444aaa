import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { PlanScreen } from '@/components/plan/PlanScreen';

export default function PlanRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <PlanScreen yardId={yardId} />;
}
