import type { ReactElement } from 'react';
import { CalculatorLater } from '@/components/calculators/CalculatorLater';

export default function SoilStoreRoute(): ReactElement {
  return <CalculatorLater name="soil-store" />;
}
