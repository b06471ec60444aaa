import { epochDayOf, PhysicsError, requireRange, type CivilDay } from '@/scheduling/units';
import type { Horizon } from './horizon';
import { solarCoordinates, sunDirection } from './solarCoordinates';

/** A part of the day [minutes after local midnight], half-open. */
export interface DiaryRange {
  fromMinutes: number;
  toMinutes: number;
}

/** One day on which somebody noted when the sun fell on a zone. */
export interface SunDiaryPage {
  on: CivilDay;
  /** Clock of the place on that day [min east of UTC]. */
  utcOffsetMinutes: number;
  /** When the sun fell on the zone. Cloud does not count: a sunny day is asked for. */
  sunny: readonly DiaryRange[];
}

/** Input of `horizonFromDiary`. */
export interface SunDiaryInput {
  latitudeDeg: number;
  longitudeDeg: number;
  /** One page or more, of any days of the year. */
  pages: readonly SunDiaryPage[];
}

const DEGREE = Math.PI / 180;
const SAMPLE_MINUTES = 2;
const DAY_MS = 86_400_000;

/** Ranges of a day from twenty-four ticks, one an hour. @throws PhysicsError for another number of ticks */
export function rangesOfTicks(ticks: readonly boolean[]): DiaryRange[] {
  if (ticks.length !== 24) throw new PhysicsError('ticks', ticks.length, 'must be twenty-four');
  return ticks.flatMap((ticked, hour) => (ticked ? [{ fromMinutes: hour * 60, toMinutes: (hour + 1) * 60 }] : []));
}

interface Sample {
  azimuthDeg: number;
  altitudeDeg: number;
  sunny: boolean;
}

/** The sun's way above the horizon through a civil day, in order of time, with what was seen. */
function samplesOf({ latitudeDeg, longitudeDeg }: SunDiaryInput, page: SunDiaryPage): Sample[] {
  const midnightMs = epochDayOf(page.on) * DAY_MS - page.utcOffsetMinutes * 60_000;
  const samples: Sample[] = [];
  for (let minute = SAMPLE_MINUTES / 2; minute < 1440; minute += SAMPLE_MINUTES) {
    const ms = midnightMs + minute * 60_000;
    const { declinationRad, equationOfTimeMinutes } = solarCoordinates(ms);
    const utcMinutes = (ms / 60_000) % 1440;
    const hourAngle = ((utcMinutes + equationOfTimeMinutes + 4 * longitudeDeg) / 4 - 180) * DEGREE;
    const { azimuthRad, altitudeRad } = sunDirection(latitudeDeg * DEGREE, declinationRad, hourAngle);
    if (altitudeRad <= 0) continue;
    samples.push({
      azimuthDeg: ((azimuthRad / DEGREE) % 360 + 360) % 360, altitudeDeg: altitudeRad / DEGREE,
      sunny: page.sunny.some(({ fromMinutes, toMinutes }) => minute >= fromMinutes && minute < toMinutes),
    });
  }
  return samples;
}

/** Whole degrees on the shorter way from one azimuth to another, both ends included. */
function eachDegree(fromDeg: number, toDeg: number, visit: (degree: number) => void): void {
  const turn = toDeg - fromDeg - 360 * Math.round((toDeg - fromDeg) / 360);
  const from = Math.floor(Math.min(fromDeg, fromDeg + turn));
  const to = Math.floor(Math.max(fromDeg, fromDeg + turn));
  for (let degree = from; degree <= to; degree += 1) visit(((degree % 360) + 360) % 360);
}

function requirePage(page: SunDiaryPage, index: number): void {
  requireRange(`pages[${index}].utcOffsetMinutes`, page.utcOffsetMinutes, -15 * 60, 15 * 60);
  page.sunny.forEach(({ fromMinutes, toMinutes }, at) => {
    requireRange(`pages[${index}].sunny[${at}].fromMinutes`, fromMinutes, 0, 1440);
    requireRange(`pages[${index}].sunny[${at}].toMinutes`, toMinutes, 0, 1440);
    if (toMinutes <= fromMinutes) throw new PhysicsError(`pages[${index}].sunny[${at}].toMinutes`, toMinutes, `must lie after fromMinutes ${fromMinutes}`);
  });
}

/**
 * Turns hours of sun noted on one day into a horizon, so that they tell about other months.
 * Each unbroken time of shade is taken as one obstacle of even height over the directions that the sun passed, just tall enough to hide it. A shade that
 * begins at sunrise or lasts to sunset reaches on to the direction of midnight, which the sun passes in longer days. What nobody saw hide the sun is
 * taken as open. On several days the taller figure holds, but never above a sun that was seen.
 * @throws PhysicsError for impossible places, days or hours, with the field named
 * Source: geometry
 */
export function horizonFromDiary(input: SunDiaryInput): Horizon {
  requireRange('latitudeDeg', input.latitudeDeg, -90, 90);
  requireRange('longitudeDeg', input.longitudeDeg, -180, 180);
  if (input.pages.length === 0) throw new PhysicsError('pages', 0, 'must have a day');
  const heights = new Array<number>(360).fill(0);
  const seen = new Array<number>(360).fill(90);
  input.pages.forEach((page, index) => {
    requirePage(page, index);
    const samples = samplesOf(input, page);
    const wholeTurn = samples.length === 1440 / SAMPLE_MINUTES;
    const noonDeclination = solarCoordinates(epochDayOf(page.on) * DAY_MS + DAY_MS / 2).declinationRad;
    const midnightDeg = Math.sin(input.latitudeDeg * DEGREE + noonDeclination) >= 0 ? 0 : 180;
    for (let from = 0; from < samples.length;) {
      const first = samples[from];
      if (!first) break;
      let until = from + 1;
      while (until < samples.length && samples[until]?.sunny === first.sunny) until += 1;
      const part = samples.slice(from, until);
      if (first.sunny) {
        part.forEach((sample, at) => eachDegree(sample.azimuthDeg, part[at + 1]?.azimuthDeg ?? sample.azimuthDeg, (degree) => {
          seen[degree] = Math.min(seen[degree] ?? 90, sample.altitudeDeg, part[at + 1]?.altitudeDeg ?? 90);
        }));
      } else {
        const height = Math.max(...part.map((sample) => sample.altitudeDeg));
        const raise = (degree: number) => { heights[degree] = Math.max(heights[degree] ?? 0, height); };
        part.forEach((sample, at) => eachDegree(sample.azimuthDeg, part[at + 1]?.azimuthDeg ?? sample.azimuthDeg, raise));
        const last = part[part.length - 1] ?? first;
        if (from === 0 && !wholeTurn) eachDegree(first.azimuthDeg, midnightDeg, raise);
        if (until === samples.length && !wholeTurn) eachDegree(last.azimuthDeg, midnightDeg, raise);
      }
      from = until;
    }
  });
  return {
    heightDeg: heights.map((height, degree) => Math.min(height, seen[degree] ?? 90)),
    assumptions: [{
      field: 'horizon', method: 'each unbroken time of shade taken as one obstacle of even height, just tall enough; what nobody saw hide the sun taken as open', source: 'geometry',
    }],
  };
}
