import { accountRoutes } from '@/server/routes/accounts';
import { consultRoutes } from '@/server/routes/consult';
import { calculatorRoutes } from '@/server/routes/calculators';
import { equipmentRoutes } from '@/server/routes/equipment';
import { demonstrationRoutes } from '@/server/routes/demonstration';
import { fitRoutes } from '@/server/routes/fit';
import { groundRoutes } from '@/server/routes/ground';
import { healthRoutes } from '@/server/routes/health';
import { meRoutes } from '@/server/routes/me';
import { measuringRoutes } from '@/server/routes/measuring';
import { memberRoutes } from '@/server/routes/members';
import { permitRoutes } from '@/server/routes/permits';
import { placeRoutes } from '@/server/routes/places';
import { roundRoutes } from '@/server/routes/rounds';
import { waterRoutes } from '@/server/routes/water';
import { wishRoutes } from '@/server/routes/wishes';
import { yardRoutes } from '@/server/routes/yards';
import { zoneRoutes } from '@/server/routes/zones';
import type { Route } from '@/server/routes/route';

/** Every route of the API, in the order of its description. */
export const routes: Route[] = [
  ...healthRoutes,
  ...accountRoutes,
  ...meRoutes,
  ...memberRoutes,
  ...consultRoutes,
  ...placeRoutes,
  ...calculatorRoutes,
  ...yardRoutes,
  ...equipmentRoutes,
  ...zoneRoutes,
  ...measuringRoutes,
  ...groundRoutes,
  ...permitRoutes,
  ...roundRoutes,
  ...waterRoutes,
  ...wishRoutes,
  ...fitRoutes,
  ...demonstrationRoutes,
];
