import { randomUUID } from 'node:crypto';
import { addDays } from '@/scheduling/units/civilDay';
import { ensureSchedule } from '@/server/commands/ensureSchedule';
import { reckonCupTest } from '@/server/commands/measuring/reckonCupTest';
import { BudgetDay, CatchTest, HomeWindow, Position, RoundSet, Zone } from '@/server/models';
import type { SetKind } from '@/shared/contracts/plans';
import type { RoundSetStatus, SkipCause } from '@/shared/contracts/rounds';
import { instantAt } from '@/shared/time';
import type { TestContext } from '../setup/testContext';
import { plannedRate, plannedYard, type PlannedYard } from './plannedYard';

/** Gives a planned yard what it lacks to be on track: hours at home and a catch-cup test of every position. */
export async function makeComplete(test: TestContext, yard: PlannedYard): Promise<void> {
  for (let weekday = 0; weekday < 7; weekday += 1) {
    await HomeWindow.create({ id: randomUUID(), yardId: yard.yardId, weekday, fromMinutes: 300, toMinutes: 1200, isDefault: false });
  }
  const input = { layout: { kind: 'row' as const, spacingM: 1, firstDistanceM: 1 }, reading: { kind: 'depth' as const }, minutes: 30, readings: [6, 6, 6, 6, 6, 6, 6, 6] };
  const result = reckonCupTest(input);
  for (const position of await Position.findAll({ where: { yardId: yard.yardId } })) {
    await CatchTest.create({
      id: randomUUID(), yardId: yard.yardId, positionId: position.id, ...input, wind: 'calm', rateMmPerHour: result.rateMmPerHour, lowQuarterUniformity: result.lowQuarterUniformity ?? 1,
      runTimeMultiplier: result.runTimeMultiplier, result, tapId: position.tapId, hoseId: position.hoseId ?? null, sprinklerId: position.sprinklerId, testedAt: test.clock.now(), testedBy: null,
      createdAt: test.clock.now(),
    });
  }
}

/** A planned yard whose only zone was sown on a civil day and has its default schedule. */
export async function seededYard(test: TestContext, options: { seededOn: string; positions?: number; name?: string }): Promise<PlannedYard> {
  const yard = await plannedYard(test, { positions: options.positions ?? 1, ...(options.name === undefined ? {} : { name: options.name }) });
  await Zone.update({ seededOn: options.seededOn, name: 'Seeded strip' }, { where: { id: yard.zoneId } });
  await ensureSchedule(yard.yardId, yard.zoneId, test.clock.now());
  return yard;
}

/** Puts a set on record as if it had been begun. */
export async function begunSet(yard: PlannedYard, wish: { on: string; startMinutes: number; status: RoundSetStatus; position?: number; kind?: SetKind; skipCause?: SkipCause; roundId?: string; startedAt?: Date; endedAt?: Date; minutes?: number; appliedMm?: number }): Promise<void> {
  const plannedStartAt = instantAt(wish.on, wish.startMinutes, yard.timeZone);
  const minutes = wish.minutes ?? 20;
  await RoundSet.create({
    id: randomUUID(), yardId: yard.yardId, roundId: wish.roundId ?? null, zoneId: yard.zoneId, positionId: yard.positionIds[wish.position ?? 0]!, kind: wish.kind ?? 'set', on: wish.on, roundIndex: 0,
    sortOrder: 0, plannedStartAt, plannedMinutes: minutes, ...plannedRate, zoneShare: 1 / yard.positionIds.length, status: wish.status, skipCause: wish.skipCause ?? null,
    startedAt: wish.startedAt ?? null, endedAt: wish.endedAt ?? null, minutesRun: wish.status === 'done' ? minutes : null, appliedMm: wish.appliedMm ?? null,
  });
}

/** Stores a balance for a row of days that begins on one and goes up to the last, the depletion at the end of each being told. It closes. */
export async function storedBudget(test: TestContext, yard: PlannedYard, lastOn: string, depletionsMm: number[], line = { refillLineMm: 15, totalAvailableMm: 30 }): Promise<void> {
  for (const [index, end] of depletionsMm.entries()) {
    const start = index === 0 ? 0 : depletionsMm[index - 1]!;
    const etcMm = Math.max(0, end - start);
    await BudgetDay.create({
      yardId: yard.yardId, zoneId: yard.zoneId, on: addDays(lastOn, index + 1 - depletionsMm.length), isForecast: false, et0Mm: etcMm, shadedEt0Mm: etcMm, cropCoefficient: 1, stressCoefficient: 1,
      etcMm, rainMm: 0, rainLossMm: 0, effectiveRainMm: 0, irrigationMm: Math.max(0, start - end), drainageMm: 0, rootGrowthMm: 0, depletionStartMm: start, depletionEndMm: end,
      ...line, rootDepthM: 0.15, rainSource: 'none', inputs: { assumptions: [] }, computedAt: test.clock.now(),
    });
  }
}
