import type { ReactElement } from 'react';
import { CalculatorLater } from '@/components/calculators/CalculatorLater';

export default function SunExposureRoute(): ReactElement {
  return <CalculatorLater name="sun-exposure" />;
}
