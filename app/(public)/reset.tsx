import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { ResetScreen } from '@/components/account/ResetScreen';

export default function ResetRoute(): ReactElement {
  const { token } = useLocalSearchParams<{ token?: string }>();
  return <ResetScreen token={token} />;
}
