import type { ReactElement } from 'react';
import type { CalculatorName } from './calculatorName';
import { HoseAndBucket } from './HoseAndBucket';
import { MoveDistance } from './MoveDistance';
import { ReferenceEt } from './ReferenceEt';
import { Seedbed } from './Seedbed';
import { SoilStore } from './SoilStore';
import { SunExposure } from './SunExposure';
import { WaterBalance } from './WaterBalance';

const calculators: Record<CalculatorName, () => ReactElement> = {
  'move-distance': MoveDistance, 'hose-and-bucket': HoseAndBucket, 'reference-et': ReferenceEt, 'soil-store': SoilStore, 'sun-exposure': SunExposure, 'water-balance': WaterBalance, seedbed: Seedbed,
};

/** One of the calculators by its name. */
export default function AllCalculators({ name }: { name: CalculatorName }): ReactElement {
  const Calculator = calculators[name];
  return <Calculator key={name} />;
}
