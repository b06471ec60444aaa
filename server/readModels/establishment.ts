import type { Sequelize } from 'sequelize';
import { DEFAULT_SCHEDULE, sowingOutlook, stageOn } from '@/scheduling/establishment';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { loadGauge, loadWeather } from '@/server/commands/budgetFacts';
import { currentSchedule, defaultSchedule } from '@/server/commands/ensureSchedule';
import { isRunningSowing, soilTemperaturesFrom, weatherNeededFrom, yardWeather } from '@/server/commands/yardWeather';
import { notFound } from '@/server/errors';
import { Yard, Zone } from '@/server/models';
import { presentSeenStage } from '@/server/presenters/ground';
import { presentProposal, presentSchedule } from '@/server/presenters/proposals';
import type { EstablishmentResponse } from '@/shared/contracts/proposals';
import { civilDayAt } from '@/shared/time';
import { readProposals } from './proposals';
import { readSeenStages } from './readGround';
import { readSetCounts, type SetCount } from './setCounts';

/** Days shown before today and from today on: three weeks back, and as far as the plan goes. */
const daysBack = 21;
const daysAhead = 10;

/** Doses of a zone on one day out of those of its positions: a dose is done when every position has it. */
function dosesOf(counts: readonly SetCount[]): { plannedDoses: number; doneDoses: number; skippedDoses: number; appliedMm: number } {
  const positions = Math.max(1, counts.length);
  const share = (count: (each: SetCount) => number) => Math.round((counts.reduce((sum, each) => sum + count(each), 0) / positions) * 100) / 100;
  return {
    plannedDoses: counts.reduce((most, each) => Math.max(most, each.planned), 0), doneDoses: share((each) => each.done), skippedDoses: share((each) => each.skipped),
    appliedMm: counts.reduce((sum, each) => sum + each.appliedMm, 0),
  };
}

/**
 * How a sowing stands: its stage by soil heat, its schedule, and planned against done by day.
 * @throws AppError not_found for a zone that is not in the yard, or has no running sowing
 */
export async function readEstablishment(database: Sequelize, yardId: string, zoneId: string, now: Date): Promise<EstablishmentResponse> {
  const [yard, zone, scheduleRow] = await Promise.all([Yard.findByPk(yardId), Zone.findOne({ where: { yardId, id: zoneId, archivedAt: null } }), currentSchedule(yardId, zoneId)]);
  const seededOn = zone?.seededOn ?? null;
  if (yard === null || zone === null) {
    throw notFound('zone');
  }
  const today = civilDayAt(now, yard.timeZone);
  if (seededOn === null || !isRunningSowing(seededOn, today)) {
    throw notFound('sowing');
  }
  const reports = await readSeenStages(database, yardId, zoneId, seededOn);
  const weatherFrom = weatherNeededFrom(today, today, [seededOn]);
  const [stored, gauge] = await Promise.all([loadWeather(database, yardId, weatherFrom), loadGauge(database, yardId, weatherFrom)]);
  const weather = yardWeather({ latitudeDeg: yard.latitudeDeg, elevationM: yard.elevationM }, stored, gauge, weatherFrom, addDays(today, daysAhead));
  const schedule = scheduleRow?.schedule ?? DEFAULT_SCHEDULE;
  const sowing = { sownOn: seededOn, grass: zone.grass, schedule, dailySoilTempsC: weather === null ? [] : soilTemperaturesFrom(weather, seededOn), seen: [...reports].reverse() };
  const fromOn = [addDays(today, -daysBack), seededOn < today ? seededOn : today].sort()[1] ?? today;
  const dayCount = daysBetween(fromOn, today) + daysAhead;
  const outlook = sowingOutlook({ ...sowing, startOn: fromOn, days: Array.from({ length: dayCount }, () => ({ sunriseMinutes: null, sunsetMinutes: null })) });
  const standing = stageOn({ ...sowing, on: today });
  const counts = (await readSetCounts(database, [yardId], fromOn, addDays(today, daysAhead - 1), now)).filter((count) => count.zoneId === zoneId && count.kind === 'dose');
  const open = (await readProposals(database, yardId)).find((proposal) => proposal.zoneId === zoneId && proposal.status === 'open');
  return {
    zoneId, zoneName: zone.name, seededOn, grass: zone.grass, dayNumber: standing.dayNumber, stage: standing.stage,
    stageRange: { emergenceFromOn: standing.firstUpOn.fast, emergenceToOn: standing.firstUpOn.slow },
    schedule: presentSchedule(scheduleRow?.schedule ?? defaultSchedule), scheduleIsDefault: scheduleRow?.isDefault ?? true,
    days: outlook.stageByDay.map((stage, index) => {
      const on = addDays(fromOn, index);
      return { on, stage, ...dosesOf(counts.filter((count) => count.on === on)) };
    }),
    openProposal: open ? presentProposal(open) : null,
    seen: reports.map(presentSeenStage), stageFrom: reports[0]?.stage === standing.stage ? 'seen' : 'heat',
  };
}
