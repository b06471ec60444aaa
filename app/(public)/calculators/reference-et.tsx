import type { ReactElement } from 'react';
import { CalculatorLater } from '@/components/calculators/CalculatorLater';

export default function ReferenceEtRoute(): ReactElement {
  return <CalculatorLater name="reference-et" />;
}
