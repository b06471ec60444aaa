import { dosesByHour, keepMoist, seedbedForecast, seedbedHours } from '@/scheduling/establishment';
import { bestMoveDistance, bestMoveInZone, griddedPattern } from '@/scheduling/sprinkler';
import { addDays } from '@/scheduling/units/civilDay';
import type { DailyWeather } from '@/scheduling/weather';
import { unknownWeather } from '@/scheduling/weather/continuousDays';

const side = 12;
const site = { latitudeDeg: 45, elevationM: 100 };

/** Twelve by twelve cups around a sprinkler, another cone each time. */
function pattern(variant: number) {
  const peak = 10 + (variant % 7);
  const middle = (side - 1) / 2;
  const rates = Array.from({ length: side }, (_, row) => Array.from({ length: side }, (__, column) => Math.max(0, peak - 1.8 * Math.hypot(row - middle, column - middle))));
  return griddedPattern(rates, 1, { column: middle, row: middle });
}

/** Ten drying days, cooler and wetter by turns. */
function weather(variant: number): DailyWeather[] {
  return Array.from({ length: 10 }, (_, index) => ({
    ...unknownWeather(addDays('2026-09-01', index)), tminC: 9 + ((index + variant) % 5), tmaxC: 22 + ((index * 3 + variant) % 9), tdewC: 8, windMps: 1 + ((index + variant) % 4), windHeightM: 2, solarMjM2: 14 + ((index + variant) % 8),
    precipitationMm: (index + variant) % 4 === 2 ? 6 : 0,
  }));
}

const soil = { fieldCapacity: 0.25, wiltingPoint: 0.095, intakeMmPerHour: 7 };
function bed(variant: number) {
  const days = weather(variant);
  const doses = dosesByHour(days.map(() => [570, 720, 840, 960].map((atMinutes) => ({ atMinutes, depthMm: 1.5 }))), 6, 'medium');
  return { hours: seedbedHours({ site, days }).hours, doses, ...soil };
}

const cases = {
  moveDistance: (variant: number) => bestMoveDistance({ pattern: pattern(variant), arrangement: 'square', count: 40 }).options.length,
  moveInZone: (variant: number) => bestMoveInZone({ pattern: pattern(variant), arrangement: 'square', zone: { widthM: 12, lengthM: 12 }, count: 40 }).options.length,
  seedbedForecast: (variant: number) => seedbedForecast(bed(variant)).hours.length,
  keepMoist: (variant: number) => keepMoist({ ...bed(variant), doses: [] }, { depthMm: 1.5, rateMmPerHour: 6 }).added.length,
};

/** Times the searches and forecasts and prints one JSON line: times [ms] of every one, and the least that one of them gave. */
function measure(): void {
  const found = Object.entries(cases).map(([name, run]) => {
    let least = Infinity;
    for (let variant = 0; variant < 30; variant += 1) least = Math.min(least, run(variant));
    const times: number[] = [];
    for (let variant = 0; variant < 100; variant += 1) {
      const from = performance.now();
      run(variant);
      times.push(performance.now() - from);
    }
    return [name, { times, least }] as const;
  });
  console.log(JSON.stringify(Object.fromEntries(found)));
}

measure();
