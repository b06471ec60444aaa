import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { PeopleScreen } from '@/components/people/PeopleScreen';

export default function PeopleRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <PeopleScreen yardId={yardId} />;
}
