import type { Sequelize } from 'sequelize';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { isRunningSowing } from '@/server/commands/yardWeather';
import type { PortfolioResponse } from '@/shared/contracts/proposals';
import { civilDayAt } from '@/shared/time';
import {
  readPortfolioBudget, readPortfolioPlans, readPortfolioYards, readPortfolioZones, type PortfolioBudgetDay, type PortfolioPlan, type PortfolioYard, type PortfolioZone,
} from './portfolioFacts';
import { readSetCounts, type SetCount } from './setCounts';

type YardOfPortfolio = PortfolioResponse['yards'][number];
type Need = NonNullable<YardOfPortfolio['need']>;

const shownDays = 14;
/** Water that is this long past its end is no move in the making [min]. */
const stillOnAfterMinutes = 5;

/** The order in which needs press: running water first, then seed that dries, then what can wait a day, then what can wait a week. */
const pressing: Need['code'][] = [
  'water_still_on', 'surface_drying', 'seed_missed_doses', 'past_refill_line', 'not_started', 'does_not_fit', 'set_up_unfinished', 'no_catch_test', 'proposal_waiting',
];
/** Reasons of a plan that tell why a yard has nothing to do, the most telling first. */
const telling = ['held_for_rain', 'resting', 'doses_left_to_rain', 'frost', 'windy', 'closed_by_rule', 'nobody_home', 'rule_and_home_apart'];

interface YardFacts {
  yard: PortfolioYard;
  today: string;
  now: Date;
  zones: PortfolioZone[];
  budget: PortfolioBudgetDay[];
  plan: PortfolioPlan | undefined;
  counts: SetCount[];
}

const isSeeded = (zone: PortfolioZone, today: string) => zone.seededOn !== null && zone.seededOn <= today && isRunningSowing(zone.seededOn, today);

/** How far below field capacity a zone stands at the start of today, with what today brought so far taken off [mm]. */
const standingMm = (day: PortfolioBudgetDay) => day.depletionStartMm - day.irrigationMm - day.effectiveRainMm;

function waterStillOn({ yard, now }: YardFacts): Need | null {
  const minutesPast = yard.waterDueAt === null ? 0 : Math.floor((now.getTime() - yard.waterDueAt.getTime()) / 60_000);
  return minutesPast < stillOnAfterMinutes ? null : { code: 'water_still_on', urgent: true, values: { minutesPast } };
}

function seedMissedDoses({ zones, counts, today }: YardFacts): Need | null {
  const missed = zones.filter((zone) => isSeeded(zone, today)).map((zone) => {
    const doses = counts.filter((count) => count.zoneId === zone.zoneId && count.on === today && count.kind === 'dose');
    return { zone: zone.name, missed: Math.max(0, ...doses.map((count) => count.missed)), due: Math.max(0, ...doses.map((count) => count.missed + count.done)) };
  }).sort((a, b) => b.missed - a.missed)[0];
  return missed === undefined || missed.missed === 0 ? null : { code: 'seed_missed_doses', urgent: true, values: missed };
}

function notStarted({ counts, today }: YardFacts): Need | null {
  const late = counts.filter((count) => count.on === today && count.kind === 'set' && count.notStarted > 0);
  const starts = late.flatMap((count) => (count.firstStartMinutes === null ? [] : [count.firstStartMinutes]));
  return late.length === 0 || starts.length === 0
    ? null
    : { code: 'not_started', urgent: false, values: { sets: late.reduce((sum, count) => sum + count.notStarted, 0), startMinutes: Math.min(...starts) } };
}

/** The zone that is furthest past its refill line, of those that the plan does not water today or tomorrow. */
function pastRefillLine({ zones, budget, plan, today }: YardFacts): Need | null {
  const soon = new Set((plan?.nextSets ?? []).filter((next) => next.on <= addDays(today, 1)).map((next) => next.zoneId));
  const past = budget.flatMap((day) => {
    const zone = zones.find((each) => each.zoneId === day.zoneId);
    const depletionMm = standingMm(day);
    const concerns = zone !== undefined && day.on === today && !zone.resting && !isSeeded(zone, today) && !soon.has(day.zoneId) && depletionMm > day.refillLineMm;
    return concerns ? [{ zone: zone.name, depletionMm, refillLineMm: day.refillLineMm, overMm: depletionMm - day.refillLineMm, leftMm: day.totalAvailableMm - depletionMm }] : [];
  }).sort((a, b) => b.overMm - a.overMm)[0];
  if (past === undefined) {
    return null;
  }
  const { zone, depletionMm, refillLineMm, overMm, leftMm } = past;
  // more than half-way from the line to nothing left
  return { code: 'past_refill_line', urgent: overMm > leftMm, values: { zone, depletionMm, refillLineMm } };
}

function setUpUnfinished({ yard }: YardFacts): Need | null {
  const step = yard.taps === 0 ? 'tap' : yard.zones === 0 ? 'zone' : yard.positions === 0 ? 'position' : yard.homeWindows === 0 ? 'hours' : null;
  return step === null ? null : { code: 'set_up_unfinished', urgent: false, values: { step } };
}

const quiet = (code: Need['code'], when: boolean, values: Need['values']): Need | null => (when ? { code, urgent: false, values } : null);

/** The most pressing thing that a yard needs, null when it is on track. */
function needOf(facts: YardFacts): Need | null {
  const { yard, plan } = facts;
  const needs = [
    waterStillOn(facts), seedMissedDoses(facts), pastRefillLine(facts), notStarted(facts),
    quiet('does_not_fit', (plan?.shortZones ?? 0) > 0, { zones: plan?.shortZones ?? 0, shortMinutes: plan?.shortMinutes ?? 0 }),
    setUpUnfinished(facts),
    quiet('no_catch_test', yard.untestedPositions > 0, { positions: yard.untestedPositions }),
    quiet('proposal_waiting', yard.openProposals > 0, { proposals: yard.openProposals }),
  ].filter((need): need is Need => need !== null);
  return needs.sort((a, b) => pressing.indexOf(a.code) - pressing.indexOf(b.code))[0] ?? null;
}

function noteOf({ plan, today, zones }: YardFacts): YardOfPortfolio['note'] {
  const reasons = (plan?.zonesWithout.find((day) => day.on === today)?.zonesWithout ?? [])
    .flatMap((each) => each.reasons.map((reason) => ({ code: reason.code, values: { ...reason.values, zone: zones.find((zone) => zone.zoneId === each.zoneId)?.name ?? '' } })))
    .filter((reason) => telling.includes(reason.code));
  return reasons.sort((a, b) => telling.indexOf(a.code) - telling.indexOf(b.code))[0] ?? null;
}

/** The zone that stands nearest to its refill line, or past it, and its fourteen days. */
function rootZoneOf({ zones, budget, today }: YardFacts): Pick<YardOfPortfolio, 'rootZone' | 'rootZoneName'> {
  const standings = zones.map((zone) => {
    const days = budget.filter((day) => day.zoneId === zone.zoneId && day.on <= today);
    const last = days[days.length - 1];
    return { zone, days, nearness: last === undefined ? -Infinity : last.depletionEndMm / Math.max(last.refillLineMm, 0.1) };
  });
  const nearest = standings.filter((standing) => standing.days.length > 0).sort((a, b) => Number(a.zone.resting) - Number(b.zone.resting) || b.nearness - a.nearness)[0];
  return {
    rootZoneName: nearest?.zone.name ?? null,
    rootZone: (nearest?.days ?? []).map((day) => ({ on: day.on, depletionMm: day.depletionEndMm, refillLineMm: day.refillLineMm, totalAvailableMm: day.totalAvailableMm })),
  };
}

function presentYard(facts: YardFacts): YardOfPortfolio {
  const { yard, today, zones, counts } = facts;
  const past = counts.filter((count) => count.on <= today);
  const need = needOf(facts);
  return {
    yardId: yard.yardId, name: yard.name, placeName: yard.placeName, role: yard.role, owners: yard.owners, need, note: need === null ? noteOf(facts) : null,
    ...rootZoneOf(facts),
    setsPlanned: past.reduce((sum, count) => sum + (count.on === today ? count.done + count.missed : Math.max(count.planned, count.done)), 0),
    setsDone: past.reduce((sum, count) => sum + count.done, 0),
    seededZones: zones.flatMap((zone) => (zone.seededOn !== null && isSeeded(zone, today) ? [{ zoneId: zone.zoneId, name: zone.name, dayNumber: daysBetween(zone.seededOn, today) }] : [])),
    openProposals: yard.openProposals,
  };
}

const rankOf = (yard: YardOfPortfolio) => (yard.need === null ? pressing.length : pressing.indexOf(yard.need.code));

/**
 * All yards of a person with what each needs: those they are the consultant of first, then the most pressing need first. From stored rows, in five
 * queries however many yards there are.
 */
export async function readPortfolio(database: Sequelize, userId: string, now: Date): Promise<PortfolioResponse> {
  const yards = await readPortfolioYards(database, userId);
  const ids = yards.map((yard) => yard.yardId);
  const days = yards.map((yard) => civilDayAt(now, yard.timeZone)).sort();
  const first = days[0];
  const last = days[days.length - 1];
  if (first === undefined || last === undefined) {
    return { now: now.toISOString(), yards: [] };
  }
  const fromOn = addDays(first, 1 - shownDays);
  const [zones, budget, plans, counts] = await Promise.all([
    readPortfolioZones(database, ids), readPortfolioBudget(database, ids, fromOn, last), readPortfolioPlans(database, ids, first, last, now), readSetCounts(database, ids, fromOn, last, now),
  ]);
  const [zonesOf, budgetOf, countsOf] = [byYard(zones), byYard(budget), byYard(counts)];
  const planOf = new Map(plans.map((plan) => [plan.yardId, plan]));
  const shown = yards.map((yard) => {
    const today = civilDayAt(now, yard.timeZone);
    const isShown = ({ on }: { on: string }) => on > addDays(today, -shownDays);
    return presentYard({
      yard, today, now, zones: zonesOf.get(yard.yardId) ?? [], plan: planOf.get(yard.yardId),
      budget: (budgetOf.get(yard.yardId) ?? []).filter(isShown), counts: (countsOf.get(yard.yardId) ?? []).filter(isShown),
    });
  });
  return {
    now: now.toISOString(),
    yards: shown.sort((a, b) => Number(b.role === 'consultant') - Number(a.role === 'consultant') || rankOf(a) - rankOf(b)
      || Number(b.need?.urgent ?? false) - Number(a.need?.urgent ?? false) || a.name.localeCompare(b.name) || a.yardId.localeCompare(b.yardId)),
  };
}

function byYard<T extends { yardId: string }>(rows: readonly T[]): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const group = groups.get(row.yardId);
    if (group) {
      group.push(row);
    } else {
      groups.set(row.yardId, [row]);
    }
  }
  return groups;
}
