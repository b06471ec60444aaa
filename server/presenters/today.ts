import type { BegunRound, TodayRow } from '@/server/readModels/readToday';
import type { TodayResponse } from '@/shared/contracts/rounds';
import { civilDayAt, minutesAt } from '@/shared/time';
import { presentRounds, zonesStillWithout, type PresentedRound } from './plan';
import { isWeatherStale } from './water';

type TodayRound = TodayResponse['rounds'][number];

function stateOf(round: PresentedRound, begun: BegunRound | undefined, now: Date): TodayRound['state'] {
  if (begun !== undefined) {
    return begun.roundId === null ? 'skipped' : begun.status === 'running' ? 'running' : 'done';
  }
  return round.sets.every((set) => new Date(set.endAt) <= now) ? 'missed' : 'waiting';
}

/** The first screen of the day. */
export function presentToday(row: TodayRow, now: Date): TodayResponse {
  const today = row.planFromOn ?? civilDayAt(now, row.timeZone);
  const sets = row.sets ?? [];
  const hasWeather = row.weatherAnsweredAt !== null;
  return {
    now: now.toISOString(), today, nowMinutes: minutesAt(now, row.timeZone), yardName: row.yardName, timeZone: row.timeZone,
    weather: hasWeather || row.weather !== null ? {
      tminC: row.weather?.tminC ?? null, tmaxC: row.weather?.tmaxC ?? null, windMps: row.weather?.windMps ?? null, rainTodayMm: row.weather?.rainMm ?? null,
      nextRainOn: row.nextRainOn, sample: row.sample ?? false, asOf: row.weatherAnsweredAt?.toISOString() ?? null,
      stale: isWeatherStale(row.weatherAnsweredAt, row.weatherFailed ?? false, now),
    } : null,
    rounds: presentRounds(sets).map((round): TodayRound => {
      const begun = row.begun?.find((one) => one.roundIndex === round.roundIndex);
      return {
        ...round, kind: round.sets.some((set) => set.kind === 'set') ? 'set' : 'dose', state: stateOf(round, begun, now),
        roundId: begun?.roundId ?? null, skipCause: begun !== undefined && begun.roundId === null ? begun.skipCause : null,
      };
    }),
    runningRoundId: row.runningRoundId,
    zonesWithout: zonesStillWithout(row.zonesWithout ?? [], sets).map(({ zoneId, reasons }) => ({ zoneId, reasons })),
    missing: row.missing ?? (row.planFromOn === null && !hasWeather ? [{ code: 'no_weather', values: {} }] : []),
    nextSet: row.nextSet,
    zones: (row.zones ?? []).map((zone) => ({
      id: zone.id, name: zone.name, depletionMm: zone.depletionMm, refillLineMm: zone.refillLineMm, totalAvailableMm: zone.totalAvailableMm,
      isSeeded: zone.stage !== null && zone.stage !== 'established',
    })),
    openProposals: row.openProposals,
  };
}
