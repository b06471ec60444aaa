import { randomUUID } from 'node:crypto';
import { EstablishmentScheduleRow, HomeWindow, Membership, Position, RoundSet, Sprinkler, Tap, Yard, Zone } from '@/server/models';
import type { EstablishmentSchedule } from '@/scheduling/establishment';
import type { GrassId, SoilTexture } from '@/shared/contracts/zones';
import type { RoundSetStatus } from '@/shared/contracts/rounds';
import { instantAt } from '@/shared/time';
import type { TestContext } from '../setup/testContext';
import { signedIn, type SignedIn } from './people';

export interface ZoneWish {
  name?: string;
  areaM2?: number;
  grass?: GrassId;
  soil?: SoilTexture;
  sunHours?: number;
  seededOn?: string | null;
  schedule?: EstablishmentSchedule;
  resting?: boolean;
  priority?: number;
  /** Instant at which the zone was set up, in ISO form; now when left out. */
  createdAt?: string;
  positions?: number;
}

export interface YardWish {
  latitudeDeg?: number;
  longitudeDeg?: number;
  timeZone?: string;
  elevationIsDefault?: boolean;
  /** Hours at home of every day; 5:30 to 8:00 when left out. */
  hours?: { fromMinutes: number; toMinutes: number }[];
  zones?: ZoneWish[];
  shutOffTimer?: boolean;
}

export interface WateredYard {
  id: string;
  timeZone: string;
  owner: SignedIn;
  tapId: string;
  zones: { id: string; positionIds: string[] }[];
  /** Stores a set that was done, cut short or skipped outside of any round that runs. */
  water(set: { zone?: number; position?: number; on: string; appliedMm?: number; runTimeMultiplier?: number; status?: RoundSetStatus; kind?: 'set' | 'dose'; roundIndex?: number; startMinutes?: number }): Promise<void>;
}

/** A yard with everything that its weather, budget and plan rest on; one zone with two positions in New York when nothing is said. */
export async function wateredYard(test: TestContext, wish: YardWish = {}): Promise<WateredYard> {
  const id = randomUUID();
  const timeZone = wish.timeZone ?? 'America/New_York';
  await Yard.create({
    id, name: 'Fern Hollow', placeName: 'Somewhere', latitudeDeg: wish.latitudeDeg ?? 40.93, longitudeDeg: wish.longitudeDeg ?? -73.9, elevationM: 20,
    elevationIsDefault: wish.elevationIsDefault ?? false, timeZone, units: 'metric', moveMinutes: 5, moveMinutesIsDefault: true, reminderLeadMinutes: 20,
  });
  const owner = await signedIn(test);
  await Membership.create({ id: randomUUID(), yardId: id, userId: owner.user.id, role: 'owner' });
  for (let weekday = 0; weekday < 7; weekday += 1) {
    for (const window of wish.hours ?? [{ fromMinutes: 330, toMinutes: 480 }]) {
      await HomeWindow.create({ id: randomUUID(), yardId: id, weekday, ...window, isDefault: false });
    }
  }
  const tapId = randomUUID();
  await Tap.create({ id: tapId, yardId: id, name: 'Back tap', flowLpm: 18, flowIsDefault: false, shutOffTimer: wish.shutOffTimer ?? false });
  const sprinklerId = randomUUID();
  await Sprinkler.create({ id: sprinklerId, yardId: id, name: 'Oscillating', kind: 'oscillating' });
  const zones: WateredYard['zones'] = [];
  for (const [index, zone] of (wish.zones ?? [{}]).entries()) {
    const zoneId = randomUUID();
    const areaM2 = zone.areaM2 ?? 120;
    await Zone.create({
      id: zoneId, yardId: id, name: zone.name ?? `Lawn ${index + 1}`, areaM2, grass: zone.grass ?? 'cool_mix', grassIsDefault: false, soil: zone.soil ?? 'loam', soilIsDefault: false,
      slopePct: 1, slopeIsDefault: true, sunHours: zone.sunHours ?? 24, sunHoursIsDefault: false, seededOn: zone.seededOn ?? null, resting: zone.resting ?? false,
      priority: zone.priority ?? 100 + index, createdAt: zone.createdAt === undefined ? test.clock.now() : new Date(zone.createdAt),
    });
    if (zone.schedule) {
      await EstablishmentScheduleRow.create({ id: randomUUID(), yardId: id, zoneId, schedule: zone.schedule, isDefault: false, validFrom: test.clock.now(), createdAt: test.clock.now() });
    }
    const count = zone.positions ?? 2;
    const positionIds = Array.from({ length: count }, () => randomUUID());
    for (const [place, positionId] of positionIds.entries()) {
      await Position.create({
        id: positionId, yardId: id, zoneId, tapId, sprinklerId, name: `Spot ${place + 1}`, wettedAreaM2: areaM2 / count, wettedAreaIsDefault: false, sortOrder: place,
      });
    }
    zones.push({ id: zoneId, positionIds });
  }
  return {
    id, timeZone, owner, tapId, zones,
    async water(set) {
      const zone = zones[set.zone ?? 0];
      const positionId = zone?.positionIds[set.position ?? 0];
      if (!zone || !positionId) {
        throw new Error('the yard has no such position');
      }
      const status = set.status ?? 'done';
      const startAt = instantAt(set.on, set.startMinutes ?? 360, timeZone);
      await RoundSet.create({
        id: randomUUID(), yardId: id, roundId: null, zoneId: zone.id, positionId, kind: set.kind ?? 'set', on: set.on, roundIndex: set.roundIndex ?? 0, sortOrder: 1,
        plannedStartAt: startAt, plannedMinutes: 60, rateMmPerHour: 18, runTimeMultiplier: set.runTimeMultiplier ?? 1, zoneShare: 1 / zone.positionIds.length, status,
        skipCause: status === 'skipped' ? 'no_time' : null, startedAt: status === 'skipped' ? null : startAt, endedAt: status === 'skipped' ? null : new Date(startAt.getTime() + 3_600_000),
        minutesRun: status === 'skipped' ? null : 60, appliedMm: status === 'skipped' ? null : set.appliedMm ?? 12,
      });
    },
  };
}
