import type { ReactElement } from 'react';
import { CalculatorsScreen } from '@/components/calculators/CalculatorsScreen';

export default function CalculatorsRoute(): ReactElement {
  return <CalculatorsScreen />;
}
