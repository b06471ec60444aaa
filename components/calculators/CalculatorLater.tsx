import { lazy, Suspense, type ReactElement } from 'react';
import { Skeleton } from '@/components/ui/Skeleton';
import type { CalculatorName } from './calculatorName';

// One way in for all pages: what two chunks import would be moved to the code that every page loads first.
const AllCalculators = lazy(() => import('./AllCalculators'));

/** A calculator, fetched when its page is shown. */
export function CalculatorLater({ name }: { name: CalculatorName }): ReactElement {
  return <Suspense fallback={<main id="main" className="d-screen"><Skeleton label="Loading the calculator" height={480} /></main>}><AllCalculators name={name} /></Suspense>;
}
