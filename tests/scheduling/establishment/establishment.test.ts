import fc from 'fast-check';
import { DEFAULT_SCHEDULE } from '@/scheduling/establishment/defaultSchedule';
import { checkStageDoses, doseFractions, dosesForDay, sowingOutlook } from '@/scheduling/establishment/dosesForDay';
import { ESTABLISHMENT_STAGES, type EstablishmentSchedule } from '@/scheduling/establishment/establishmentSchedule';
import { stageOn, type StageQuestion } from '@/scheduling/establishment/stageOn';
import { GERMINATION_HEAT, laboratoryDays } from '@/scheduling/establishment/thermalClock';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { GRASS_IDS } from '@/scheduling/grass/grass';

const constant = (temperatureC: number, days = 200): number[] => Array.from({ length: days }, () => temperatureC);
const sown = (overrides: Partial<StageQuestion> = {}): StageQuestion => ({ sownOn: '2026-09-01', on: '2026-09-01', grass: 'perennial_ryegrass', dailySoilTempsC: constant(20), ...overrides });
const rank = (stage: string) => ESTABLISHMENT_STAGES.findIndex((each) => each === stage);

describe('the thermal clock (Larsen and Bibby 2005, Crop Sci 45:2030-2037)', () => {
  it.each([
    ['perennial_ryegrass', 10, 10.0], ['perennial_ryegrass', 15, 5.6], ['perennial_ryegrass', 20, 3.9],
    ['kentucky_bluegrass', 10, 15.6], ['kentucky_bluegrass', 15, 9.3], ['kentucky_bluegrass', 20, 6.6],
  ] as const)('brings %s at %i °C to half germination in %f days', (grass, temperatureC, days) => {
    expect(laboratoryDays(grass, temperatureC)).toBeCloseTo(days, 1);
  });

  it('stands still at and below the base temperature', () => {
    expect(laboratoryDays('kentucky_bluegrass', 2.6)).toBeNull();
    expect(stageOn(sown({ on: '2027-02-01', dailySoilTempsC: constant(2) })).stage).toBe('sown');
    expect(stageOn(sown({ dailySoilTempsC: constant(2) })).firstUpOn.likely).toBeNull();
  });

  it('marks every sum that is not published as a default', () => {
    const published = Object.entries(GERMINATION_HEAT).filter(([, heat]) => !heat.isDefault).map(([grass]) => grass);
    expect(published.sort()).toEqual(['kentucky_bluegrass', 'perennial_ryegrass']);
  });
});

describe('the stage of a sowing', () => {
  it('is slower in the field than in the laboratory, with a range', () => {
    const { firstUpOn, mostlyUpOn } = stageOn(sown());
    const after = (on: string | null) => (on === null ? Number.NaN : daysBetween('2026-09-01', on));
    expect(after(firstUpOn.fast)).toBeGreaterThanOrEqual(3.9);
    expect(after(firstUpOn.likely)).toBeGreaterThan(after(firstUpOn.fast));
    expect(after(firstUpOn.slow)).toBeGreaterThan(after(firstUpOn.likely));
    // Seed sellers' range for ryegrass, 5 to 10 days (weak), holds the likely days.
    expect(after(firstUpOn.likely)).toBeGreaterThanOrEqual(5);
    expect(after(mostlyUpOn.likely)).toBeLessThanOrEqual(10);
  });

  it('goes through all stages in order as the days pass', () => {
    let last = 0;
    for (let day = 0; day < 80; day += 1) {
      const now = rank(stageOn(sown({ on: addDays('2026-09-01', day) })).stage);
      expect(now - last === 0 || now - last === 1).toBe(true);
      last = now;
    }
    expect(ESTABLISHMENT_STAGES[last]).toBe('established');
  });

  it('keeps a mix coming up until its slowest grass is up', () => {
    const rye = stageOn(sown());
    const mix = stageOn(sown({ grass: 'cool_mix' }));
    const blue = stageOn(sown({ grass: 'kentucky_bluegrass' }));
    expect(mix.firstUpOn.likely).toBe(rye.firstUpOn.likely);
    expect(mix.mostlyUpOn.likely).toBe(blue.mostlyUpOn.likely);
  });

  it('follows what people saw against the clock, and goes on from there', () => {
    const early = sown({ on: '2026-09-04', seen: [{ stage: 'coming_up', on: '2026-09-03' }] });
    expect(stageOn({ ...early, seen: [] }).stage).toBe('sown');
    expect(stageOn(early)).toMatchObject({ stage: 'coming_up', dayInStage: 1 });
    const late = sown({ on: '2026-09-12', seen: [{ stage: 'sown', on: '2026-09-12' }] });
    expect(stageOn({ ...late, seen: [] }).stage).toBe('rooting');
    expect(stageOn(late).stage).toBe('sown');
    expect(stageOn(sown({ on: '2026-09-03', seen: [{ stage: 'rooting', on: '2026-09-20' }] })).stage).toBe('sown');
  });

  it('takes the lengths that the schedule sets', () => {
    const schedule: EstablishmentSchedule = { stages: DEFAULT_SCHEDULE.stages.map((each) => (each.stage === 'rooting' ? { ...each, forDays: 3 } : each)) };
    const mostlyUpOn = stageOn(sown()).mostlyUpOn.likely as string;
    expect(stageOn(sown({ on: addDays(mostlyUpOn, 2), schedule })).stage).toBe('rooting');
    expect(stageOn(sown({ on: addDays(mostlyUpOn, 3), schedule }))).toMatchObject({ stage: 'taper', dayInStage: 0 });
    expect(stageOn(sown({ on: addDays(mostlyUpOn, 3) })).stage).toBe('rooting');
  });

  it('says which soil temperatures were assumed', () => {
    expect(stageOn(sown({ on: '2026-09-05' })).assumed).toBeNull();
    expect(stageOn(sown({ on: '2026-09-05', dailySoilTempsC: [18, 17] })).assumed).toEqual({ fromOn: '2026-09-03', temperatureC: 17 });
    expect(stageOn(sown({ on: '2026-09-05', dailySoilTempsC: [] })).assumed).toEqual({ fromOn: '2026-09-01', temperatureC: 15 });
  });

  it('is sown, with a negative day, before it is sown', () => {
    expect(stageOn(sown({ on: '2026-08-30' }))).toMatchObject({ stage: 'sown', dayNumber: -2, dayInStage: 0 });
  });

  it('refuses what cannot be', () => {
    expect(() => stageOn(sown({ dailySoilTempsC: [Number.NaN] }))).toThrow(expect.objectContaining({ field: 'dailySoilTempsC[0]' }));
    expect(() => stageOn(sown({ on: '2026-02-30' }))).toThrow();
    expect(() => stageOn(sown({ on: '2066-01-01' }))).toThrow(expect.objectContaining({ field: 'on' }));
  });

  it('never comes later in warmer soil, and the fast end is never behind the slow one', () => {
    fc.assert(fc.property(fc.constantFrom(...GRASS_IDS), fc.array(fc.double({ min: 5, max: 25, noNaN: true }), { minLength: 40, maxLength: 40 }), fc.double({ min: 0, max: 8, noNaN: true }), fc.integer({ min: 0, max: 90 }), (grass, temperatures, warmer, day) => {
      const question = sown({ grass, dailySoilTempsC: temperatures, on: addDays('2026-09-01', day) });
      const cool = stageOn(question);
      const warm = stageOn({ ...question, dailySoilTempsC: temperatures.map((each) => each + warmer) });
      expect(rank(warm.stage)).toBeGreaterThanOrEqual(rank(cool.stage));
      expect(rank(cool.range.fast)).toBeGreaterThanOrEqual(rank(cool.stage));
      expect(rank(cool.range.slow)).toBeLessThanOrEqual(rank(cool.stage));
    }), { numRuns: 60 });
  });
});

describe('the doses of a day', () => {
  const june = { sunriseMinutes: 320, sunsetMinutes: 1240 };

  it('fall in the drying hours of daylight', () => {
    const doses = dosesForDay({ schedule: DEFAULT_SCHEDULE, stage: 'sown', dayInStage: 0, ...june });
    expect(doses.map((dose) => dose.atMinutes)).toEqual([550, 694, 838, 982]);
    expect(doses.every((dose) => dose.depthMm === 1.5)).toBe(true);
    expect(dosesForDay({ schedule: DEFAULT_SCHEDULE, stage: 'rooting', dayInStage: 0, ...june }).map((dose) => dose.atMinutes)).toEqual([504, 780]);
  });

  it('skip the days between in a taper and stop when established', () => {
    const on = (dayInStage: number) => dosesForDay({ schedule: DEFAULT_SCHEDULE, stage: 'taper', dayInStage, ...june }).length;
    expect([0, 1, 2, 3, 4, 6].map(on)).toEqual([1, 0, 0, 1, 0, 1]);
    expect(dosesForDay({ schedule: DEFAULT_SCHEDULE, stage: 'established', dayInStage: 0, ...june })).toEqual([]);
  });

  it('take the times that a consultant set, in order', () => {
    const schedule: EstablishmentSchedule = { stages: [{ stage: 'sown', dosesPerDay: 2, everyDays: 1, depthMm: 2, timesMinutes: [840, 600], forDays: null }] };
    expect(dosesForDay({ schedule, stage: 'sown', dayInStage: 5, ...june })).toEqual([{ atMinutes: 600, depthMm: 2 }, { atMinutes: 840, depthMm: 2 }]);
  });

  it('lie within daylight however long the day, and in order', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 8 }), fc.integer({ min: 200, max: 600 }), fc.integer({ min: 700, max: 1400 }), (dosesPerDay, sunriseMinutes, sunsetMinutes) => {
      const schedule: EstablishmentSchedule = { stages: [{ stage: 'sown', dosesPerDay, everyDays: 1, depthMm: 1, timesMinutes: null, forDays: null }] };
      const times = dosesForDay({ schedule, stage: 'sown', dayInStage: 0, sunriseMinutes, sunsetMinutes }).map((dose) => dose.atMinutes);
      expect(times).toHaveLength(dosesPerDay);
      expect(Math.min(...times)).toBeGreaterThanOrEqual(sunriseMinutes);
      expect(Math.max(...times)).toBeLessThan(sunsetMinutes);
      expect([...times].sort((a, b) => a - b)).toEqual(times);
    }));
    expect(dosesForDay({ schedule: DEFAULT_SCHEDULE, stage: 'sown', dayInStage: 0, sunriseMinutes: null, sunsetMinutes: null })).toHaveLength(4);
    expect(doseFractions(0)).toEqual([]);
  });

  it.each([
    ['dosesPerDay', { dosesPerDay: 9 }], ['dosesPerDay', { dosesPerDay: 1.5 }], ['everyDays', { everyDays: 0 }], ['depthMm', { depthMm: 0 }], ['depthMm', { depthMm: 40 }],
    ['timesMinutes', { timesMinutes: [600] }], ['timesMinutes[1]', { timesMinutes: [600, 1440] }], ['forDays', { forDays: -1 }],
  ])('refuse impossible %s', (field, overrides) => {
    expect(() => checkStageDoses({ stage: 'sown', dosesPerDay: 2, everyDays: 1, depthMm: 2, timesMinutes: null, forDays: null, ...overrides })).toThrow(expect.objectContaining({ field }));
  });

  it('follow the stages over the days of a plan', () => {
    const outlook = sowingOutlook({
      sownOn: '2026-06-04', startOn: '2026-06-10', grass: 'perennial_ryegrass', dailySoilTempsC: constant(20), schedule: DEFAULT_SCHEDULE,
      days: Array.from({ length: 10 }, () => june),
    });
    expect(outlook.dayNumber).toBe(6);
    expect(outlook.stage).toBe('coming_up');
    expect(outlook.dosesByDay.map((doses) => doses.length)).toEqual([3, 3, 3, 2, 2, 2, 2, 2, 2, 2]);
    expect(new Set(outlook.stageByDay)).toEqual(new Set(['coming_up', 'rooting']));
  });
});
