import { DEFAULT_SCHEDULE, sowingOutlook } from '@/scheduling/establishment';
import { planDefaults } from '@/scheduling/planning/planDefaults';
import type { AlreadyApplied, LeftOut, PlanDay, PlanDose, PlanInput, PlanPosition, PlanSeed, PlanZone } from '@/scheduling/planning';
import { morningDepletionMm } from '@/scheduling/budget';
import { COMPACTION_INTAKE_FACTOR, steadyIntakeMmPerHour } from '@/scheduling/soil';
import { addDays, daysBetween, weekdayOf } from '@/scheduling/units/civilDay';
import { minutesAt } from '@/shared/time';
import type { LockedYard } from './lockYard';
import type { BegunSet, PlanFacts } from './planFacts';
import { limitsOfPosition, limitsOfYard } from './planLimits';
import { toPlanRules } from './planRules';
import { HORIZON_DAYS, type YardBudget, type ZoneBudget } from './recomputeBudget';
import { daylightMinutes, skippedWindows, withoutWindows } from './wallClock';
import { isRunningSowing, openDemand, soilTemperaturesFrom } from './yardWeather';

const DAY_MINUTES = 1440;
const MINUTE_MS = 60_000;
/** The planner takes multipliers to 10; a test with a worse one is no pattern at all. */
const MULTIPLIER_AT_MOST = 10;

/** Puts the facts of a yard into the words of the planner. Pure: everything comes with the arguments. */
export function buildPlanInput(yard: LockedYard, budget: YardBudget, facts: PlanFacts, now: Date): PlanInput {
  const { today } = budget;
  const days = planDays(yard, budget, facts);
  const positions = facts.positions.filter((position) => budget.zones.some((zone) => zone.facts.id === position.zoneId));
  const own = facts.begun.filter((set) => positions.some((position) => position.id === set.positionId));
  return {
    startOn: today, dayCount: HORIZON_DAYS, days,
    notBeforeMinutes: Math.min(DAY_MINUTES, minutesAt(now, yard.timeZone) + runningMinutes(facts, now, yard.moveMinutes)),
    alreadyApplied: alreadyApplied(own, today, yard.timeZone),
    leftOut: leftOut(own),
    taps: facts.taps,
    zones: budget.zones.map((zone) => planZone(zone, budget, days, own, yard.timeZone)),
    positions: positions.map((position) => planPosition(position, budget.zones, facts)),
    rules: toPlanRules(facts.rules),
    ...limitsOfYard(facts.limits),
    moveMinutes: yard.moveMinutes, leadMinutes: planDefaults.leadMinutes, maxWindMps: planDefaults.maxWindMps,
  };
}

function planDays(yard: LockedYard, budget: YardBudget, facts: PlanFacts): PlanDay[] {
  const { weather, today } = budget;
  const open = openDemand(weather);
  const offset = daysBetween(weather.days[0]?.on ?? today, today);
  return Array.from({ length: HORIZON_DAYS }, (_, index): PlanDay => {
    const on = addDays(today, index);
    const told = weather.days[offset + index];
    const felt = open[offset + index];
    const weekday = weekdayOf(on);
    const hours = facts.hours.filter((window) => window.weekday === weekday).map(({ fromMinutes, toMinutes }) => ({ fromMinutes, toMinutes }));
    return {
      on, et0Mm: felt?.et0Mm ?? 0, rainMm: felt?.rainMm ?? 0, rainProbabilityPct: told?.rainProbabilityPct ?? null,
      tminC: told?.temperatures.tminC ?? 0, tmaxC: told?.temperatures.tmaxC ?? 0, windMps: told?.windAtTwoMetresMps ?? null,
      ...daylightMinutes(yard, on),
      homeWindows: withoutWindows(hours, skippedWindows(on, yard.timeZone)),
    };
  });
}

/** Minutes until the water of a running round can be off at every tap, moves counted [min]; 0 when none runs. Taps run beside each other. */
function runningMinutes({ begun, positions }: PlanFacts, now: Date, moveMinutes: number): number {
  const open = begun.filter((set) => set.roundStatus === 'running');
  const tapOf = (set: BegunSet) => positions.find((position) => position.id === set.positionId)?.tapId;
  return Math.max(0, ...[...new Set(open.map(tapOf))].map((tapId) => tapMinutes(open.filter((set) => tapOf(set) === tapId), now, moveMinutes)));
}

/** The same for the sets of one tap, which feeds one after the other. */
function tapMinutes(sets: readonly BegunSet[], now: Date, moveMinutes: number): number {
  const minutes = sets.reduce((sum, set) => {
    const planned = set.plannedMinutes + set.addedMinutes;
    if (set.status === 'waiting') {
      return sum + planned + moveMinutes;
    }
    const ran = set.startedAt === null ? 0 : (now.getTime() - set.startedAt.getTime()) / MINUTE_MS;
    return set.status === 'running' ? sum + Math.max(0, planned - ran) : sum;
  }, 0);
  return Math.ceil(minutes);
}

/** Net depth of a set: what it laid down, or will when its round goes on as planned [mm]. */
function netDepthMm(set: BegunSet): number {
  const willRun = set.roundStatus === 'running' && (set.status === 'waiting' || set.status === 'running');
  const grossMm = set.appliedMm ?? (willRun ? (set.rateMmPerHour * (set.plannedMinutes + set.addedMinutes)) / 60 : 0);
  return grossMm / set.runTimeMultiplier;
}

/** Today's sets that are done, run or will run; a skipped dose counts as one of no depth, so that it is not planned again. */
function alreadyApplied(begun: readonly BegunSet[], today: string, timeZone: string): AlreadyApplied[] {
  return begun
    .filter((set) => set.on === today && (set.kind === 'dose' || set.status !== 'skipped'))
    .map((set) => ({ positionId: set.positionId, atMinutes: minutesAt(set.plannedStartAt, timeZone), depthMm: netDepthMm(set) }));
}

function leftOut(begun: readonly BegunSet[]): LeftOut[] {
  return begun.filter((set) => set.kind === 'set' && set.status === 'skipped').map(({ positionId, on }) => ({ positionId, on }));
}

function planZone({ facts, days }: ZoneBudget, budget: YardBudget, planDaysAhead: readonly PlanDay[], begun: readonly BegunSet[], timeZone: string): PlanZone {
  const first = days[0];
  const totalAvailableMm = first?.totalAvailableMm ?? 0;
  return {
    id: facts.id, name: facts.name, areaM2: facts.areaM2, priority: facts.priority, resting: facts.resting,
    depletionMm: first ? morningDepletionMm(first) : 0,
    totalAvailableMm, refillLineMm: first?.refillLineMm ?? 0,
    demandMmByDay: planDaysAhead.map((_, index) => days[index]?.potentialEtMm ?? 0),
    intakeMmPerHour: steadyIntakeMmPerHour(facts.soil, facts.slopePct) * COMPACTION_INTAKE_FACTOR[facts.compaction],
    seed: planSeed(facts, budget, planDaysAhead, begun, timeZone),
  };
}

function planSeed(facts: ZoneBudget['facts'], budget: YardBudget, days: readonly PlanDay[], begun: readonly BegunSet[], timeZone: string): PlanSeed | null {
  const { today, weather } = budget;
  if (facts.seededOn === null || !isRunningSowing(facts.seededOn, today)) {
    return null;
  }
  const outlook = sowingOutlook({
    sownOn: facts.seededOn, grass: facts.grass, schedule: facts.schedule ?? DEFAULT_SCHEDULE, startOn: today,
    dailySoilTempsC: soilTemperaturesFrom(weather, facts.seededOn), seen: facts.seenStages,
    days: days.map(({ sunriseMinutes, sunsetMinutes }) => ({ sunriseMinutes, sunsetMinutes })),
  });
  const skipped = begun.filter((set) => set.zoneId === facts.id && set.kind === 'dose' && set.status === 'skipped' && set.on > today);
  return {
    dayNumber: outlook.dayNumber, stage: outlook.stage,
    dosesByDay: outlook.dosesByDay.map((doses, index) => withoutSkipped(doses, skipped.filter((set) => set.on === days[index]?.on), timeZone)),
  };
}

/** Doses of a coming day without those nearest to the times that somebody skipped. */
function withoutSkipped(doses: readonly PlanDose[], skipped: readonly BegunSet[], timeZone: string): PlanDose[] {
  const times = [...new Set(skipped.map((set) => minutesAt(set.plannedStartAt, timeZone)))];
  const nearest = new Set(times.map((time) => doses.reduce((best, dose, index) => (
    Math.abs(dose.atMinutes - time) < Math.abs((doses[best]?.atMinutes ?? Infinity) - time) ? index : best
  ), 0)));
  return doses.filter((_, index) => !nearest.has(index));
}

function planPosition(position: PlanFacts['positions'][number], zones: readonly ZoneBudget[], { limits }: PlanFacts): PlanPosition {
  const { rate } = position;
  const zone = zones.find((one) => one.facts.id === position.zoneId);
  return {
    id: position.id, name: position.name, zoneId: position.zoneId, tapId: position.tapId, hoseId: position.hoseId, sprinklerId: position.sprinklerId,
    sprinklerName: position.sprinklerName, rateMmPerHour: rate?.rateMmPerHour ?? null, rateIsDefault: rate?.rateIsDefault ?? true,
    runTimeMultiplier: Math.min(MULTIPLIER_AT_MOST, rate?.runTimeMultiplier ?? 1), lowQuarterUniformity: rate?.lowQuarterUniformity ?? null,
    zoneShare: Math.min(1, rate?.zoneShare ?? 0), sortOrder: position.sortOrder,
    depletionMm: zone?.patchDepletionMm[position.id] ?? null,
    ...limitsOfPosition(position, limits),
  };
}
