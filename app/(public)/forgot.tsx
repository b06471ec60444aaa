import type { ReactElement } from 'react';
import { ForgotScreen } from '@/components/account/ForgotScreen';

export default function ForgotRoute(): ReactElement {
  return <ForgotScreen />;
}
