import type { ReactElement } from 'react';
import { CalculatorLater } from '@/components/calculators/CalculatorLater';

export default function SeedbedRoute(): ReactElement {
  return <CalculatorLater name="seedbed" />;
}
