import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { InvitationScreen } from '@/components/invitation/InvitationScreen';

export default function InvitationRoute(): ReactElement {
  const { token } = useLocalSearchParams<{ token?: string }>();
  return <InvitationScreen token={token} />;
}
