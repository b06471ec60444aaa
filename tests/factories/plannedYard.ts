import { randomUUID } from 'node:crypto';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import type { Reason } from '@/scheduling/planning/types';
import { Membership, Plan, PlanSet, Position, Sprinkler, Tap, Yard, Zone } from '@/server/models';
import type { Role } from '@/shared/contracts/common';
import { instantAt } from '@/shared/time';
import type { TestContext } from '../setup/testContext';
import { signedIn, type SignedIn } from './people';

export interface SetWish {
  position: number;
  startMinutes: number;
  minutes: number;
  roundIndex?: number;
  kind?: 'set' | 'dose';
}

export interface PlannedYard {
  yardId: string;
  timeZone: string;
  zoneId: string;
  positionIds: string[];
  tapIds: string[];
  owner: SignedIn;
  /** Adds a person with a part in the yard. */
  member(role: Role, wishes?: { wantsMorningEmail?: boolean; wantsMoveEmail?: boolean; name?: string }): Promise<SignedIn>;
  /** Stores a newer plan with these sets for a civil day. */
  plan(on: string, sets: SetWish[]): Promise<string>;
}

/** Laid down in an hour by every position of these yards [mm/h], and how much longer it runs for an even result. */
export const plannedRate = { rateMmPerHour: 12, runTimeMultiplier: 1.2 };

const dueReason: Reason = { code: 'past_line', values: { depletionMm: 14.2, refillLineMm: 12.7 } };

/**
 * A yard of one zone with positions on one tap or two, and a way to give it plans by hand, for tests of what follows a plan. New York, US units.
 */
export async function plannedYard(test: TestContext, options: { positions?: number; taps?: number; shutOffTimer?: boolean; timeZone?: string; name?: string } = {}): Promise<PlannedYard> {
  const timeZone = options.timeZone ?? 'America/New_York';
  const yardId = randomUUID();
  await Yard.create({
    id: yardId, name: options.name ?? 'Hazel Row', placeName: 'Yonkers', latitudeDeg: 40.93, longitudeDeg: -73.9, elevationM: 20, elevationIsDefault: true, timeZone, units: 'us',
    moveMinutes: 5, moveMinutesIsDefault: true, reminderLeadMinutes: 20,
  });
  const tapIds = Array.from({ length: options.taps ?? 1 }, () => randomUUID());
  for (const [index, id] of tapIds.entries()) {
    await Tap.create({ id, yardId, name: `Tap ${index + 1}`, flowLpm: 15, flowIsDefault: false, shutOffTimer: options.shutOffTimer ?? false });
  }
  const sprinklerId = randomUUID();
  await Sprinkler.create({ id: sprinklerId, yardId, name: 'Impact on a spike', kind: 'impact' });
  const zoneId = randomUUID();
  await Zone.create({
    id: zoneId, yardId, name: 'Front lawn', areaM2: 150, grass: 'cool_mix', grassIsDefault: true, soil: 'loam', soilIsDefault: true, slopePct: 0, slopeIsDefault: true,
    sunHours: 8, sunHoursIsDefault: true,
  });
  const positionIds = Array.from({ length: options.positions ?? 2 }, () => randomUUID());
  for (const [index, id] of positionIds.entries()) {
    await Position.create({
      id, yardId, zoneId, tapId: tapIds[index % tapIds.length] ?? '', sprinklerId, name: `Spot ${index + 1}`, mark: index === 0 ? 'by the <maple> & gate' : '', wettedAreaM2: 75,
      wettedAreaIsDefault: false, sortOrder: index,
    });
  }
  let version = 0;
  const member: PlannedYard['member'] = async (role, wishes = {}) => {
    const person = await signedIn(test, wishes.name === undefined ? {} : { name: wishes.name });
    await Membership.create({
      id: randomUUID(), yardId, userId: person.user.id, role, wantsMorningEmail: wishes.wantsMorningEmail ?? role !== 'consultant', wantsMoveEmail: wishes.wantsMoveEmail ?? role !== 'consultant',
    });
    return person;
  };
  const owner = await member('owner', { name: 'Ada Larkin' });
  return {
    yardId, timeZone, zoneId, positionIds, tapIds, owner, member,
    async plan(on, sets) {
      version += 1;
      const id = randomUUID();
      await Plan.create({
        id, yardId, version, fromOn: on, toOn: on, cause: 'test', planner: yardPlanner.name, factsVersion: 0, createdAt: test.clock.now(),
        result: { planner: yardPlanner.name, days: [{ on, rounds: [], zonesWithout: [], missedDoses: [], endDepletionMm: {} }], shortages: [], missing: [] },
      });
      for (const [index, wish] of sets.entries()) {
        const position = wish.position;
        await PlanSet.create({
          id: randomUUID(), yardId, planId: id, zoneId, positionId: positionIds[position] ?? '', tapId: tapIds[position % tapIds.length] ?? '', kind: wish.kind ?? 'set', on,
          roundIndex: wish.roundIndex ?? 0, sortOrder: index, startMinutes: wish.startMinutes, minutes: wish.minutes, startAt: instantAt(on, wish.startMinutes, timeZone),
          endAt: instantAt(on, wish.startMinutes + wish.minutes, timeZone), depthMm: (plannedRate.rateMmPerHour * wish.minutes) / 60 / plannedRate.runTimeMultiplier,
          grossMm: (plannedRate.rateMmPerHour * wish.minutes) / 60, reasons: [dueReason],
        });
      }
      return id;
    },
  };
}
