import type { ReactElement } from 'react';
import { AccountScreen } from '@/components/account/AccountScreen';

export default function AccountRoute(): ReactElement {
  return <AccountScreen />;
}
