import { Slot } from 'expo-router';
import type { ReactElement } from 'react';
import { SignedInOnly } from '@/components/account/SignedInOnly';

export default function SignedLayout(): ReactElement {
  return (
    <SignedInOnly>
      <Slot />
    </SignedInOnly>
  );
}
