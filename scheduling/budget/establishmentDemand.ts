import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';
import { DEFAULT_SOIL_TEMPERATURE_C, stageOn } from '@/scheduling/establishment/stageOn';
import { GRASSES, type GrassId } from '@/scheduling/grass';
import { soilWater, type SoilTexture } from '@/scheduling/soil';
import { addDays } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';
import { seedbedCoefficient } from './bareSoil';

/** Days between wettings in each stage [d]. Iowa State Extension: daily until up, then less often and deeper, weekly after some mowings. */
export const STAGE_WETTING_INTERVAL_DAYS: Readonly<Record<EstablishmentStage, number>> = { sown: 1, coming_up: 1, rooting: 2, taper: 3, established: 4 };

/** Depth of one wetting in each stage, for the evaporation it feeds [mm]. Common practice. */
const STAGE_WETTING_MM: Readonly<Record<EstablishmentStage, number>> = { sown: 4, coming_up: 4, rooting: 8, taper: 12, established: 18 };

/** Most ground that leaves may cover in each stage [–], so that a late sowing is not counted as grown. Common practice. */
const STAGE_COVER_LIMIT: Readonly<Record<EstablishmentStage, number>> = { sown: 0, coming_up: 0.4, rooting: 0.8, taper: 1, established: 1 };

/** Days from sowing between which leaves close over the ground [d]. Common practice. */
export const COVER_DAYS = { from: 10, until: 60 } as const;

/** A sowing older than this is a lawn, whatever its clock says [d]. */
const SOWING_DAYS_AT_MOST = 366;
/** Any day: only the time since it counts. */
const SOME_DAY = '2001-01-01';

/**
 * Stage of a sowing of which nobody knows the soil temperatures: the thermal clock of `stageOn` at its default temperature.
 * @param daysSinceSowing - 0 on the day of sowing, negative before it [d]
 */
export function stageByCalendar(daysSinceSowing: number, grass: GrassId = 'cool_mix'): EstablishmentStage {
  if (daysSinceSowing > SOWING_DAYS_AT_MOST) return 'established';
  return stageOn({ sownOn: SOME_DAY, on: addDays(SOME_DAY, Math.max(-1, daysSinceSowing)), grass, dailySoilTempsC: [] }).stage;
}

/** Part of the ground that a sowing covers. @returns 0-1 [–] */
export function seededCoverFraction(daysSinceSowing: number, stage: EstablishmentStage): number {
  if (stage === 'established') return 1;
  const byCalendar = Math.min(1, Math.max(0, (daysSinceSowing - COVER_DAYS.from) / (COVER_DAYS.until - COVER_DAYS.from)));
  return Math.min(STAGE_COVER_LIMIT[stage], byCalendar);
}

/** Demand of a seeded zone. */
export interface EstablishmentDemand {
  /** Kc [–] */
  cropCoefficient: number;
  stage: EstablishmentStage;
  /** fc [–] */
  coverFraction: number;
  assumptions: Assumption[];
}

/** Input of `establishmentDemand`. */
export interface EstablishmentDemandInput {
  grass: GrassId;
  texture: SoilTexture;
  daysSinceSowing: number;
  /** Stage known from heat sums and reports; null takes the thermal clock at a default temperature. */
  stage: EstablishmentStage | null;
  /** ET0 in the zone's own light [mm/d]. */
  et0Mm: number;
  /** Kc of the grown lawn [–]; null takes the default of the grass. */
  grownCoefficient: number | null;
}

/**
 * Crop coefficient of a sowing: bare wet soil between the plants, grown grass where it covers, weighed by cover.
 * Source: FAO-56 annex 7 for the bare part; stages and cover are common practice
 */
export function establishmentDemand({ grass, texture, daysSinceSowing, stage, et0Mm, grownCoefficient }: EstablishmentDemandInput): EstablishmentDemand {
  const assumptions: Assumption[] = [];
  const now = stage ?? stageByCalendar(daysSinceSowing, grass);
  if (stage === null) assumptions.push({ field: 'stage', method: `stage taken from the days since sowing, with soil at ${DEFAULT_SOIL_TEMPERATURE_C} °C`, source: 'thermal clock at a default temperature' });
  const cover = seededCoverFraction(daysSinceSowing, now);
  const grown = grownCoefficient ?? GRASSES[grass].cropCoefficient;
  if (cover >= 1) return { cropCoefficient: grown, stage: now, coverFraction: 1, assumptions };
  const bare = seedbedCoefficient({
    et0Mm, intervalDays: STAGE_WETTING_INTERVAL_DAYS[now], depthMm: STAGE_WETTING_MM[now],
    soilClass: soilWater(texture).soilClass === 'coarse' ? 'coarse' : 'medium_or_fine',
  });
  assumptions.push({ field: 'cropCoefficient', method: 'wet bare soil between the seedlings', source: 'FAO-56 annex 7' });
  return { cropCoefficient: (1 - cover) * bare + cover * grown, stage: now, coverFraction: cover, assumptions };
}
