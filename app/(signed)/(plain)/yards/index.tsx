import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { YardsScreen } from '@/components/yards/YardsScreen';

export default function YardsRoute(): ReactElement {
  const { yard } = useLocalSearchParams<{ yard?: string }>();
  return <YardsScreen yardId={yard} />;
}
