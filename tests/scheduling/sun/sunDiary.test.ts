import fc from 'fast-check';
import { heightAtDeg, horizonFromDiary, rangesOfTicks, yearOfExposure, type DiaryRange, type Obstacle, type SunDiaryInput, type ZoneExposure } from '@/scheduling/sun';
import { dayOfYear } from '@/scheduling/units';
import { TOLERANCES } from '../../fixtures/tolerances';
import { bruteDay } from './shadeScene';

const HERE = { eastM: 0, northM: 0 };
const BOSTON = { latitudeDeg: 42.36, longitudeDeg: -71.06 };

/** An obstacle of even height all round but for an opening between two azimuths. */
function ringWithOpening(heightDeg: number, openFromDeg: number, openToDeg: number): Obstacle {
  const line = [];
  for (let azimuth = openToDeg; azimuth <= openFromDeg + 360; azimuth += 1) {
    line.push({ eastM: 20 * Math.sin((azimuth * Math.PI) / 180), northM: 20 * Math.cos((azimuth * Math.PI) / 180) });
  }
  return { kind: 'fence', line, heightM: 20 * Math.tan((heightDeg * Math.PI) / 180) };
}

/** What somebody would note on a day: when the sun falls on the point, every two minutes, on a clock of mean solar time. */
function noted(obstacles: readonly Obstacle[], place: { latitudeDeg: number; longitudeDeg: number }, on: string): DiaryRange[] {
  const ranges: DiaryRange[] = [];
  for (let minute = 0; minute < 1440; minute += 2) {
    if (!sunFallsAt(obstacles, place, on, minute + 1)) continue;
    const last = ranges[ranges.length - 1];
    if (last && last.toMinutes === minute) last.toMinutes = minute + 2;
    else ranges.push({ fromMinutes: minute, toMinutes: minute + 2 });
  }
  return ranges;
}

function sunFallsAt(obstacles: readonly Obstacle[], { latitudeDeg, longitudeDeg }: { latitudeDeg: number; longitudeDeg: number }, on: string, minute: number): boolean {
  return bruteDay([HERE], obstacles, latitudeDeg, longitudeDeg, on, 1440, minute).directSunHours > 0;
}

const pageOf = (obstacles: readonly Obstacle[], place: { latitudeDeg: number; longitudeDeg: number }, on: string) => ({ on, utcOffsetMinutes: place.longitudeDeg * 4, sunny: noted(obstacles, place, on) });

function yearOf(input: { latitudeDeg: number; longitudeDeg: number }, diary: Omit<SunDiaryInput, 'latitudeDeg' | 'longitudeDeg'>): ZoneExposure {
  const [exposure] = yearOfExposure({ ...input, obstacles: [], zones: [{ id: 'a', horizon: horizonFromDiary({ ...input, ...diary }) }] });
  if (!exposure) throw new Error('one zone is given here');
  return exposure;
}
const hoursOn = (exposure: ZoneExposure, on: string) => exposure.directSunHours[dayOfYear(on) - 1] ?? Infinity;

describe('a horizon from a diary', () => {
  it.each([['Boston', BOSTON], ['Sydney', { latitudeDeg: -33.87, longitudeDeg: 151.2 }]])('gives the noted hours back on the day itself, behind a long wall to the east (%s)', (_name, place) => {
    const wall: Obstacle = { kind: 'fence', line: [{ eastM: 5, northM: -200 }, { eastM: 5, northM: 200 }], heightM: 4 };
    for (const on of ['2026-03-20', '2026-06-21', '2026-12-21']) {
      const page = pageOf([wall], place, on);
      const minutes = page.sunny.reduce((sum, range) => sum + range.toMinutes - range.fromMinutes, 0);
      expect(Math.abs(hoursOn(yearOf(place, { pages: [page] }), on) - minutes / 60)).toBeLessThan(TOLERANCES.diaryDayHours);
    }
  });

  it.each([['Boston', BOSTON], ['Sydney', { latitudeDeg: -33.87, longitudeDeg: 151.2 }]])('finds an obstacle of even height again, and with it every other month (%s)', (_name, place) => {
    // Open between the two directions in which the sun of the equinox stands at the height of the ring: cos(azimuth from noon) = tan h tan φ.
    const noon = place.latitudeDeg > 0 ? 180 : 360;
    const half = (Math.acos(Math.tan((24 * Math.PI) / 180) * Math.tan((Math.abs(place.latitudeDeg) * Math.PI) / 180)) * 180) / Math.PI;
    const ring = ringWithOpening(24, noon - half, noon + half);
    const exposure = yearOf(place, { pages: [pageOf([ring], place, '2026-03-20')] });
    const [truth] = yearOfExposure({ ...place, obstacles: [ring], zones: [{ id: 'a', points: [HERE] }] });
    for (let month = 1; month <= 12; month += 1) {
      const on = `2026-${String(month).padStart(2, '0')}-15`;
      expect(Math.abs(hoursOn(exposure, on) - (truth?.directSunHours[dayOfYear(on) - 1] ?? Infinity))).toBeLessThan(0.6);
    }
  });

  it('carries the shade of a wall through the months in which grass grows within an hour and a quarter, and a page of winter mends the rest', () => {
    const wall: Obstacle = { kind: 'fence', line: [{ eastM: 5, northM: -200 }, { eastM: 5, northM: 200 }], heightM: 4 };
    const one = yearOf(BOSTON, { pages: [pageOf([wall], BOSTON, '2026-05-10')] });
    const two = yearOf(BOSTON, { pages: [pageOf([wall], BOSTON, '2026-05-10'), pageOf([wall], BOSTON, '2026-12-10')] });
    const [truth] = yearOfExposure({ ...BOSTON, obstacles: [wall], zones: [{ id: 'a', points: [HERE] }] });
    const errorOf = (exposure: ZoneExposure) => exposure.directSunHours.reduce((sum, hours, day) => sum + Math.abs(hours - (truth?.directSunHours[day] ?? 0)), 0) / 365;
    for (let day = dayOfYear('2026-04-15'); day <= dayOfYear('2026-08-31'); day += 1) expect(Math.abs((one.directSunHours[day - 1] ?? Infinity) - (truth?.directSunHours[day - 1] ?? 0))).toBeLessThan(1.25);
    expect(errorOf(two)).toBeLessThan(errorOf(one));
  });

  it('is open where everything was sunny, and hides the whole day where nothing was', () => {
    const all = horizonFromDiary({ ...BOSTON, pages: [{ on: '2026-06-21', utcOffsetMinutes: -240, sunny: [{ fromMinutes: 0, toMinutes: 1440 }] }] });
    expect(all.heightDeg.every((height) => height === 0)).toBe(true);
    const none = horizonFromDiary({ ...BOSTON, pages: [{ on: '2026-03-20', utcOffsetMinutes: -240, sunny: [] }] });
    expect(new Set(none.heightDeg).size).toBe(1);
    expect(heightAtDeg(none, 180)).toBeCloseTo(90 - 42.36, 0);
    const exposure = yearOf(BOSTON, { pages: [{ on: '2026-03-20', utcOffsetMinutes: -240, sunny: [] }] });
    expect(hoursOn(exposure, '2026-03-20')).toBeLessThan(0.1);
    expect(hoursOn(exposure, '2026-06-21')).toBeGreaterThan(4);
    expect(exposure.skyView[0]).toBeCloseTo(Math.cos((heightAtDeg(none, 0) * Math.PI) / 180) ** 2, 2);
    expect(exposure.assumptions.map(({ field }) => field)).toEqual(['horizon']);
  });

  it('never rises when more hours are ticked', () => {
    fc.assert(fc.property(
      fc.constantFrom(-77, -34, -10, 0, 15, 42, 60, 71), fc.integer({ min: 0, max: 364 }), fc.array(fc.boolean(), { minLength: 24, maxLength: 24 }), fc.integer({ min: 0, max: 23 }),
      (latitudeDeg, day, ticks, extra) => {
        const on = new Date(Date.UTC(2026, 0, 1 + day)).toISOString().slice(0, 10);
        const horizon = (hours: boolean[]) => horizonFromDiary({ latitudeDeg, longitudeDeg: 0, pages: [{ on, utcOffsetMinutes: 0, sunny: rangesOfTicks(hours) }] });
        const before = horizon(ticks);
        const after = horizon(ticks.map((ticked, hour) => ticked || hour === extra));
        after.heightDeg.forEach((height, degree) => {
          expect(height).toBeGreaterThanOrEqual(0);
          expect(height).toBeLessThanOrEqual((before.heightDeg[degree] ?? 0) + 1e-9);
        });
      },
    ), { numRuns: 60 });
  });

  it('bears polar day and polar night', () => {
    const summer = horizonFromDiary({ latitudeDeg: 75, longitudeDeg: 0, pages: [{ on: '2026-06-21', utcOffsetMinutes: 0, sunny: [{ fromMinutes: 600, toMinutes: 900 }] }] });
    expect(heightAtDeg(summer, 0)).toBeGreaterThan(0);
    expect(heightAtDeg(summer, 170)).toBe(0);
    const winter = horizonFromDiary({ latitudeDeg: 75, longitudeDeg: 0, pages: [{ on: '2026-12-21', utcOffsetMinutes: 0, sunny: [] }] });
    expect(winter.heightDeg.every((height) => height === 0)).toBe(true);
  });

  it('refuses what cannot be', () => {
    const page = { on: '2026-06-21', utcOffsetMinutes: 0, sunny: [{ fromMinutes: 600, toMinutes: 700 }] };
    for (const [field, change] of [
      ['latitudeDeg', { latitudeDeg: Number.NaN }], ['pages', { pages: [] }], ['pages[0].sunny[0].toMinutes', { pages: [{ ...page, sunny: [{ fromMinutes: 600, toMinutes: 600 }] }] }],
      ['pages[0].sunny[0].fromMinutes', { pages: [{ ...page, sunny: [{ fromMinutes: -1, toMinutes: 600 }] }] }], ['pages[0].utcOffsetMinutes', { pages: [{ ...page, utcOffsetMinutes: 3000 }] }],
      ['on', { pages: [{ ...page, on: '2026-02-30' }] }],
    ] as const) expect(() => horizonFromDiary({ ...BOSTON, pages: [page], ...change })).toThrow(expect.objectContaining({ field }));
    expect(() => rangesOfTicks([true])).toThrow(expect.objectContaining({ field: 'ticks' }));
    expect(() => yearOfExposure({ ...BOSTON, obstacles: [], zones: [{ id: 'a', horizon: { heightDeg: [1, 2], assumptions: [] } }] })).toThrow(expect.objectContaining({ field: 'zones[0].horizon.heightDeg.length' }));
  });
});
