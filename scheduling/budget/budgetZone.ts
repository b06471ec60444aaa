import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';
import { GRASSES, type GrassId } from '@/scheduling/grass';
import { rootDepthOn, type SoilTexture } from '@/scheduling/soil';
import type { ZoneExposure } from '@/scheduling/sun';
import { daysBetween, requireRange, type CivilDay } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';
import { establishmentDemand, seededCoverFraction, stageByCalendar } from './establishmentDemand';
import type { RainGround } from './rainSoaking';
import { EVAPORATION_LAYER_M, FULL_COVER, surfaceStore } from './thinCover';

/** Trees whose roots drink from a zone's own root zone. */
export interface TreeRoots {
  /** Part of the zone's ground that they reach, 0-1 [–]. */
  share: number;
  /** What they take from the lawn's root zone over ET0 in the open [–]; null takes the default. */
  coefficient?: number | null;
}

/**
 * Water that trees take from a lawn's root zone over ET0 in the open, where they reach: half of the 0.5 of ordinary landscape trees (Costello and Jones,
 * species factor), the other half coming from deeper ground [–]. A default, common practice.
 */
export const TREE_ROOT_COEFFICIENT = 0.25;
export const TREE_ROOT_SOURCE = 'default: half of a species factor of 0.5 (Costello and Jones) comes from the depth of the grass roots (common practice)';

/** What the budget needs to know of a zone. Null takes the marked default; what is left out altogether is not reckoned with. */
export interface BudgetZone {
  grass: GrassId;
  texture: SoilTexture;
  /** Hours of direct sun [h]; null where nothing shades the zone. */
  sunHours: number | null;
  /** Day on which those hours were seen; null lets them hold on every day as they are. */
  sunHoursOn?: CivilDay | null;
  /** Part of the sky seen, 0-1; null takes the default of the sun hours. */
  skyView?: number | null;
  /** Light through the year from obstacles or a diary; it overrules the hours above. */
  exposure?: ZoneExposure | null;
  /** Day of sowing; null for an established lawn. */
  sownOn: CivilDay | null;
  /** Probed rooting depth of the grown lawn [m]. */
  rootDepthM?: number | null;
  /** Kc of the grown lawn, where somebody tuned it [–]. */
  cropCoefficient?: number | null;
  /** Management-allowed depletion, where somebody set it [–]; it is then taken as it is, without adjustment for demand. */
  depletionFraction?: number | null;
  /** Reckons thin and seeded ground with a surface layer that dries by itself. An established lawn of full cover is not changed by it. */
  surfaceLayer?: boolean;
  /** Part of an established lawn's ground that leaves cover, 0-1 [–]; full when left out. Counts with `surfaceLayer` only. */
  coverFraction?: number | null;
  treeRoots?: TreeRoots | null;
  /** Latitude for roots that change with the season [°]. */
  rootSeasonLatitudeDeg?: number | null;
  /** Ground on which fast rain may run off; left out, all rain above a sprinkle enters. */
  rainGround?: RainGround | null;
  /** Rests in summer by choice. */
  resting?: boolean;
  /** Reckons with killing frost and snow. */
  winter?: boolean;
}

/** Demand, store and stage of a zone on a day, before its water. */
export interface ZoneSetting {
  /** Kc without a surface layer [–]. */
  cropCoefficient: number;
  /** Kc of full cover [–]. */
  grownCoefficient: number;
  /** fc where the surface layer is reckoned with; null where the single coefficient serves [–]. */
  thinCover: number | null;
  rootDepthM: number;
  totalAvailableMm: number;
  stage: EstablishmentStage | null;
  assumptions: Assumption[];
}

const THIN_SOURCE = 'FAO-56 chapters 7 and 9';

/** Names the evaporable water taken for the surface layer of a soil. */
function surfaceAssumption(texture: SoilTexture, rootDepthM: number): Assumption {
  const { tewMm, rewMm } = surfaceStore(texture, rootDepthM);
  const layerM = Math.min(EVAPORATION_LAYER_M, rootDepthM);
  return {
    field: 'surfaceLayer', method: `the top ${Number(layerM.toFixed(3))} m of this soil gives ${tewMm.toFixed(1)} mm to evaporation, ${rewMm.toFixed(1)} mm of it freely`,
    source: 'default of the soil, FAO-56 (73) and table 19',
  };
}

/**
 * Works out what a zone is on a day.
 * @param stage - stage of its sowing, where known
 * @param shadedEt0Mm - ET0 in the zone's own light [mm]
 * @throws PhysicsError for impossible zones, with the field named
 */
export function zoneSetting(zone: BudgetZone, on: CivilDay, stage: EstablishmentStage | null, shadedEt0Mm: number): ZoneSetting {
  const roots = rootDepthOn({
    grass: zone.grass, texture: zone.texture, probedM: zone.rootDepthM ?? null, sownOn: zone.sownOn, on, latitudeDeg: zone.rootSeasonLatitudeDeg ?? null,
  });
  const tuned = zone.cropCoefficient ?? null;
  if (tuned !== null) requireRange('cropCoefficient', tuned, 0, 2);
  const cover = zone.coverFraction ?? null;
  if (cover !== null) requireRange('coverFraction', cover, 0, 1);
  const grass = GRASSES[zone.grass];
  const grownCoefficient = tuned ?? grass.cropCoefficient;
  const { rootDepthM, totalAvailableMm } = roots;
  const shared = { grownCoefficient, rootDepthM, totalAvailableMm };
  const assumptions: Assumption[] = [...roots.assumptions];
  if (zone.sownOn === null) {
    if (tuned === null) assumptions.push({ field: 'cropCoefficient', method: `coefficient ${grass.cropCoefficient} taken for this grass`, source: grass.cropCoefficientSource });
    const thinCover = zone.surfaceLayer === true && cover !== null && cover < FULL_COVER ? cover : null;
    if (thinCover !== null) assumptions.push({ field: 'coverFraction', method: 'bare ground between thin grass evaporates by itself', source: THIN_SOURCE }, surfaceAssumption(zone.texture, rootDepthM));
    return { ...shared, cropCoefficient: grownCoefficient, thinCover, stage: null, assumptions };
  }
  const daysSinceSowing = daysBetween(zone.sownOn, on);
  if (zone.surfaceLayer === true) {
    const now = stage ?? stageByCalendar(daysSinceSowing, zone.grass);
    const seededCover = seededCoverFraction(daysSinceSowing, now);
    if (seededCover < FULL_COVER) {
      if (stage === null) assumptions.push({ field: 'stage', method: 'stage taken from the days since sowing', source: 'thermal clock at a default temperature' });
      assumptions.push({ field: 'coverFraction', method: 'cover taken from stage and days since sowing', source: 'common practice' }, surfaceAssumption(zone.texture, rootDepthM));
      return { ...shared, cropCoefficient: grownCoefficient, thinCover: seededCover, stage: now, assumptions };
    }
  }
  const demand = establishmentDemand({ grass: zone.grass, texture: zone.texture, daysSinceSowing, stage, et0Mm: shadedEt0Mm, grownCoefficient: tuned });
  assumptions.push(...demand.assumptions);
  return { ...shared, cropCoefficient: demand.cropCoefficient, thinCover: null, stage: demand.stage, assumptions };
}
