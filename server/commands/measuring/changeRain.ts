import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { earliestFactOn, holdYard, todayAt, type FactChange } from '@/server/commands/yards/yardFacts';
import { invalidField, notFound } from '@/server/errors';
import { RainEntry } from '@/server/models';
import { limits } from '@/shared/limits';

async function checkDay(change: FactChange, on: string): Promise<void> {
  const yard = await holdYard(change);
  if (on > todayAt(yard, change.now)) {
    throw invalidField('on', 'That day has not come yet.');
  }
  if (on < earliestFactOn(yard, change.now)) {
    throw invalidField('on', `Rain is taken for the last ${limits.factDaysBack} days.`);
  }
}

async function tell(change: FactChange, verb: string, on: string, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'rain', subjectId: null, data: { on, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, on);
}

/** Keeps what the rain gauge showed for a day, in the place of what was told before. @throws AppError invalid_input */
export async function putRain(change: FactChange, on: string, depthMm: number): Promise<void> {
  await checkDay(change, on);
  const { yardId, userId, now } = change;
  const before = await RainEntry.findOne({ where: { yardId, on } });
  if (before?.depthMm === depthMm) {
    return;
  }
  await RainEntry.upsert({ yardId, on, depthMm, enteredBy: userId, updatedAt: now });
  await tell(change, 'rain.recorded', on, { depthMm, before: before?.depthMm ?? null });
}

/** Takes a reading back: the day's rain is the weather service's again. @throws AppError not_found, invalid_input */
export async function deleteRain(change: FactChange, on: string): Promise<void> {
  await checkDay(change, on);
  const entry = await RainEntry.findOne({ where: { yardId: change.yardId, on } });
  if (!entry) {
    throw notFound('rain gauge reading');
  }
  await entry.destroy();
  await tell(change, 'rain.deleted', on, { before: entry.depthMm });
}
