import { accountRoutes } from '@/server/routes/accounts';
import { healthRoutes } from '@/server/routes/health';
import { meRoutes } from '@/server/routes/me';
import { memberRoutes } from '@/server/routes/members';
import { roundRoutes } from '@/server/routes/rounds';
import type { Route } from '@/server/routes/route';

/** Every route of the API, in the order of its description. */
export const routes: Route[] = [
  ...healthRoutes,
  ...accountRoutes,
  ...meRoutes,
  ...memberRoutes,
  ...roundRoutes,
];
