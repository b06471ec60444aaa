import type { ReactElement } from 'react';
import { CalculatorLater } from '@/components/calculators/CalculatorLater';

export default function HoseAndBucketRoute(): ReactElement {
  return <CalculatorLater name="hose-and-bucket" />;
}
