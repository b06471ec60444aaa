import type { ReactElement } from 'react';
import { FitScreen } from '@/components/fit/FitScreen';

export default function DoesItFitRoute(): ReactElement {
  return <FitScreen />;
}
