import { yearOfExposure } from '@/scheduling/sun';
import { addDays, dayOfYear } from '@/scheduling/units';
import { dailyEt0Row, type DailyWeather } from '@/scheduling/weather';
import { yardWithObstacles } from './yardWithObstacles';

const days = 10_000;
const rounds = 24;
const site = { latitudeDeg: 42, elevationM: 200 };

const weather: DailyWeather[] = Array.from({ length: days }, (_, index) => {
  const tminC = 8 + 9 * Math.sin(index / 58) + (index % 7);
  return {
    on: addDays('1999-01-01', index), tminC, tmaxC: tminC + 6 + (index % 9), tdewC: tminC - 2, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: 1 + (index % 5), windHeightM: 10,
    solarMjM2: 8 + 6 * Math.sin(index / 58) + (index % 3), sunshineHours: null, precipitationMm: 0,
  };
});

/** The arithmetic of a Penman–Monteith day and of Hargreaves beside it, as one would write it in a loop, without checks, choices or terms kept. */
function plainLoop(): number {
  let total = 0;
  const phi = (site.latitudeDeg * Math.PI) / 180;
  for (let i = 0; i < days; i += 1) {
    const day = weather[i] as DailyWeather;
    const j = dayOfYear(day.on);
    const tmin = day.tminC as number;
    const tmax = day.tmaxC as number;
    const mean = (tmin + tmax) / 2;
    const pressure = 101.3 * ((293 - 0.0065 * site.elevationM) / 293) ** 5.26;
    const gamma = 0.665e-3 * pressure;
    const slope = (4098 * 0.6108 * Math.exp((17.27 * mean) / (mean + 237.3))) / (mean + 237.3) ** 2;
    const es = (0.6108 * Math.exp((17.27 * tmax) / (tmax + 237.3)) + 0.6108 * Math.exp((17.27 * tmin) / (tmin + 237.3))) / 2;
    const tdew = day.tdewC as number;
    const ea = 0.6108 * Math.exp((17.27 * tdew) / (tdew + 237.3));
    const u2 = ((day.windMps as number) * 4.87) / Math.log(67.8 * (day.windHeightM as number) - 5.42);
    const dr = 1 + 0.033 * Math.cos((2 * Math.PI * j) / 365);
    const delta = 0.409 * Math.sin((2 * Math.PI * j) / 365 - 1.39);
    const ws = Math.acos(Math.min(1, Math.max(-1, -Math.tan(phi) * Math.tan(delta))));
    const ra = ((24 * 60) / Math.PI) * 0.082 * dr * (ws * Math.sin(phi) * Math.sin(delta) + Math.cos(phi) * Math.cos(delta) * Math.sin(ws));
    const rso = (0.75 + 2e-5 * site.elevationM) * ra;
    const rs = Math.min(ra, day.solarMjM2 as number);
    const rns = 0.77 * rs;
    const rnl = ((4.903e-9 * (tmax + 273.16) ** 4 + 4.903e-9 * (tmin + 273.16) ** 4) / 2) * Math.max(0, 0.34 - 0.14 * Math.sqrt(ea)) * Math.max(0.055, 1.35 * Math.min(1, rs / rso) - 0.35);
    const denominator = slope + gamma * (1 + 0.34 * u2);
    const et0 = Math.max(0, (0.408 * slope * (rns - rnl)) / denominator + (gamma * (900 / (mean + 273)) * u2 * Math.max(0, es - ea)) / denominator);
    const hargreaves = Math.max(0, 0.0023 * (mean + 17.8) * Math.sqrt(Math.max(0, tmax - tmin)) * 0.408 * ra);
    total += et0 + hargreaves * 0;
  }
  return total;
}

function ours(): number {
  let total = 0;
  for (const et0Mm of dailyEt0Row(site, weather).et0Mm) total += et0Mm;
  return total;
}

/** Times ten thousand daily reference ETs beside the plain loop, and a year of exposure, and prints one JSON line [ms]. */
function measure(): void {
  const difference = Math.abs(ours() / plainLoop() - 1);
  const yard = yardWithObstacles();
  for (let round = 0; round < 4; round += 1) {
    ours();
    plainLoop();
    yearOfExposure(yard);
  }
  const et0: number[] = [];
  const plain: number[] = [];
  const exposure: number[] = [];
  // In turns, so that other work on the machine meets both.
  for (let round = 0; round < rounds; round += 1) {
    const from = performance.now();
    if (round % 2 === 0) ours();
    else plainLoop();
    const between = performance.now();
    if (round % 2 === 0) plainLoop();
    else ours();
    const until = performance.now();
    et0.push(round % 2 === 0 ? between - from : until - between);
    plain.push(round % 2 === 0 ? until - between : between - from);
  }
  for (let round = 0; round < rounds; round += 1) {
    // Time of the processor: waiting for a core that others hold is not the year's.
    const from = process.cpuUsage();
    yearOfExposure(yard);
    const { user, system } = process.cpuUsage(from);
    exposure.push((user + system) / 1000);
  }
  console.log(JSON.stringify({ difference, et0, plain, exposure }));
}

measure();
