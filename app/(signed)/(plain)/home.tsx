import type { ReactElement } from 'react';
import { HomeScreen } from '@/components/yards/HomeScreen';

export default function HomeRoute(): ReactElement {
  return <HomeScreen />;
}
