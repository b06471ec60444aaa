import { yardPlanner } from '@/scheduling/planning';
import type { PlanInput, Planner } from '@/scheduling/planning/types';
import { dapple, fixedRule, inchLessRain, neverWaters, plannerWhoKnows } from '@/tests/bench/seasonControllers';
import { seasonForecast, stationClimate } from '@/tests/bench/seasonForecast';
import { patchwise } from '@/tests/bench/seasonPatchwise';
import { replaySeason, type ReplayedDay } from '@/tests/bench/seasonReplay';
import { seasonWeather, stationRecord, type SeasonWeather } from '@/tests/bench/seasonWeather';
import { SEASON_YARDS, positionAreaM2, type SeasonYard } from '@/tests/bench/seasonYards';

const record = stationRecord('Seattle');
const climate = stationClimate(record);
const season = seasonWeather('Seattle', 2014, record);
const forecast = seasonForecast(season, climate, 1);

function yardNamed(id: string): SeasonYard {
  const yard = SEASON_YARDS.find((one) => one.id === id);
  if (!yard) throw new Error(`No yard ${id}.`);
  return yard;
}

/** The season cut short, so that a test need not live through all of it. */
const shortened = (days: number): SeasonWeather => ({ ...season, toIndex: season.fromIndex + days });

/** A planner that keeps what it was told. */
function listening(): { planner: Planner; heard: PlanInput[] } {
  const heard: PlanInput[] = [];
  return { heard, planner: { name: 'listening', plan: (input) => { heard.push(input); return yardPlanner.plan(input); } } };
}

describe('a replayed season', () => {
  it.each([['tight', dapple(yardPlanner)], ['small', fixedRule(1.5)], ['typical', inchLessRain(1)]] as const)('loses no water and makes none on the yard %s', (id, maker) => {
    const yard = yardNamed(id);
    const lastDepletion = new Map<string, number>();
    let drawnL = 0;
    let days = 0;
    const sum = replaySeason(yard, season, forecast, maker, ({ patches, orders }: ReplayedDay) => {
      days += 1;
      for (const { position, day, grossMm, runoffMm, unevenMm } of patches) {
        const before = lastDepletion.get(position.id);
        // A seedbed is soaked before it is sown; every other day begins where the last one ended.
        if (before !== undefined && day.depletionStartMm !== 0) expect(day.depletionStartMm).toBeCloseTo(before, 9);
        lastDepletion.set(position.id, day.depletionEndMm);
        const intoGroundMm = day.rainMm - day.rainLossMm + grossMm - runoffMm - unevenMm;
        const closesMm = day.depletionEndMm - (day.depletionStartMm + day.rootGrowthMm + day.etcMm + day.drainageMm - intoGroundMm);
        expect(Math.abs(closesMm)).toBeLessThanOrEqual(0.01);
        expect(Math.min(runoffMm, unevenMm, grossMm)).toBeGreaterThanOrEqual(0);
        drawnL += (grossMm * positionAreaM2(yard, position)) / 0.9;
      }
      expect(orders.sets.every((set) => set.minutes > 0)).toBe(true);
    });
    expect(days).toBe(214);
    expect(sum.closingErrorMm).toBeLessThanOrEqual(0.01);
    // Nine tenths of what the tap gives falls on the patches.
    expect(drawnL / 1000).toBeCloseTo(sum.waterM3, 6);
    expect(sum.waterM3).toBeGreaterThan(10);
  });

  it('uses no water where nobody waters, and the grass suffers', () => {
    const sum = replaySeason(yardNamed('small'), season, forecast, neverWaters);
    expect(sum).toMatchObject({ waterM3: 0, outings: 0, moves: 0 });
    expect(sum.stressDays).toBeGreaterThan(30);
  });

  it.each([['three times a week', fixedRule], ['an inch a week less rain', inchLessRain]] as const)('of %s gives more water and less stress the more it is scaled up', (_, rule) => {
    const sums = [0.5, 1, 1.5].map((scale) => replaySeason(yardNamed('small'), season, forecast, rule(scale)));
    const [half, whole, more] = sums.map((sum) => sum.waterM3);
    expect(half).toBeLessThan(whole ?? 0);
    expect(whole).toBeLessThan(more ?? 0);
    const [much, some, little] = sums.map((sum) => sum.stressDays);
    expect(much).toBeGreaterThan(some ?? Infinity);
    expect(some).toBeGreaterThan(little ?? Infinity);
  });

  it('keeps the water of an inch a week within an inch a week', () => {
    const yard = yardNamed('small');
    const sum = replaySeason(yard, season, forecast, inchLessRain(1));
    const weeks = 214 / 7 + 1;
    expect(sum.waterM3).toBeLessThanOrEqual(((25.4 * weeks * 190) / 1000 / 0.9) * 1.01);
  });

  it('tells Dapple of the days ahead nothing but the forecast', () => {
    const shown = 25;
    const stormy: SeasonWeather = {
      ...shortened(shown),
      days: season.days.map((day, index) => (index < season.fromIndex + shown ? day : { ...day, weather: { ...day.weather, precipitationMm: 80, tmaxC: 41, tminC: 30 } })),
    };
    const plain = listening();
    const other = listening();
    replaySeason(yardNamed('tight'), shortened(shown), forecast, dapple(plain.planner));
    replaySeason(yardNamed('tight'), stormy, forecast, dapple(other.planner));
    expect(plain.heard).toHaveLength(shown);
    expect(other.heard).toEqual(plain.heard);
  });

  it('tells Dapple today by the forecast too, and yesterday as it was', () => {
    const told = listening();
    const days = 30;
    replaySeason(yardNamed('small'), shortened(days), forecast, dapple(told.planner));
    told.heard.forEach((input, day) => {
      const said = forecast.on(season.fromIndex + day);
      expect(input.days.map(({ rainMm }) => rainMm)).toEqual(said.map(({ weather }) => weather.precipitationMm));
      expect(input.days.map(({ rainProbabilityPct }) => rainProbabilityPct)).toEqual(said.map(({ rainProbabilityPct }) => rainProbabilityPct));
    });
    const truth = season.days.slice(season.fromIndex, season.fromIndex + days).map(({ weather }) => weather.precipitationMm);
    expect(told.heard.map(({ days: [today] }) => today?.rainMm)).not.toEqual(truth);
  });

  it('lets nobody who knows the weather suffer more than Dapple, nor the best of them use more water', () => {
    const yard = yardNamed('small');
    const own = replaySeason(yard, season, forecast, dapple(yardPlanner));
    const knowing = [plannerWhoKnows(yardPlanner, 20, 5), patchwise(1)].map((maker) => replaySeason(yard, season, forecast, maker));
    for (const sum of knowing) expect(sum.stressDays).toBeLessThanOrEqual(own.stressDays + 0.3);
    expect(Math.min(...knowing.map((sum) => sum.waterM3))).toBeLessThan(own.waterM3);
  });

  it('is the same every time', () => {
    const yard = yardNamed('tight');
    const once = replaySeason(yard, shortened(12), seasonForecast(season, climate, 1), dapple(yardPlanner));
    expect(replaySeason(yard, shortened(12), seasonForecast(season, climate, 1), dapple(yardPlanner))).toEqual(once);
  });
});
