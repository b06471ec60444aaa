import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { TapScreen } from '@/components/bucket-test/TapScreen';

export default function TapRoute(): ReactElement {
  const { yardId, tapId } = useLocalSearchParams<{ yardId: string; tapId: string }>();
  return <TapScreen yardId={yardId} tapId={tapId} />;
}
