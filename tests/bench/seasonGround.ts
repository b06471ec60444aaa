import { soakRain, stateAfter, stepZoneDay, zoneDemand, type BudgetZone, type ZoneDay, type ZoneDemand, type ZoneState } from '@/scheduling/budget';
import type { EstablishmentStage } from '@/scheduling/establishment';
import { intakeCurve, soakSteps, surfaceStorageMm } from '@/scheduling/soil';
import { budgetZoneOn, sowingDay, type SeasonPosition, type SeasonYard, type SeasonZone } from './seasonYards';
import type { SeasonWeather } from './seasonWeather';

/** A set that really ran. */
export interface RunSet {
  positionId: string;
  startMinutes: number;
  minutes: number;
}

/** Where the water of one patch went on one day [mm over the patch]. */
export interface PatchDay {
  position: SeasonPosition;
  zone: SeasonZone;
  day: ZoneDay;
  /** Laid down by the sprinkler on the patch. */
  grossMm: number;
  /** Ran off over the surface while the sprinkler ran. */
  runoffMm: number;
  /** Surplus of the well-watered spots, which passes below the roots there. */
  unevenMm: number;
}

const STEP_MINUTES = 5;

/** Part of a day's sets on one patch that the ground could not take [mm]. Between two sets standing water goes on soaking in. */
export function setRunoffMm(zone: SeasonZone, rateMmPerHour: number, sets: readonly RunSet[], moistness: number): number {
  const first = sets[0];
  if (!first) return 0;
  const curve = intakeCurve({ texture: zone.texture, slopePct: zone.slopePct, compaction: 'loose', moistness });
  if (rateMmPerHour <= curve.steadyMmPerHour) return 0;
  const endMinutes = Math.max(...sets.map((set) => set.startMinutes + set.minutes));
  const stepMm = (rateMmPerHour * STEP_MINUTES) / 60;
  const depths = Array.from({ length: Math.ceil((endMinutes - first.startMinutes) / STEP_MINUTES) }, (_, step) => {
    const from = first.startMinutes + step * STEP_MINUTES;
    const wetMinutes = sets.reduce((sum, set) => sum + Math.max(0, Math.min(from + STEP_MINUTES, set.startMinutes + set.minutes) - Math.max(from, set.startMinutes)), 0);
    return (stepMm * wetMinutes) / STEP_MINUTES;
  });
  return soakSteps(curve, depths, STEP_MINUTES / 60, surfaceStorageMm(zone.slopePct)).reduce((sum, step) => sum + step.runoffMm, 0);
}

/** Seasons are replayed many times; what the sun and the air want of a yard is reckoned once. */
const demandBySeason = new WeakMap<SeasonWeather, Map<string, Map<string, ZoneDemand[]>>>();

/** Demand of every zone on every day of the year's row; what a zone is may change with its sowing, what its light is does not. */
export function trueDemand(yard: SeasonYard, season: SeasonWeather): Map<string, ZoneDemand[]> {
  const known = demandBySeason.get(season)?.get(yard.id);
  if (known) return known;
  const weather = season.days.map((day) => day.weather);
  const reference = season.days.map((day) => day.reference);
  const demand = new Map(yard.zones.map((zone) => [zone.id, zoneDemand({ zone: budgetZoneOn(zone, season.days[0]?.on ?? '', false), site: season.site, weather, reference })]));
  demandBySeason.set(season, (demandBySeason.get(season) ?? new Map<string, Map<string, ZoneDemand[]>>()).set(yard.id, demand));
  return demand;
}

/** A depletion half-way to the refill line, where a record begins. */
export function halfWay(zone: BudgetZone, demand: ZoneDemand): ZoneState {
  const wet = stepZoneDay({ depletionMm: 0 }, zone, { on: demand.on, et0Mm: demand.et0Mm, shadedEt0Mm: demand.shadedEt0Mm, rainMm: demand.rainMm, irrigationMm: 0 });
  return { depletionMm: wet.refillLineMm / 2, rootDepthM: wet.rootDepthM };
}

/** State carried into a day: a seedbed is soaked before it is sown. */
export function stateInto(zone: SeasonZone, on: string, state: ZoneState): ZoneState {
  return sowingDay(zone, Number(on.slice(0, 4))) === on ? { depletionMm: 0 } : state;
}

/** The ground as it really is: every patch with its own balance, rain and sets taken by its intake. */
export class Ground {
  readonly states = new Map<string, ZoneState>();
  private readonly demand: Map<string, ZoneDemand[]>;

  constructor(private readonly yard: SeasonYard, private readonly season: SeasonWeather) {
    this.demand = trueDemand(yard, season);
    for (const position of yard.positions) {
      const zone = this.zoneOf(position);
      this.states.set(position.id, halfWay(budgetZoneOn(zone, season.days[season.fromIndex]?.on ?? '', true), this.demandAt(zone.id, season.fromIndex)));
    }
  }

  /** Lives through one day with the sets that ran on it. */
  live(index: number, sets: readonly RunSet[], stages: ReadonlyMap<string, EstablishmentStage>): PatchDay[] {
    return this.yard.positions.map((position) => {
      const zone = this.zoneOf(position);
      const { on, et0Mm, shadedEt0Mm, rainMm } = this.demandAt(zone.id, index);
      const own = sets.filter((set) => set.positionId === position.id).sort((a, b) => a.startMinutes - b.startMinutes);
      const grossMm = own.reduce((sum, set) => sum + (set.minutes * position.rateMmPerHour) / 60, 0);
      const budgetZone = budgetZoneOn(zone, on, true);
      const state = stateInto(zone, on, this.states.get(position.id) ?? { depletionMm: 0 });
      const before = stepZoneDay(state, budgetZone, { on, et0Mm, shadedEt0Mm, rainMm, irrigationMm: 0, stage: stages.get(zone.id) ?? null });
      const runoffMm = own.length === 0 ? 0 : setRunoffMm(zone, position.rateMmPerHour, own, Math.max(0, 1 - state.depletionMm / before.totalAvailableMm));
      const netMm = (grossMm - runoffMm) / position.runTimeMultiplier;
      const day = own.length === 0 ? before : stepZoneDay(state, budgetZone, { on, et0Mm, shadedEt0Mm, rainMm, irrigationMm: netMm, stage: stages.get(zone.id) ?? null });
      this.states.set(position.id, stateAfter(day));
      return { position, zone, day, grossMm, runoffMm, unevenMm: grossMm - runoffMm - netMm };
    });
  }

  demandAt(zoneId: string, index: number): ZoneDemand {
    const demand = this.demand.get(zoneId)?.[index];
    if (!demand) throw new Error(`No demand of ${zoneId} on day ${index}.`);
    return demand;
  }

  /** Rain of a day that enters the ground of a zone at a depletion [mm]. */
  soakedRainMm(zone: SeasonZone, index: number, moistness: number): number {
    const { rainMm, et0Mm } = this.demandAt(zone.id, index);
    return soakRain({ rainMm, et0Mm }, { texture: zone.texture, slopePct: zone.slopePct, compaction: 'loose' }, moistness).effectiveRainMm;
  }

  private zoneOf(position: SeasonPosition): SeasonZone {
    const zone = this.yard.zones.find((one) => one.id === position.zoneId);
    if (!zone) throw new Error(`${position.id} has no zone.`);
    return zone;
  }
}
