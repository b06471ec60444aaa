import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { ConfirmScreen } from '@/components/account/ConfirmScreen';

export default function ConfirmRoute(): ReactElement {
  const { token } = useLocalSearchParams<{ token?: string }>();
  return <ConfirmScreen token={token} />;
}
