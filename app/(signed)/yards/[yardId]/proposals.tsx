import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { ProposalsScreen } from '@/components/establishment/ProposalsScreen';

export default function ProposalsRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <ProposalsScreen yardId={yardId} />;
}
