import { healthRoutes } from '@/server/routes/health';
import type { Route } from '@/server/routes/route';

/** Every route of the API, in the order of its description. */
export const routes: Route[] = [
  ...healthRoutes,
];
