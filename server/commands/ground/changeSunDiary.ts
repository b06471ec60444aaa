import { horizonFromDiary, rangesOfTicks, type SunDiaryPage as DiaryPage } from '@/scheduling/sun';
import { epochDayOf } from '@/scheduling/units/civilDay';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { checkSunHoursOn } from '@/server/commands/yards/zoneFields';
import { holdYard, todayAt, type FactChange } from '@/server/commands/yards/yardFacts';
import { AppError, notFound } from '@/server/errors';
import { SunDiaryPage, Zone, type Yard } from '@/server/models';
import { limits } from '@/shared/limits';
import { instantAt } from '@/shared/time';
import { zoneInUse } from './zoneDays';

const NOON_MINUTES = 720;
const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;

/** Clock of a place at noon of a day [min east of UTC]. */
function utcOffsetMinutes(on: string, timeZone: string): number {
  return (epochDayOf(on) * DAY_MS + NOON_MINUTES * MINUTE_MS - instantAt(on, NOON_MINUTES, timeZone).getTime()) / MINUTE_MS;
}

/**
 * Keeps for a zone the horizon that all pages of its sun diary tell; none when it has no page. The budget takes its light from it in every month.
 * @throws PhysicsError for pages that no sun can have made
 */
async function storeHorizon(yard: Yard, zone: Zone): Promise<void> {
  const rows = await SunDiaryPage.findAll({ where: { yardId: yard.id, zoneId: zone.id }, order: [['on', 'ASC']] });
  const pages = rows.map(({ on, sunnyHours }): DiaryPage => ({
    on, utcOffsetMinutes: utcOffsetMinutes(on, yard.timeZone), sunny: rangesOfTicks(Array.from({ length: 24 }, (_, hour) => sunnyHours.includes(hour))),
  }));
  const { latitudeDeg, longitudeDeg } = yard;
  const horizonDeg = pages.length === 0 ? null : horizonFromDiary({ latitudeDeg, longitudeDeg, pages }).heightDeg.map((height) => Math.round(height * 100) / 100);
  await zone.update({ horizonDeg });
}

/** Tells the horizons of a yard's zones anew, after its place has changed. Inside the caller's transaction. */
export async function storeHorizonsOf(yard: Yard): Promise<void> {
  for (const zone of await Zone.findAll({ where: { yardId: yard.id }, order: [['id', 'ASC']] })) {
    if ((zone.horizonDeg ?? null) !== null) {
      await storeHorizon(yard, zone);
    }
  }
}

async function tell(change: FactChange, verb: string, zone: Zone, on: string, data: Record<string, unknown>, today: string): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'zone', subjectId: zone.id, data: { name: zone.name, on, ...data } }, change.now);
  // What the ground holds today rests on the light of the days before; they were reckoned with the light known then, as with every fact about a zone.
  await factsChanged(change.database, change.yardId, today);
}

/** Keeps the hours in which the sun fell on a zone on one day, in the place of what was told before. @throws AppError not_found, invalid_input, limit_reached */
export async function putSunDiaryPage(change: FactChange, zoneId: string, on: string, sunnyHours: readonly number[]): Promise<void> {
  const yard = await holdYard(change);
  const zone = await zoneInUse(change, zoneId);
  const today = todayAt(yard, change.now);
  checkSunHoursOn(on, today, 'on');
  const { yardId, userId, now } = change;
  const hours = [...sunnyHours].sort((a, b) => a - b);
  const before = await SunDiaryPage.findOne({ where: { yardId, zoneId, on } });
  if (before && before.sunnyHours.join() === hours.join()) {
    return;
  }
  if (before === null && await SunDiaryPage.count({ where: { yardId, zoneId } }) >= limits.sunDiaryPages) {
    throw new AppError('limit_reached', `A sun diary keeps ${limits.sunDiaryPages} days. Take an old one out first.`);
  }
  await SunDiaryPage.upsert({ yardId, zoneId, on, sunnyHours: hours, notedBy: userId, updatedAt: now });
  await storeHorizon(yard, zone);
  await tell(change, 'sun_diary.recorded', zone, on, { hours: hours.length }, today);
}

/** Takes a day out of the diary; without any the zone goes by its hours of sun again. @throws AppError not_found */
export async function deleteSunDiaryPage(change: FactChange, zoneId: string, on: string): Promise<void> {
  const yard = await holdYard(change);
  const zone = await zoneInUse(change, zoneId);
  const page = await SunDiaryPage.findOne({ where: { yardId: change.yardId, zoneId, on } });
  if (!page) {
    throw notFound('day of the sun diary');
  }
  await page.destroy();
  await storeHorizon(yard, zone);
  await tell(change, 'sun_diary.deleted', zone, on, { hours: page.sunnyHours.length }, todayAt(yard, change.now));
}
