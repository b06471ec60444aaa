import { QueryTypes, type Sequelize } from 'sequelize';
import { stepZoneDay, zoneDemand } from '@/scheduling/budget';
import { DEFAULT_SCHEDULE } from '@/scheduling/establishment';
import { estimatedYear, recordedClimate } from '@/scheduling/planning/monthFitClimate';
import { monthFit } from '@/scheduling/planning/monthFit';
import type { FitDay, FitPosition, FitTap, FitZone, MonthFit } from '@/scheduling/planning/monthFitTypes';
import { planDefaults } from '@/scheduling/planning/planDefaults';
import { civilDayOf, addDays } from '@/scheduling/units/civilDay';
import type { WeatherSite } from '@/scheduling/weather';
import { loadBudgetZones, loadWeather, type BudgetZoneFacts } from '@/server/commands/budgetFacts';
import { toBudgetZone } from '@/server/commands/budgetOfZone';
import { ensureClimate, type ClimatePlace } from '@/server/commands/fetchClimate';
import { toPlanRules } from '@/server/commands/planRules';
import { isRunningSowing } from '@/server/commands/yardWeather';
import { zoneExposures } from '@/server/commands/zoneExposures';
import type { AppContext } from '@/server/context';
import { AppError, notFound } from '@/server/errors';
import { HomeWindow, WaterRule } from '@/server/models';
import { positionSql, ratesOf, type PositionRow } from '@/server/readModels/positionRates';
import { civilDayAt } from '@/shared/time';

/** A yard's year with what it rests on. */
export interface YardFit {
  fit: MonthFit;
  climate: { source: string; sample: boolean; isEstimated: boolean; asOfYear: number };
  /** What nobody told or measured; the minutes of a move where they are a default [min]. */
  defaults: { hours: boolean; flow: boolean; rates: number; moveMinutes: number | null };
  unservedZoneIds: string[];
}

/** Whole years of record that weigh a year: enough for a wet and a dry one. */
const YEARS_AT_MOST = 5;
/** The planner takes multipliers to 10; a test with a worse one is no pattern at all. */
const MULTIPLIER_AT_MOST = 10;
/** Days of stored weather by which a year is estimated where no record is to be had. */
const KNOWN_DAYS = 370;

interface FitYard extends ClimatePlace {
  elevationM: number;
  moveMinutes: number;
  moveMinutesIsDefault: boolean;
  addressDigit: number | null;
  waterStage: number;
}

interface Climate {
  days: FitDay[];
  source: string;
  sample: boolean;
  isEstimated: boolean;
  asOfYear: number;
}

/**
 * Hose-hours needed against had for every month of the coming year. Asks the weather service for past years the first time.
 * @throws AppError not_found for a yard that is gone, weather_unavailable while neither past years nor days of this one are known
 */
export async function readMonthFit(app: AppContext, yardId: string, now: Date): Promise<YardFit> {
  const { database } = app;
  const [yard] = await database.query<FitYard>(
    `SELECT id, latitude_deg AS "latitudeDeg", longitude_deg AS "longitudeDeg", time_zone AS "timeZone", elevation_m AS "elevationM",
       move_minutes AS "moveMinutes", move_minutes_is_default AS "moveMinutesIsDefault", address_digit AS "addressDigit", water_stage AS "waterStage"
     FROM yards WHERE id = $1`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  if (!yard) {
    throw notFound('yard');
  }
  const today = civilDayAt(now, yard.timeZone);
  const climate = await climateOf(app, yard, today);
  const facts = await loadBudgetZones(database, yardId, yard.timeZone);
  const positions = await loadPositions(database, yardId, now);
  const taps = await loadTaps(database, yardId);
  const hours = await HomeWindow.findAll({ where: { yardId } });
  const rules = await WaterRule.findAll({ where: { yardId }, order: [['createdAt', 'ASC'], ['id', 'ASC']] });
  const served = positions.filter((position) => facts.some((zone) => zone.id === position.zoneId));
  const fit = monthFit({
    startOn: today, climate: climate.days, zones: zonesOf(yard, facts, today), positions: served, taps: taps.map(({ id, name, flowLpm, shutOffTimer }) => ({ id, name, flowLpm, shutOffTimer })),
    rules: toPlanRules(rules), ruleFacts: { waterStage: yard.waterStage, ...(yard.addressDigit === null ? {} : { addressDigit: yard.addressDigit }) }, homeByWeekday: Array.from({ length: 7 }, (_, weekday) => hours.filter((window) => window.weekday === weekday).map(({ fromMinutes, toMinutes }) => ({ fromMinutes, toMinutes }))),
    moveMinutes: yard.moveMinutes, leadMinutes: planDefaults.leadMinutes,
  });
  return {
    fit, climate: { source: climate.source, sample: climate.sample, isEstimated: climate.isEstimated, asOfYear: climate.asOfYear },
    defaults: {
      hours: hours.some((window) => window.isDefault), flow: taps.some((tap) => tap.flowIsDefault && served.some((position) => position.tapId === tap.id)),
      rates: served.filter((position) => position.rateIsDefault).length, moveMinutes: yard.moveMinutesIsDefault ? yard.moveMinutes : null,
    },
    unservedZoneIds: facts.filter((zone) => !zone.resting && !served.some((position) => position.zoneId === zone.id)).map((zone) => zone.id),
  };
}

/** The years on record; where none are to be had, a year estimated from the days that are stored. */
async function climateOf(app: AppContext, yard: FitYard, today: string): Promise<Climate> {
  const site: WeatherSite = { latitudeDeg: yard.latitudeDeg, elevationM: yard.elevationM };
  const year = Number(today.slice(0, 4));
  const kept = await ensureClimate(app, yard, today);
  const years = new Set(kept?.records.map((day) => day.on.slice(0, 4)));
  const wanted = [...years].slice(-YEARS_AT_MOST);
  const days = kept === null ? [] : recordedClimate(site, kept.records.filter((day) => wanted.includes(day.on.slice(0, 4))));
  if (kept !== null && days.length >= 365) {
    return { days, source: kept.source, sample: kept.sample, isEstimated: false, asOfYear: Number(wanted[wanted.length - 1]) };
  }
  const stored = (await loadWeather(app.database, yard.id, addDays(today, -KNOWN_DAYS))).filter((day) => day.on < today);
  const known = recordedClimate(site, stored);
  if (known.length === 0) {
    throw new AppError('weather_unavailable', 'No weather is known for this place yet, so the year cannot be weighed. Look again later: Dapple asks anew each time.');
  }
  return { days: estimatedYear(site, `${today.slice(0, 7)}-01`, known), source: '', sample: false, isEstimated: true, asOfYear: year };
}

function zonesOf(yard: FitYard, facts: readonly BudgetZoneFacts[], today: string): FitZone[] {
  const exposures = zoneExposures(yard, facts.flatMap(({ id, horizonDeg }) => (horizonDeg === null ? [] : [{ id, horizonDeg }])));
  return facts.map((zone): FitZone => {
    const grown = { ...toBudgetZone(zone, yard.latitudeDeg, exposures.get(zone.id) ?? null), sownOn: null, resting: false, winter: false };
    const months = Array.from({ length: 12 }, (_, index) => {
      const on = civilDayOf({ year: Number(today.slice(0, 4)), month: index + 1, day: 15 });
      // The light of a month follows from an ordinary clear and cloudy day of it; temperatures hardly matter for a share.
      const weather = { on, tminC: 10, tmaxC: 22, tdewC: null, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: null, windHeightM: null, solarMjM2: null, sunshineHours: null, precipitationMm: 0 };
      const [felt] = zoneDemand({ zone: grown, site: yard, weather: [weather] });
      const day = felt && stepZoneDay({ depletionMm: 0 }, grown, { on, et0Mm: felt.et0Mm, shadedEt0Mm: felt.shadedEt0Mm, rainMm: 0, irrigationMm: 0 });
      return { share: felt && day && felt.et0Mm > 0 ? day.potentialEtMm / felt.et0Mm : 0, totalAvailableMm: day?.totalAvailableMm ?? 1, refillLineMm: day?.refillLineMm ?? 0 };
    });
    // Roots are deepest in early summer and shallower in the heat; the month in which most is wanted decides what a set can hold.
    const warmest = months.reduce((best, month) => (month.share > best.share ? month : best));
    const schedule = zone.schedule ?? DEFAULT_SCHEDULE;
    return {
      id: zone.id, name: zone.name, areaM2: zone.areaM2, priority: zone.priority, demandShareByMonth: months.map((month) => month.share),
      totalAvailableMm: warmest.totalAvailableMm, refillLineMm: warmest.refillLineMm, resting: zone.resting,
      sowing: zone.seededOn !== null && (zone.seededOn > today || isRunningSowing(zone.seededOn, today)) ? { sownOn: zone.seededOn, grass: zone.grass, schedule } : null,
    };
  });
}

async function loadPositions(database: Sequelize, yardId: string, now: Date): Promise<(FitPosition & { rateIsDefault: boolean })[]> {
  const rows = await database.query<PositionRow>(positionSql, { bind: [yardId, now], type: QueryTypes.SELECT });
  const rates = ratesOf(rows);
  const hoses = await database.query<{ id: string; lengthM: number; boreMm: number }>(
    'SELECT id, length_m AS "lengthM", bore_mm AS "boreMm" FROM hoses WHERE yard_id = $1', { bind: [yardId], type: QueryTypes.SELECT },
  );
  return rows.flatMap((row) => {
    const rate = rates.get(row.id);
    const hose = hoses.find((one) => one.id === row.hoseId);
    return rate === undefined ? [] : [{
      id: row.id, zoneId: row.zoneId, tapId: row.tapId, rateMmPerHour: rate.rateMmPerHour, runTimeMultiplier: Math.min(MULTIPLIER_AT_MOST, rate.runTimeMultiplier),
      wettedAreaM2: row.wettedAreaM2, hose: hose ? { lengthM: hose.lengthM, boreMm: hose.boreMm } : null, rateIsDefault: rate.rateIsDefault,
    }];
  });
}

function loadTaps(database: Sequelize, yardId: string): Promise<(FitTap & { flowIsDefault: boolean })[]> {
  return database.query<FitTap & { flowIsDefault: boolean }>(
    `SELECT id, name, flow_lpm AS "flowLpm", flow_is_default AS "flowIsDefault", shut_off_timer AS "shutOffTimer"
     FROM taps WHERE yard_id = $1 AND archived_at IS NULL ORDER BY id`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
}
