import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { SetUpScreen } from '@/components/set-up/SetUpScreen';

export default function SetUpRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <SetUpScreen yardId={yardId} />;
}
