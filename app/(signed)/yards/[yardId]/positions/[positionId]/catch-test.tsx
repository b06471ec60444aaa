import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { CatchTestScreen } from '@/components/catch-test/CatchTestScreen';

export default function CatchTestRoute(): ReactElement {
  const { yardId, positionId } = useLocalSearchParams<{ yardId: string; positionId: string }>();
  return <CatchTestScreen yardId={yardId} positionId={positionId} />;
}
