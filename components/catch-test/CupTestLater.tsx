import { lazy, Suspense, type ReactElement } from 'react';
import { Skeleton } from '@/components/ui/Skeleton';
import type { CupTestProps } from './CupTest';

// One way in for both pages: what two chunks import would be moved to the code that every page loads first.
const CupTest = lazy(() => import('./CupTest'));

/** The catch-cup test, fetched when a page shows it. */
export function CupTestLater(props: CupTestProps): ReactElement {
  return <Suspense fallback={<Skeleton label="Loading the catch-cup test" height={480} />}><CupTest {...props} /></Suspense>;
}
