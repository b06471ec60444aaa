import type { PlanInput, PlanResult } from '@/scheduling/planning';
import { lockYard, type LockedYard } from '@/server/commands/lockYard';
import { loadPlanFacts } from '@/server/commands/planFacts';
import { planDifference } from '@/server/commands/planDifference';
import { buildPlanInput } from '@/server/commands/planInput';
import { loadWishes, withWishes } from '@/server/commands/planWishes';
import { recomputeBudget } from '@/server/commands/recomputeBudget';
import { ensureFresh } from '@/server/commands/refreshYard';
import { updateZone } from '@/server/commands/yards/changeZones';
import type { FactChange } from '@/server/commands/yards/yardFacts';
import type { AppContext } from '@/server/context';
import { AppError, notFound } from '@/server/errors';
import { DayChange, PlanWishes } from '@/server/models';
import type { PlanChange, PlanSums, SetLine, WhatIfResponse } from '@/shared/contracts/wishes';
import { civilDayAt } from '@/shared/time';
import { putDayChange, putWishes } from './changeWishes';

/**
 * Keeps changes as facts of the yard, each through the command that a person would use by hand. The plan follows.
 * @throws AppError as those commands do
 */
export async function keepChanges(change: FactChange, changes: readonly PlanChange[]): Promise<void> {
  for (const one of changes) {
    await keepChange(change, one);
  }
}

async function keepChange(change: FactChange, one: PlanChange): Promise<void> {
  const { yardId } = change;
  if (one.kind === 'let_rest') {
    await updateZone(change, one.zoneId, { resting: true });
    return;
  }
  if (one.kind === 'day_off') {
    await putDayChange(change, one.on, { dayOff: true, extraWindows: [] });
    return;
  }
  if (one.kind === 'more_hours') {
    const before = await DayChange.findOne({ where: { yardId, on: one.on } });
    await putDayChange(change, one.on, { dayOff: false, extraWindows: [...(before?.extraWindows ?? []), { fromMinutes: one.fromMinutes, toMinutes: one.toMinutes }] });
    return;
  }
  const before = await PlanWishes.findByPk(yardId);
  const wishes = { priority: before?.priority ?? 'keep_green' as const, preferredWindows: before?.preferredWindows ?? [], monthCapLitres: before?.monthCapLitres ?? null };
  await putWishes(change, one.kind === 'priority' ? { ...wishes, priority: one.priority } : { ...wishes, monthCapLitres: one.litres });
}

/** Carries an answer out of a transaction that must leave nothing behind. */
class NothingKept<T> extends Error {
  constructor(readonly answer: T) {
    super('nothing is kept');
  }
}

interface Weighed {
  input: PlanInput;
  result: PlanResult;
}

async function planned(app: AppContext, yard: LockedYard, now: Date): Promise<Weighed> {
  const today = civilDayAt(now, yard.timeZone);
  const budget = await recomputeBudget(app, yard, today);
  if (budget === null) {
    throw new AppError('weather_unavailable', 'No weather is known for this place yet, so there is no plan to compare with.');
  }
  const facts = await loadPlanFacts(app.database, yard.id, today, now);
  const input = withWishes(buildPlanInput(yard, budget, facts, now), await loadWishes(app.database, yard, today));
  return { input, result: app.planner.plan(input) };
}

/**
 * Says how the plan would differ if things were otherwise. The changes are made as facts, planned with like any others, and taken back with the
 * transaction: what is shown is what would come of keeping them. Not to be called inside a transaction.
 * @throws AppError as the commands of the changes do, weather_unavailable
 */
export async function weighChanges(app: AppContext, change: FactChange, changes: readonly PlanChange[]): Promise<WhatIfResponse> {
  await ensureFresh(app, change.yardId);
  try {
    await app.database.transaction(async () => {
      const before = await planned(app, await heldYard(app, change.yardId), change.now);
      await keepChanges(change, changes);
      // Read again: a changed fact marks how far back the balance has to be reckoned anew.
      const after = await planned(app, await heldYard(app, change.yardId), change.now);
      throw new NothingKept(compared(before, after));
    });
  } catch (error) {
    if (error instanceof NothingKept) {
      return error.answer as WhatIfResponse;
    }
    throw error;
  }
  throw new Error('a weighing left its transaction without an answer');
}

async function heldYard(app: AppContext, yardId: string): Promise<LockedYard> {
  const yard = await lockYard(app.database, yardId);
  if (yard === null) {
    throw notFound('yard');
  }
  return yard;
}

function linesOf({ days }: PlanResult): SetLine[] {
  return days.flatMap((day) => day.rounds.flatMap((round) => round.sets.map(({ positionId, zoneId, kind, startMinutes, minutes }) => ({ positionId, zoneId, on: day.on, kind, startMinutes, minutes }))));
}

function sumsOf(result: PlanResult): PlanSums {
  const rounds = result.days.flatMap((day) => day.rounds);
  const sets = rounds.flatMap((round) => round.sets);
  return {
    sets: sets.filter((set) => set.kind === 'set').length, doses: sets.filter((set) => set.kind === 'dose').length, outings: rounds.length,
    moves: rounds.reduce((sum, round) => sum + round.moves.length, 0), minutes: sets.reduce((sum, set) => sum + set.minutes, 0), litres: sets.reduce((sum, set) => sum + set.litres, 0),
    shortLitres: result.shortages.reduce((sum, shortage) => sum + shortage.litres, 0), missedDoses: result.days.reduce((sum, day) => sum + day.missedDoses.length, 0),
  };
}

function compared(before: Weighed, after: Weighed): WhatIfResponse {
  const dryness = ({ input, result }: Weighed, zoneId: string) => {
    const line = input.zones.find((zone) => zone.id === zoneId)?.refillLineMm ?? 0;
    const ends = result.days.map((day) => day.endDepletionMm[zoneId] ?? 0);
    return { past: ends.filter((depletionMm) => depletionMm > line + 1e-6).length, worst: line <= 0 ? 0 : Math.max(0, ...ends) / line };
  };
  return {
    before: sumsOf(before.result), after: sumsOf(after.result), difference: planDifference(linesOf(before.result), linesOf(after.result)),
    risk: before.input.zones.map(({ id: zoneId }) => {
      const [was, is] = [dryness(before, zoneId), dryness(after, zoneId)];
      return { zoneId, daysPastBefore: was.past, daysPastAfter: is.past, worstBefore: was.worst, worstAfter: is.worst };
    }),
  };
}
