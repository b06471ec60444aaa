import { hoseAndBucketAnswer } from '@/scheduling/calculators/hoseAndBucketAnswer';
import { moveDistanceAnswer } from '@/scheduling/calculators/moveDistanceAnswer';
import { referenceEtAnswer } from '@/scheduling/calculators/referenceEtAnswer';
import { seedbedAnswer } from '@/scheduling/calculators/seedbedAnswer';
import { soilStoreAnswer } from '@/scheduling/calculators/soilStoreAnswer';
import { sunExposureAnswer } from '@/scheduling/calculators/sunExposureAnswer';
import { waterBalanceAnswer } from '@/scheduling/calculators/waterBalanceAnswer';
import type {
  hoseAndBucketRequestSchema, HoseAndBucketResponse, moveDistanceRequestSchema, MoveDistanceResponse, referenceEtRequestSchema, ReferenceEtResponse, seedbedRequestSchema, SeedbedResponse,
  soilStoreRequestSchema, SoilStoreResponse, sunExposureRequestSchema, SunExposureResponse, waterBalanceRequestSchema, WaterBalanceResponse,
} from '@/shared/contracts/calculators';
import type { z } from '@/shared/zod';

type Asked<S extends z.ZodType> = z.output<S>;

/** Reference ET of one day, with every term. @throws PhysicsError for impossible weather */
export function calculateReferenceEt({ latitudeDeg, elevationM, coastal, arid, clearSky, ...weather }: Asked<typeof referenceEtRequestSchema>): ReferenceEtResponse {
  return referenceEtAnswer({ latitudeDeg, elevationM, coastal, arid, clearSky, weather });
}

/** How far to move a sprinkler. @throws PhysicsError for an impossible pattern or distances */
export function calculateMoveDistance({ fromM, toM, count, ...question }: Asked<typeof moveDistanceRequestSchema>): MoveDistanceResponse {
  return moveDistanceAnswer({ ...question, ...(fromM === undefined ? {} : { fromM }), ...(toM === undefined ? {} : { toM }), ...(count === undefined ? {} : { count }) });
}

/** A bucket test and what another hose would bring. @throws PhysicsError for a flow that cannot be */
export function calculateHoseAndBucket(question: Asked<typeof hoseAndBucketRequestSchema>): HoseAndBucketResponse {
  return hoseAndBucketAnswer(question);
}

/** What a root zone holds and how long a set may run. @throws PhysicsError for impossible numbers */
export function calculateSoilStore(question: Asked<typeof soilStoreRequestSchema>): SoilStoreResponse {
  return soilStoreAnswer(question);
}

/** The water balance of a lawn. @throws PhysicsError for impossible weather or water */
export function calculateWaterBalance({ latitudeDeg, elevationM, days, ...question }: Asked<typeof waterBalanceRequestSchema>): WaterBalanceResponse {
  return waterBalanceAnswer({ ...question, site: { latitudeDeg, elevationM }, days: days.map(({ et0Mm, irrigationMm, ...weather }) => ({ et0Mm, irrigationMm, weather })) });
}

/** A seedbed's surface water by the hour. @throws PhysicsError for impossible weather, soil or doses */
export function calculateSeedbed({ latitudeDeg, elevationM, ...question }: Asked<typeof seedbedRequestSchema>): SeedbedResponse {
  const { forecast, hours, ...found } = seedbedAnswer({ ...question, site: { latitudeDeg, elevationM } });
  const { hours: surface, washingHours: _washingHours, ...rest } = forecast;
  return { ...rest, ...found, hours: hours.map((hour, index) => ({ ...hour, ...(surface[index] ?? { evaporationMm: 0, drainageMm: 0, runoffMm: 0, depletionMm: 0, isDry: false }) })) };
}

/** Sun of a zone through the months. @throws PhysicsError for impossible obstacles or places */
export function calculateSunExposure({ latitudeDeg, elevationM, coastal, ...question }: Asked<typeof sunExposureRequestSchema>): SunExposureResponse {
  return sunExposureAnswer({ ...question, site: { latitudeDeg, elevationM, coastal } });
}
