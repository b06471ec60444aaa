import { weekdayOf } from '@/scheduling/units/civilDay';
import { NEW_OUTING_MINUTES } from './dayTimeline';
import { expectedRainMm } from './expectedRain';
import { planDefaults } from './planDefaults';
import { FROST_LIMIT_C, temperatureAtMinutes } from './temperatureCurve';
import type { MinuteWindow, PlanDay, PlanInput, PlannedDay, PlannedSet, PlanPermit, PlanPosition, PlanResult, PlanRule, PlanZone, Reason } from './types';

/** A limit that a plan breaks. */
export interface PlanBreach {
  on: string;
  limit: string;
  detail: string;
}

const isIn = (windows: readonly MinuteWindow[], minute: number): boolean => windows.some((window) => minute >= window.fromMinutes && minute < window.toMinutes);

/** Permits that hold for the seed of a zone on a day. */
function permitsOn(input: PlanInput, on: string, zoneId: string): PlanPermit[] {
  const month = Number(on.slice(5, 7));
  return (input.permits ?? []).filter((permit) => permit.zoneIds.some((id) => id === zoneId) && on >= permit.fromOn && on <= permit.toOn && permit.blackoutMonths.every((each) => each !== month));
}

/** One rule, one day, one minute: written apart from the planner's window arithmetic on purpose. */
function allows(input: PlanInput, rule: PlanRule, on: string, minute: number, isSeeded: boolean, position: PlanPosition): boolean {
  const digit = input.addressDigit;
  if ((isSeeded && rule.exemptSeeded) || (rule.devices && !rule.devices.includes(position.device ?? 'sprinkler')) || (rule.stage ?? 0) > (input.waterStage ?? 0)) {
    return true;
  }
  if (isSeeded && permitsOn(input, on, position.zoneId).some((permit) => !permit.liftsRuleIds || permit.liftsRuleIds.includes(rule.id))) {
    return true;
  }
  if (rule.season) {
    const today = on.slice(5);
    const text = (month: number, day: number) => `${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
    const from = text(rule.season.fromMonth, rule.season.fromDay);
    const to = text(rule.season.toMonth, rule.season.toDay);
    const isInside = from <= to ? from <= today && today <= to : from <= today || today <= to;
    if (!isInside) {
      return true;
    }
  }
  const isOddDate = Number(on.slice(-2)) % 2 !== 0;
  switch (rule.kind) {
    case 'weekdays':
      return rule.weekdays.includes(weekdayOf(on));
    case 'date_parity':
      return isOddDate === (rule.parity === 'odd');
    case 'hours':
      return isIn(rule.allowed, minute);
    case 'combination':
      return (!rule.weekdays || rule.weekdays.includes(weekdayOf(on)))
        && (!rule.parity || isOddDate === (rule.parity === 'odd'))
        && (!rule.allowed || isIn(rule.allowed, minute));
    case 'address_digit':
      return digit === undefined || (rule.weekdaysByDigit[digit] ?? []).includes(weekdayOf(on));
    case 'attended':
      return true;
  }
}

function isRunningSowing(zone: PlanZone): boolean {
  return zone.seed !== null && zone.seed.stage !== 'established';
}

/** Whether a rule in force keeps somebody beside the running hose. */
function isAttended(input: PlanInput, on: string, isSeeded: boolean, position: PlanPosition): boolean {
  // A rule that would close the day if it closed days is one in force.
  return input.rules.some((rule) => rule.kind === 'attended' && !allows(input, { ...rule, kind: 'weekdays', weekdays: [] }, on, 0, isSeeded, position));
}

/** Whether a minute of a day lies within a hold of the zone. */
function isHeld(input: PlanInput, on: string, minute: number, zoneId: string): boolean {
  return (input.holds ?? []).some((hold) => hold.zoneId === zoneId && (on > hold.fromOn || (on === hold.fromOn && minute >= hold.fromMinutes)) && (on < hold.toOn || (on === hold.toOn && minute < hold.toMinutes)));
}

/** Minutes from one position to another on a day. */
function moveMinutes(input: PlanInput, day: PlanDay, from: string, to: string): number {
  const a = input.positions.find((position) => position.id === from)?.place;
  const b = input.positions.find((position) => position.id === to)?.place;
  const metres = a && b ? Math.sqrt((a.eastM - b.eastM) ** 2 + (a.northM - b.northM) ** 2) : 0;
  return from === to ? 0 : (day.paceFactor ?? 1) * (input.moveMinutes + (input.moveMinutesPerM ?? 0) * metres);
}

interface TimedWork {
  set: PlannedSet;
  workFromMinutes: number;
  endMinutes: number;
}

/** Sets of a day by start, with the minute at which somebody must begin to get ready or move. */
function timedWork(input: PlanInput, day: PlanDay, sets: readonly PlannedSet[]): TimedWork[] {
  const lastByTap = new Map<string, TimedWork>();
  return [...sets].sort((a, b) => a.startMinutes - b.startMinutes).map((set) => {
    const before = lastByTap.get(set.tapId);
    let setup = input.leadMinutes;
    if (before) {
      const move = moveMinutes(input, day, before.set.positionId, set.positionId);
      const isLongPause = set.startMinutes - before.endMinutes > Math.max(NEW_OUTING_MINUTES, input.leadMinutes);
      setup = isLongPause ? Math.max(move, input.leadMinutes) : move;
    }
    const work = { set, workFromMinutes: set.startMinutes - setup, endMinutes: set.startMinutes + set.minutes };
    lastByTap.set(set.tapId, work);
    return work;
  });
}

function hasOnlyFiniteNumbers(value: unknown): boolean {
  if (typeof value === 'number') {
    return Number.isFinite(value);
  }
  if (Array.isArray(value)) {
    return value.every(hasOnlyFiniteNumbers);
  }
  return typeof value === 'object' && value !== null ? Object.values(value).every(hasOnlyFiniteNumbers) : true;
}

/**
 * Verifies every limit of a plan again with plain arithmetic, minute by minute, without the planner's own helpers.
 * @returns what is broken, empty for a feasible plan
 */
export function checkPlan(input: PlanInput, result: PlanResult): PlanBreach[] {
  const breaches: PlanBreach[] = [];
  const zones = new Map(input.zones.map((zone) => [zone.id, zone]));
  const positions = new Map(input.positions.map((position) => [position.id, position]));
  const taps = new Map(input.taps.map((tap) => [tap.id, tap]));
  const breach = (on: string, limit: string, detail: string) => breaches.push({ on, limit, detail });

  if (!hasOnlyFiniteNumbers(result)) {
    breach(input.startOn, 'finite', 'a number in the plan is not finite');
  }
  if (result.days.length !== input.dayCount) {
    breach(input.startOn, 'days', `${result.days.length} of ${input.dayCount} days`);
    return breaches;
  }

  const depletionMm = new Map<string, number>();
  for (const position of input.positions) {
    const zone = zones.get(position.zoneId);
    const applied = input.alreadyApplied.filter((entry) => entry.positionId === position.id).reduce((sum, entry) => sum + entry.depthMm, 0);
    depletionMm.set(position.id, Math.max(0, Math.min(zone?.totalAvailableMm ?? 0, position.depletionMm ?? zone?.depletionMm ?? 0) - applied));
  }
  const unservedMm = new Map(input.zones.map((zone) => [zone.id, zone.depletionMm]));

  result.days.forEach((planned, index) => {
    const day = input.days[index];
    if (!day || planned.on !== day.on) {
      breach(planned.on, 'days', 'out of order');
      return;
    }
    const sets = planned.rounds.flatMap((round) => round.sets);
    for (const set of sets) {
      checkSet(set, day, index);
    }
    checkTimes(sets, day, index);
    checkRounds(planned);
    checkCompleteness(planned, sets, index);
    advance(planned, sets, day, index);
  });
  checkVolumes();
  checkLocks();
  for (const shortage of result.shortages) {
    if (!(shortage.shortMm > 0) || shortage.reasons.length === 0 || !zones.has(shortage.zoneId)) {
      breach(shortage.on, 'shortage', `${shortage.zoneId} short by ${shortage.shortMm} mm`);
    }
  }
  return breaches;

  function isUsable(position: PlanPosition): boolean {
    const tap = position.tapId === null ? undefined : taps.get(position.tapId);
    const awayM = tap?.place && position.place ? Math.sqrt((tap.place.eastM - position.place.eastM) ** 2 + (tap.place.northM - position.place.northM) ** 2) : 0;
    return tap !== undefined && position.rateMmPerHour !== null && (position.hoseLengthM === undefined || awayM <= position.hoseLengthM);
  }

  function checkVolumes(): void {
    const sets = result.days.flatMap((planned, index) => planned.rounds.flatMap((round) => round.sets.map((set) => ({ index, on: planned.on, set }))));
    for (const cap of input.monthCaps ?? []) {
      const litres = sets.filter(({ on }) => on.startsWith(cap.month)).reduce((sum, { set }) => sum + set.litres, 0);
      if (litres > Math.max(0, cap.capLitres - cap.usedLitres) + 1e-3) {
        breach(input.startOn, 'month cap', `${litres} L in ${cap.month}`);
      }
    }
    for (const position of input.positions) {
      const limit = position.weeklyLimit;
      for (let last = 0; limit && last < input.dayCount; last += 1) {
        const own = sets.filter(({ index, set }) => set.positionId === position.id && index <= last && index > last - 7);
        const before = limit.appliedMm.filter((_, at) => at - 6 > last - 7).reduce((sum, mm) => sum + mm, 0);
        const given = own.reduce((sum, { set }) => sum + set.grossMm, 0);
        if (given > 0 && given + before > limit.depthMm + 1e-6) {
          breach(result.days[last]?.on ?? '', 'weekly limit', `${position.id}: ${given + before} mm`);
        }
      }
    }
  }

  function checkLocks(): void {
    for (const lock of input.lockedSets ?? []) {
      const isKept = result.days.some((planned) => planned.on === lock.on && planned.rounds.some((round) => round.sets.some((set) =>
        set.positionId === lock.positionId && set.startMinutes === lock.startMinutes && set.minutes === lock.minutes)));
      const isNamed = result.missing.some((each) => each.code === 'lock_impossible' && each.values.positionId === lock.positionId && each.values.on === lock.on && each.values.startMinutes === lock.startMinutes);
      if (!isKept && !isNamed) {
        breach(lock.on, 'fixed set', `${lock.positionId} at ${lock.startMinutes}`);
      }
    }
  }

  function parts(set: PlannedSet): { zone: PlanZone; position: PlanPosition; rate: number } | null {
    const zone = zones.get(set.zoneId);
    const position = positions.get(set.positionId);
    if (!zone || !position || position.zoneId !== zone.id || position.tapId !== set.tapId || position.rateMmPerHour === null) {
      return null;
    }
    return { zone, position, rate: position.rateMmPerHour };
  }

  function checkSet(set: PlannedSet, day: PlanDay, index: number): void {
    const known = parts(set);
    const tap = taps.get(set.tapId);
    if (!known || !tap) {
      breach(day.on, 'references', `${set.positionId} on ${set.tapId}`);
      return;
    }
    const { zone, position, rate } = known;
    const endMinutes = set.startMinutes + set.minutes;
    if (!Number.isInteger(set.minutes) || !Number.isInteger(set.startMinutes) || set.minutes < 1 || set.startMinutes < 0 || endMinutes > 1440) {
      breach(day.on, 'whole minutes', `${set.positionId} ${set.startMinutes} + ${set.minutes}`);
    }
    if (Math.abs(set.grossMm - (rate * set.minutes) / 60) > 1e-6 || Math.abs(set.depthMm * position.runTimeMultiplier - set.grossMm) > 1e-6) {
      breach(day.on, 'depth from minutes', `${set.positionId}: ${set.depthMm} mm net, ${set.grossMm} mm gross in ${set.minutes} min`);
    }
    if (Math.abs(set.litres - tap.flowLpm * set.minutes) > 1e-6) {
      breach(day.on, 'litres', `${set.positionId}: ${set.litres}`);
    }
    if (set.reasons.length === 0) {
      breach(day.on, 'reasons', `${set.positionId} has none`);
    }
    const isSeeded = isRunningSowing(zone);
    if ((set.kind === 'dose') !== isSeeded) {
      breach(day.on, 'dose or set', `${set.positionId} is a ${set.kind}`);
    }
    const awayM = tap.place && position.place ? Math.sqrt((tap.place.eastM - position.place.eastM) ** 2 + (tap.place.northM - position.place.northM) ** 2) : 0;
    if (position.hoseLengthM !== undefined && awayM > position.hoseLengthM) {
      breach(day.on, 'reach', position.id);
    }
    if (!isSeeded && zone.resting && !set.locked) {
      breach(day.on, 'resting', zone.id);
    }
    if (!isSeeded && !day.hours?.windMps && day.windMps !== null && day.windMps > input.maxWindMps) {
      breach(day.on, 'wind', `${set.positionId} in ${day.windMps} m/s`);
    }
    if (isSeeded && !set.locked && day.sunriseMinutes !== null && day.sunsetMinutes !== null && day.sunriseMinutes < day.sunsetMinutes
      && (set.startMinutes < day.sunriseMinutes || endMinutes > day.sunsetMinutes)) {
      breach(day.on, 'daylight', `${set.positionId} ${set.startMinutes} to ${endMinutes}`);
    }
    for (let minute = set.startMinutes; minute < endMinutes; minute += 1) {
      const broken = input.rules.find((rule) => !allows(input, rule, day.on, minute, isSeeded, position))
        ?? (isSeeded ? permitsOn(input, day.on, zone.id).find((permit) => permit.allowed && !isIn(permit.allowed, minute)) : undefined);
      if (broken) {
        breach(day.on, 'water rule', `${set.positionId} at ${minute} against ${broken.name}`);
        break;
      }
      if (isHeld(input, day.on, minute, zone.id)) {
        breach(day.on, 'hold', `${set.positionId} at ${minute}`);
        break;
      }
      const hour = Math.floor(minute / 60);
      if ((day.hours?.rainMm?.[hour] ?? 0) >= 0.5 || (!isSeeded && (day.hours?.windMps?.[hour] ?? 0) > input.maxWindMps)) {
        breach(day.on, 'rain or wind', `${set.positionId} at ${minute}`);
        break;
      }
      if (temperatureAtMinutes(day, minute) <= FROST_LIMIT_C - 0.05) {
        breach(day.on, 'frost', `${set.positionId} at ${minute}`);
        break;
      }
    }
    if (index === 0 && input.notBeforeMinutes !== null && set.startMinutes < input.notBeforeMinutes) {
      breach(day.on, 'not before now', `${set.positionId} at ${set.startMinutes}`);
    }
    const standingMm = ((rate - zone.intakeMmPerHour) * (set.minutes - 1)) / 60;
    if (input.supply?.drawMinutesAtMost != null && set.minutes > Math.max(1, input.supply.drawMinutesAtMost) && !set.locked) {
      breach(day.on, 'draw', `${set.positionId} for ${set.minutes} min`);
    }
    if (standingMm > planDefaults.surfaceStorageMm + 1e-9 && !set.locked) {
      breach(day.on, 'intake', `${set.positionId}: ${standingMm} mm would stand`);
    }
  }

  function checkTimes(sets: readonly PlannedSet[], day: PlanDay, index: number): void {
    const works = timedWork(input, day, sets);
    works.forEach((work, at) => {
      const tap = taps.get(work.set.tapId);
      const known = parts(work.set);
      const endsAlone = tap?.shutOffTimer && (!known || !isAttended(input, day.on, isRunningSowing(known.zone), known.position));
      if (day.dayOff) {
        breach(day.on, 'day off', work.set.positionId);
      }
      const lastNeeded = endsAlone ? work.set.startMinutes : work.endMinutes - 1;
      for (let minute = Math.floor(work.workFromMinutes); minute <= lastNeeded; minute += 1) {
        const isAhead = index > 0 || input.notBeforeMinutes === null || minute >= input.notBeforeMinutes;
        if (!isIn(day.homeWindows, minute) || !isAhead) {
          breach(day.on, 'hours at home', `${work.set.positionId} needs somebody at ${minute}`);
          break;
        }
      }
      const beside = works.filter((other) => other.set.startMinutes < work.endMinutes && work.set.startMinutes < other.endMinutes);
      // Whatever runs when this set starts runs together.
      const drawnLpm = beside.filter((other) => other.set.startMinutes <= work.set.startMinutes).reduce((sum, other) => sum + (taps.get(other.set.tapId)?.flowLpm ?? 0), 0);
      if (input.supply && drawnLpm > Math.max(input.supply.flowLpm, tap?.flowLpm ?? 0) + 1e-6) {
        breach(day.on, 'supply', `${drawnLpm} L/min at ${work.set.startMinutes}`);
      }
      for (const other of works.slice(at + 1)) {
        if (input.supply && input.supply.restMinutes > 0 && other.set.startMinutes < work.endMinutes + input.supply.restMinutes) {
          breach(day.on, 'rest of the supply', `${work.set.positionId} and ${other.set.positionId}`);
        }
        if (other.set.tapId === work.set.tapId) {
          if (other.workFromMinutes < work.endMinutes) {
            breach(day.on, 'one sprinkler a tap', `${work.set.positionId} and ${other.set.positionId}`);
          }
        } else if (other.workFromMinutes < work.set.startMinutes && work.workFromMinutes < other.set.startMinutes) {
          breach(day.on, 'one pair of hands', `${work.set.positionId} and ${other.set.positionId}`);
        }
      }
    });
  }

  function checkRounds(planned: PlannedDay): void {
    let previousEnd = -Infinity;
    for (const round of planned.rounds) {
      const starts = round.sets.map((set) => set.startMinutes);
      const ends = round.sets.map((set) => set.startMinutes + set.minutes);
      if (round.sets.length === 0 || round.startMinutes > Math.min(...starts) || round.endMinutes !== Math.max(...ends) || round.startMinutes < previousEnd) {
        breach(planned.on, 'round', `${round.startMinutes} to ${round.endMinutes}`);
      }
      previousEnd = round.endMinutes;
      const changes = [...taps.keys()].reduce((sum, tapId) => {
        const own = round.sets.filter((set) => set.tapId === tapId).sort((a, b) => a.startMinutes - b.startMinutes);
        return sum + own.filter((set, at) => at > 0 && own[at - 1]?.positionId !== set.positionId).length;
      }, 0);
      if (changes !== round.moves.length) {
        breach(planned.on, 'moves', `${round.moves.length} for ${changes} changes of position`);
      }
    }
  }

  function checkCompleteness(planned: PlannedDay, sets: readonly PlannedSet[], index: number): void {
    for (const zone of input.zones) {
      const isWatered = sets.some((set) => set.zoneId === zone.id);
      const without = planned.zonesWithout.filter((entry) => entry.zoneId === zone.id);
      if (isWatered ? without.length !== 0 : without.length !== 1 || without[0]?.reasons.length === 0) {
        breach(planned.on, 'a reason for every zone', zone.id);
      }
      const leftToRain = without.some((entry) => entry.reasons.some((each: Reason) => each.code === 'doses_left_to_rain'));
      if (!isRunningSowing(zone) || leftToRain) {
        continue;
      }
      const own = input.positions.filter((position) => position.zoneId === zone.id && isUsable(position));
      [...(zone.seed?.dosesByDay[index] ?? [])].sort((a, b) => a.atMinutes - b.atMinutes).forEach((dose, at) => {
        const given = sets.filter((set) => set.zoneId === zone.id && set.reasons.some((each) => each.code === 'dose' && each.values.number === at + 1)).length;
        const isNamed = planned.missedDoses.some((entry) => entry.zoneId === zone.id && entry.atMinutes === dose.atMinutes && entry.reasons.length > 0);
        const isDone = index === 0 && input.alreadyApplied.some((entry) => own.some((position) => position.id === entry.positionId));
        if ((own.length === 0 || given < own.length) && !isNamed && !isDone) {
          breach(planned.on, 'a dose is kept or named', `${zone.id} at ${dose.atMinutes}`);
        }
      });
    }
  }

  function advance(planned: PlannedDay, sets: readonly PlannedSet[], day: PlanDay, index: number): void {
    const rainMm = expectedRainMm(day, index);
    const dayEnd = (zone: PlanZone, startMm: number, waterMm: number): number => {
      // Below zero lies the surplus that the day uses before the rest of it drains.
      const wetted = startMm - waterMm - rainMm;
      const below = Math.max(0, wetted - zone.refillLineMm);
      const reserve = zone.totalAvailableMm - zone.refillLineMm;
      const demand = (zone.demandMmByDay[index] ?? 0) * (below === 0 ? 1 : 1 - below / reserve);
      return Math.min(zone.totalAvailableMm, Math.max(0, wetted + demand));
    };
    for (const zone of input.zones) {
      const own = input.positions.filter((position) => position.zoneId === zone.id);
      const shareSum = Math.max(1, own.reduce((sum, position) => sum + position.zoneShare, 0));
      let mean = 0;
      let served = 0;
      for (const position of own) {
        const startMm = depletionMm.get(position.id) ?? 0;
        const runs = sets.filter((set) => set.positionId === position.id);
        const waterMm = runs.reduce((sum, set) => sum + set.depthMm, 0);
        const minuteMm = ((position.rateMmPerHour ?? 0) / 60 / position.runTimeMultiplier) * Math.max(1, runs.length);
        const isWateredIn = (input.waterIns ?? []).some((wanted) => wanted.zoneId === zone.id && wanted.fromOn <= day.on && day.on <= wanted.byOn && waterMm <= wanted.depthMm + minuteMm);
        if (!isRunningSowing(zone) && !isWateredIn && !runs.some((set) => set.locked) && waterMm > startMm + minuteMm + 1e-6) {
          breach(day.on, 'no more than the soil has room for', `${position.id}: ${waterMm} mm into ${startMm} mm`);
        }
        depletionMm.set(position.id, dayEnd(zone, startMm, waterMm));
        if (isUsable(position)) {
          mean += (position.zoneShare / shareSum) * dayEnd(zone, startMm, waterMm);
          served += position.zoneShare / shareSum;
        }
      }
      const dry = dayEnd(zone, unservedMm.get(zone.id) ?? 0, 0);
      unservedMm.set(zone.id, dry);
      const expected = mean + Math.max(0, 1 - served) * dry;
      const stated = planned.endDepletionMm[zone.id];
      if (stated === undefined || Math.abs(stated - expected) > 0.01 || stated < 0 || stated > zone.totalAvailableMm + 1e-9) {
        breach(day.on, 'water balance', `${zone.id}: ${stated} mm stated, ${expected} mm by the checker`);
      }
    }
  }
}
