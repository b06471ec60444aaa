import { createHose } from '@/server/commands/equipment/changeHoses';
import { createPosition } from '@/server/commands/equipment/changePositions';
import { createSprinkler } from '@/server/commands/equipment/changeSprinklers';
import { createTap } from '@/server/commands/equipment/changeTaps';
import { recordBucketTest } from '@/server/commands/measuring/changeBucketTests';
import { recordCatchTest } from '@/server/commands/measuring/changeCatchTests';
import { createPermit } from '@/server/commands/yards/changePermits';
import { createWaterRule } from '@/server/commands/yards/changeWaterRules';
import { createYard } from '@/server/commands/yards/createYard';
import { createZone } from '@/server/commands/yards/changeZones';
import { putHours } from '@/server/commands/yards/putHours';
import { updateYard } from '@/server/commands/yards/updateYard';
import type { FactChange } from '@/server/commands/yards/yardFacts';
import type { AppContext } from '@/server/context';
import { Membership } from '@/server/models';
import { createCatchTestRequestSchema } from '@/shared/contracts/catchTests';
import { createBucketTestRequestSchema, createPositionRequestSchema, createTapRequestSchema } from '@/shared/contracts/equipment';
import { createPermitRequestSchema, createWaterRuleRequestSchema } from '@/shared/contracts/waterRules';
import { createZoneRequestSchema } from '@/shared/contracts/zones';
import { join, type DemonstrationUsers } from './people';
import type { PositionScript, YardScript } from './yardScript';

export interface BuiltYard {
  yardId: string;
  zoneIds: Map<string, string>;
  /** Makes the zones and permits that come on a day; true when there were any. */
  addZonesOf(on: string): Promise<boolean>;
  /** Records the catch-cup tests of a day; true when there were any. */
  testOn(on: string): Promise<boolean>;
}

/** Sets a yard up through the same commands as people do, at the instant at which the clock stands. */
export async function buildYard(context: AppContext, users: DemonstrationUsers, script: YardScript): Promise<BuiltYard> {
  const { database, clock } = context;
  const userId = users[script.owner].id;
  const yardId = await database.transaction(() => createYard(database, userId, script.yard, clock.now()));
  await Membership.update({ wantsMorningEmail: false, wantsMoveEmail: false }, { where: { yardId, userId } });
  const change = (): FactChange => ({ database, yardId, userId, now: clock.now() });
  const taps = new Map<string, string>();
  const hoses = new Map<string, string>();
  const sprinklers = new Map<string, string>();
  const zoneIds = new Map<string, string>();
  const positions = new Map<string, { id: string; script: PositionScript }>();
  await database.transaction(async () => {
    for (const { bucket, ...tap } of script.taps) {
      const { id } = await createTap(change(), createTapRequestSchema.parse(tap));
      taps.set(tap.name, id);
      if (bucket) {
        await recordBucketTest(change(), id, createBucketTestRequestSchema.parse(bucket));
      }
    }
    for (const hose of script.hoses) {
      hoses.set(hose.name, (await createHose(change(), hose)).id);
    }
    for (const sprinkler of script.sprinklers) {
      sprinklers.set(sprinkler.name, (await createSprinkler(change(), sprinkler)).id);
    }
    await putHours(change(), { windows: weekOf(script.hours) });
    if (script.water) {
      await updateYard(change(), script.water);
    }
    for (const rule of script.rules ?? []) {
      await createWaterRule(change(), createWaterRuleRequestSchema.parse(rule));
    }
    if (script.helper) {
      await join(context, yardId, users[script.helper].id, 'helper');
    }
    await join(context, yardId, users.inez.id, 'consultant');
  });
  const addZonesOf = (on: string) => database.transaction(async () => {
    const own = script.zones.filter(({ createdOn }) => (createdOn ?? script.fromOn) === on);
    for (const { positions: places, createdOn: _createdOn, ...zone } of own) {
      const { id: zoneId } = await createZone(change(), createZoneRequestSchema.parse(zone));
      zoneIds.set(zone.name, zoneId);
      for (const place of places) {
        const { name, mark, wettedAreaM2, alternateSets, weeklyLimit } = place;
        const id = await createPosition(change(), createPositionRequestSchema.parse({
          name, mark, wettedAreaM2, alternateSets, weeklyLimit, zoneId, tapId: taps.get(place.tap), hoseId: hoses.get(place.hose), sprinklerId: sprinklers.get(place.sprinkler),
        }));
        positions.set(name, { id, script: place });
      }
    }
    const permits = (script.permits ?? []).filter((permit) => permit.on === on);
    for (const { on: _on, zones, ...permit } of permits) {
      await createPermit(change(), createPermitRequestSchema.parse({ ...permit, zoneIds: zones.map((name) => zoneIds.get(name)) }));
    }
    return own.length > 0 || permits.length > 0;
  });
  await addZonesOf(script.fromOn);
  return {
    yardId, zoneIds, addZonesOf,
    testOn: (on) => database.transaction(async () => {
      let tested = false;
      for (const { id, script: { catchTest } } of positions.values()) {
        if (catchTest?.on === on) {
          const { on: _on, ...test } = catchTest;
          await recordCatchTest(change(), id, createCatchTestRequestSchema.parse(test));
          tested = true;
        }
      }
      return tested;
    }),
  };
}

function weekOf({ weekdays, weekend }: YardScript['hours']) {
  return Array.from({ length: 7 }, (_, weekday) => (weekday === 0 || weekday === 6 ? weekend : weekdays).map(([fromMinutes, toMinutes]) => ({ weekday, fromMinutes, toMinutes }))).flat();
}
