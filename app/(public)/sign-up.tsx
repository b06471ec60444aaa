import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { SignUpScreen } from '@/components/account/SignUpScreen';

export default function SignUpRoute(): ReactElement {
  const { next, email } = useLocalSearchParams<{ next?: string; email?: string }>();
  return <SignUpScreen next={next} email={email} />;
}
