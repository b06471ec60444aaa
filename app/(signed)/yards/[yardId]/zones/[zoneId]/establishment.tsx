import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { EstablishmentScreen } from '@/components/establishment/EstablishmentScreen';

export default function EstablishmentRoute(): ReactElement {
  const { yardId, zoneId } = useLocalSearchParams<{ yardId: string; zoneId: string }>();
  return <EstablishmentScreen yardId={yardId} zoneId={zoneId} />;
}
