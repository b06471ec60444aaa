import { QueryTypes, type Sequelize } from 'sequelize';
import type { MinuteWindow, PlanInput, PlanLock, PlanMonthCap } from '@/scheduling/planning';
import { DayChange, PlanWishes, SetLock } from '@/server/models';
import { addDays } from '@/scheduling/units/civilDay';
import { litresOfMonth } from '@/server/readModels/wishes';
import type { LockedYard } from './lockYard';

/** What people said of the plan besides the facts of the yard. */
export interface YardWishes {
  wishes: PlanWishes | null;
  dayChanges: DayChange[];
  locks: PlanLock[];
  previousPlan: PlanLock[];
  usedLitres: number;
}

/** Reads what a plan from a day on is wished to be, and what the plan before it said. */
export async function loadWishes(database: Sequelize, yard: Pick<LockedYard, 'id'>, today: string): Promise<YardWishes> {
  const yardId = yard.id;
  const wishes = await PlanWishes.findByPk(yardId);
  const dayChanges = (await DayChange.findAll({ where: { yardId }, order: [['on', 'ASC']] })).filter((change) => change.on >= today);
  const locks = (await SetLock.findAll({ where: { yardId }, order: [['on', 'ASC'], ['startMinutes', 'ASC'], ['id', 'ASC']] })).filter((lock) => lock.on >= today);
  const begun = await database.query<{ positionId: string; on: string }>(
    `SELECT DISTINCT position_id AS "positionId", "on"::text AS "on" FROM round_sets WHERE yard_id = $1 AND "on" >= $2 AND kind = 'set'`, { bind: [yardId, today], type: QueryTypes.SELECT },
  );
  const previousPlan = await database.query<PlanLock>(
    `SELECT position_id AS "positionId", "on"::text AS "on", start_minutes AS "startMinutes", minutes::float8 AS minutes FROM plan_sets
     WHERE yard_id = $1 AND "on" >= $2 AND kind = 'set' AND plan_id = (SELECT id FROM plans WHERE yard_id = $1 ORDER BY version DESC LIMIT 1) ORDER BY "on", start_minutes, position_id`,
    { bind: [yardId, today], type: QueryTypes.SELECT },
  );
  return {
    wishes, dayChanges, previousPlan,
    // What was begun or skipped has its own record: a lock has done its work.
    locks: locks.filter((lock) => !begun.some((set) => set.positionId === lock.positionId && set.on === lock.on)).map(({ positionId, on, startMinutes, minutes }) => ({ positionId, on, startMinutes, minutes })),
    usedLitres: wishes?.monthCapLitres == null ? 0 : await litresOfMonth(database, yardId, today.slice(0, 7)),
  };
}

/** The input of the planner with the wishes in it. Pure. */
export function withWishes(input: PlanInput, { wishes, dayChanges, locks, previousPlan, usedLitres }: YardWishes): PlanInput {
  return {
    ...input,
    days: input.days.map((day) => {
      const change = dayChanges.find((one) => one.on === day.on);
      return change === undefined ? day : { ...day, dayOff: change.dayOff, homeWindows: joined([...day.homeWindows, ...change.extraWindows]) };
    }),
    ...(wishes === null ? {} : { priority: wishes.priority, ...(wishes.preferredWindows.length === 0 ? {} : { preferredWindows: wishes.preferredWindows }) }),
    ...(wishes?.monthCapLitres == null ? {} : { monthCaps: monthCaps(input, wishes.monthCapLitres, usedLitres) }),
    lockedSets: locks, previousPlan,
  };
}

/** The cap of each civil month that the plan touches; what was used counts in the first. */
function monthCaps(input: PlanInput, capLitres: number, usedLitres: number): PlanMonthCap[] {
  const first = input.startOn.slice(0, 7);
  const last = addDays(input.startOn, input.dayCount - 1).slice(0, 7);
  return [...new Set([first, last])].map((month) => ({ month, capLitres, usedLitres: month === first ? usedLitres : 0 }));
}

/** Windows in order, those that touch or overlap made one. */
function joined(windows: readonly MinuteWindow[]): MinuteWindow[] {
  const result: MinuteWindow[] = [];
  for (const window of [...windows].sort((a, b) => a.fromMinutes - b.fromMinutes)) {
    const before = result[result.length - 1];
    if (before !== undefined && window.fromMinutes <= before.toMinutes) {
      before.toMinutes = Math.max(before.toMinutes, window.toMinutes);
    } else {
      result.push({ ...window });
    }
  }
  return result;
}
