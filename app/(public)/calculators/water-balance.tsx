import type { ReactElement } from 'react';
import { CalculatorLater } from '@/components/calculators/CalculatorLater';

export default function WaterBalanceRoute(): ReactElement {
  return <CalculatorLater name="water-balance" />;
}
