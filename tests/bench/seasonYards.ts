import type { BudgetZone } from '@/scheduling/budget';
import type { GrassId } from '@/scheduling/grass';
import type { MinuteWindow, PlanRule, PlanTap } from '@/scheduling/planning/types';
import type { SoilTexture } from '@/scheduling/soil';

export interface SeasonZone {
  id: string;
  name: string;
  areaM2: number;
  /** Lower is served first. */
  priority: number;
  grass: GrassId;
  texture: SoilTexture;
  slopePct: number;
  /** Hours of direct sun at midsummer [h]; null where nothing shades the zone. */
  sunHours: number | null;
  /** Month and day of a sowing, 'MM-DD'; until then the ground rests. */
  sownOn: string | null;
}

export interface SeasonPosition {
  id: string;
  name: string;
  zoneId: string;
  tapId: string;
  /** Part of the zone's area that it serves, 0 to 1. */
  zoneShare: number;
  rateMmPerHour: number;
  runTimeMultiplier: number;
  lowQuarterUniformity: number;
  sortOrder: number;
}

/** A yard whose seasons are replayed. */
export interface SeasonYard {
  id: string;
  /** What it is, for the report. */
  title: string;
  text: string;
  /** Whether its hours hold a dry week of July. */
  fits: boolean;
  taps: PlanTap[];
  zones: SeasonZone[];
  positions: SeasonPosition[];
  rules: PlanRule[];
  /** By weekday, 0 = Sunday. */
  homeByWeekday: MinuteWindow[][];
  /** Days on which a rule of thumb waters. */
  thumbWeekdays: number[];
}

/** Part of the water that falls on the patch itself; the rest falls beside it. */
const ON_THE_PATCH = 0.9;

interface ZonePlan extends Omit<SeasonZone, 'id'> {
  tapId: string;
  positions: number;
  runTimeMultiplier: number;
  lowQuarterUniformity: number;
}

/** Zones with equal positions; the rate of each follows from the flow of its tap and the size of its patch. */
function lay(taps: readonly PlanTap[], plans: readonly ZonePlan[]): Pick<SeasonYard, 'zones' | 'positions'> {
  const zones: SeasonZone[] = [];
  const positions: SeasonPosition[] = [];
  plans.forEach(({ tapId, positions: count, runTimeMultiplier, lowQuarterUniformity, ...zone }, index) => {
    const id = `zone-${index + 1}`;
    zones.push({ id, ...zone });
    const flowLpm = taps.find((tap) => tap.id === tapId)?.flowLpm ?? 0;
    for (let number = 1; number <= count; number += 1) {
      positions.push({
        id: `${id}-${number}`, name: count === 1 ? zone.name : `${zone.name} ${number}`, zoneId: id, tapId, zoneShare: 1 / count,
        rateMmPerHour: (ON_THE_PATCH * flowLpm * 60) / (zone.areaM2 / count), runTimeMultiplier, lowQuarterUniformity, sortOrder: positions.length + 1,
      });
    }
  });
  return { zones, positions };
}

const tap = (id: string, name: string, flowLpm: number): PlanTap => ({ id, name, flowLpm, flowIsDefault: false, shutOffTimer: false });
const span = (fromHour: number, toHour: number): MinuteWindow => ({ fromMinutes: Math.round(fromHour * 60), toMinutes: Math.round(toHour * 60) });
const week = (workday: MinuteWindow[], weekend: MinuteWindow[]): MinuteWindow[][] => [weekend, workday, workday, workday, workday, workday, weekend];

const smallTaps = [tap('tap', 'Kitchen tap', 18)];
const small: SeasonYard = {
  id: 'small', title: 'Small and easy', fits: true,
  text: '2 zones of loam, 190 m², 3 positions, one tap of 18 L/min; somebody is home from 5:30 to 8:00 and in the evening; no water rule',
  taps: smallTaps,
  ...lay(smallTaps, [
    { name: 'Front', areaM2: 70, priority: 1, grass: 'cool_mix', texture: 'loam', slopePct: 2, sunHours: null, sownOn: null, tapId: 'tap', positions: 1, runTimeMultiplier: 1.15, lowQuarterUniformity: 0.72 },
    { name: 'Back', areaM2: 120, priority: 2, grass: 'tall_fescue', texture: 'loam', slopePct: 2, sunHours: 7, sownOn: null, tapId: 'tap', positions: 2, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
  ]),
  rules: [], homeByWeekday: week([span(5.5, 8), span(18, 21)], [span(6, 11), span(17, 21)]), thumbWeekdays: [1, 3, 5],
};

const typicalTaps = [tap('front', 'Front tap', 17), tap('back', 'Back tap', 15)];
const typical: SeasonYard = {
  id: 'typical', title: 'Typical', fits: true,
  text: '8 zones of four soils and four exposures, 950 m², 14 positions, two taps of 17 and 15 L/min; mornings and evenings at home; no watering from 10:00 to 16:00',
  taps: typicalTaps,
  ...lay(typicalTaps, [
    { name: 'Street', areaM2: 150, priority: 1, grass: 'kentucky_bluegrass', texture: 'silt_loam', slopePct: 3, sunHours: null, sownOn: null, tapId: 'front', positions: 2, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
    { name: 'Porch', areaM2: 90, priority: 1, grass: 'cool_mix', texture: 'loam', slopePct: 1, sunHours: 8, sownOn: null, tapId: 'front', positions: 1, runTimeMultiplier: 1.25, lowQuarterUniformity: 0.65 },
    { name: 'Drive', areaM2: 130, priority: 2, grass: 'perennial_ryegrass', texture: 'sandy_loam', slopePct: 4, sunHours: null, sownOn: null, tapId: 'front', positions: 2, runTimeMultiplier: 1.15, lowQuarterUniformity: 0.72 },
    { name: 'North side', areaM2: 80, priority: 3, grass: 'fine_fescue', texture: 'loam', slopePct: 2, sunHours: 3, sownOn: null, tapId: 'front', positions: 1, runTimeMultiplier: 1.3, lowQuarterUniformity: 0.6 },
    { name: 'Terrace', areaM2: 140, priority: 1, grass: 'tall_fescue', texture: 'loam', slopePct: 2, sunHours: 9, sownOn: null, tapId: 'back', positions: 2, runTimeMultiplier: 1.15, lowQuarterUniformity: 0.74 },
    { name: 'Play lawn', areaM2: 160, priority: 2, grass: 'tall_fescue', texture: 'silt_loam', slopePct: 3, sunHours: null, sownOn: null, tapId: 'back', positions: 3, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.7 },
    { name: 'Bank', areaM2: 90, priority: 3, grass: 'cool_mix', texture: 'silty_clay_loam', slopePct: 7, sunHours: null, sownOn: null, tapId: 'back', positions: 1, runTimeMultiplier: 1.25, lowQuarterUniformity: 0.66 },
    { name: 'Under the maples', areaM2: 110, priority: 3, grass: 'fine_fescue', texture: 'loam', slopePct: 1, sunHours: 4, sownOn: null, tapId: 'back', positions: 2, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
  ]),
  rules: [{
    id: 'hours', name: 'Not at midday', source: 'an example', sourceOn: null, season: null, exemptSeeded: true, kind: 'hours', allowed: [{ fromMinutes: 0, toMinutes: 600 }, { fromMinutes: 960, toMinutes: 1440 }],
  }],
  homeByWeekday: week([span(5.5, 8), span(17.5, 21)], [span(6, 11), span(16, 21)]), thumbWeekdays: [1, 3, 5],
};

const tightTaps = [tap('tap', 'Only tap', 13)];
const tight: SeasonYard = {
  id: 'tight', title: 'Does not fit', fits: false,
  text: '6 zones, 700 m², 10 positions, one tap of 13 L/min; established grass only on Tuesdays, Thursdays and Saturdays from 5:00 to 9:00 and 18:00 to 21:00; one zone is sown on 20 August, which the rule exempts',
  taps: tightTaps,
  ...lay(tightTaps, [
    { name: 'Front', areaM2: 150, priority: 1, grass: 'kentucky_bluegrass', texture: 'loam', slopePct: 2, sunHours: null, sownOn: null, tapId: 'tap', positions: 2, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
    { name: 'Path', areaM2: 80, priority: 1, grass: 'cool_mix', texture: 'loam', slopePct: 2, sunHours: null, sownOn: null, tapId: 'tap', positions: 1, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
    { name: 'Side', areaM2: 130, priority: 2, grass: 'cool_mix', texture: 'loam', slopePct: 2, sunHours: null, sownOn: null, tapId: 'tap', positions: 2, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
    { name: 'Back', areaM2: 160, priority: 3, grass: 'cool_mix', texture: 'loam', slopePct: 2, sunHours: null, sownOn: null, tapId: 'tap', positions: 2, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
    { name: 'Far corner', areaM2: 110, priority: 3, grass: 'cool_mix', texture: 'loam', slopePct: 2, sunHours: null, sownOn: null, tapId: 'tap', positions: 2, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
    { name: 'New seed', areaM2: 70, priority: 0, grass: 'tall_fescue', texture: 'loam', slopePct: 2, sunHours: null, sownOn: '08-20', tapId: 'tap', positions: 1, runTimeMultiplier: 1.2, lowQuarterUniformity: 0.68 },
  ]),
  rules: [{
    id: 'days', name: 'Three days a week', source: 'an example', sourceOn: null, season: null, exemptSeeded: true, kind: 'combination', weekdays: [2, 4, 6], parity: null,
    allowed: [span(5, 9), span(18, 21)],
  }],
  homeByWeekday: week([span(5, 21)], [span(5, 21)]), thumbWeekdays: [2, 4, 6],
};

export const SEASON_YARDS: readonly SeasonYard[] = [small, typical, tight];

/** Day of a zone's sowing in a year; null for an established lawn. */
export function sowingDay(zone: SeasonZone, year: number): string | null {
  return zone.sownOn === null ? null : `${year}-${zone.sownOn}`;
}

/** The zone as the budget knows it on a day. @param soaksRain - reckon rain by its intake, as the ground really does */
export function budgetZoneOn(zone: SeasonZone, on: string, soaksRain: boolean): BudgetZone {
  const sowing = sowingDay(zone, Number(on.slice(0, 4)));
  const isSown = sowing !== null && on >= sowing;
  return {
    grass: zone.grass, texture: zone.texture, sunHours: zone.sunHours, sunHoursOn: zone.sunHours === null ? null : `${on.slice(0, 4)}-06-21`,
    sownOn: isSown ? sowing : null, resting: sowing !== null && !isSown,
    rainGround: soaksRain ? { texture: zone.texture, slopePct: zone.slopePct, compaction: 'loose' } : null,
  };
}

export function positionAreaM2(yard: SeasonYard, position: SeasonPosition): number {
  return position.zoneShare * (yard.zones.find((zone) => zone.id === position.zoneId)?.areaM2 ?? 0);
}
