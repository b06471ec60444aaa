import type { ReactElement } from 'react';
import { CalculatorLater } from '@/components/calculators/CalculatorLater';

export default function MoveDistanceRoute(): ReactElement {
  return <CalculatorLater name="move-distance" />;
}
