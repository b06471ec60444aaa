import type { ReactElement } from 'react';
import { NewYardScreen } from '@/components/set-up/NewYardScreen';

export default function NewYardRoute(): ReactElement {
  return <NewYardScreen />;
}
