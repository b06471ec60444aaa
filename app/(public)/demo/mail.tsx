import type { ReactElement } from 'react';
import { MailScreen } from '@/components/mail/MailScreen';

export default function MailRoute(): ReactElement {
  return <MailScreen />;
}
