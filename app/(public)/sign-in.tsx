import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { SignInScreen } from '@/components/account/SignInScreen';

export default function SignInRoute(): ReactElement {
  const { next } = useLocalSearchParams<{ next?: string }>();
  return <SignInScreen next={next} />;
}
