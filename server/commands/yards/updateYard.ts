import { QueryTypes, type Sequelize } from 'sequelize';
import { ClimateRecord, WeatherDay } from '@/server/models';
import type { Supply } from '@/shared/contracts/waterRules';
import type { UpdateYardRequest } from '@/shared/contracts/yards';
import { factsChanged } from '@/server/commands/factsChanged';
import { storeHorizonsOf } from '@/server/commands/ground/changeSunDiary';
import { recordEvent } from '@/server/commands/recordEvent';
import { yardDefaults } from './yardDefaults';
import { changesOf, holdYard, todayAt, type FactChange } from './yardFacts';

/** Earliest day for which weather is kept, null when there is none. */
async function firstWeatherOn(database: Sequelize, yardId: string): Promise<string | null> {
  const [row] = await database.query<{ first: string | null }>('SELECT min("on")::text AS first FROM weather_days WHERE yard_id = $1', { bind: [yardId], type: QueryTypes.SELECT });
  return row?.first ?? null;
}

function supplyFields(supply: Supply | null) {
  return {
    supplyKind: supply?.kind ?? null, supplyFlowLpm: supply?.flowLpm ?? null, supplyRestMinutes: supply?.restMinutes ?? null, supplyDrawMinutes: supply?.drawMinutesAtMost ?? null,
  };
}

/**
 * Changes what is told of a yard. Another place has another weather: what was fetched for the old one goes, and the budget is reckoned anew
 * from its first day.
 */
export async function updateYard(change: FactChange, request: UpdateYardRequest): Promise<void> {
  const yard = await holdYard(change);
  const { elevationM, moveMinutes, waterStage, supply, ...plain } = request;
  const fields = {
    ...plain,
    ...(elevationM === undefined ? {} : { elevationM: elevationM ?? yardDefaults.elevationM, elevationIsDefault: elevationM === null }),
    ...(moveMinutes === undefined ? {} : { moveMinutes: moveMinutes ?? yardDefaults.moveMinutes, moveMinutesIsDefault: moveMinutes === null }),
    ...(waterStage === undefined ? {} : { waterStage: waterStage ?? yardDefaults.waterStage, waterStageIsDefault: waterStage === null }),
    ...(supply === undefined ? {} : supplyFields(supply)),
  };
  const changes = changesOf(yard.get(), fields);
  if (Object.keys(changes).length === 0) {
    return;
  }
  const hasMoved = 'latitudeDeg' in changes || 'longitudeDeg' in changes || 'timeZone' in changes;
  let changedOn = hasMoved || 'elevationM' in changes ? todayAt(yard, change.now) : null;
  if (hasMoved) {
    const first = await firstWeatherOn(change.database, yard.id);
    changedOn = first !== null && (changedOn === null || first < changedOn) ? first : changedOn;
    await WeatherDay.destroy({ where: { yardId: yard.id } });
    await change.database.query('DELETE FROM weather_fetches WHERE yard_id = $1', { bind: [yard.id], type: QueryTypes.DELETE });
    await ClimateRecord.destroy({ where: { yardId: yard.id } });
    if (elevationM === undefined && yard.elevationIsDefault) {
      Object.assign(fields, { elevationM: yardDefaults.elevationM });
    }
  }
  await yard.update(fields);
  if (hasMoved) {
    await storeHorizonsOf(yard);
  }
  await recordEvent({ yardId: yard.id, userId: change.userId, verb: 'yard.updated', subjectKind: 'yard', subjectId: yard.id, data: { changes } }, change.now);
  await factsChanged(change.database, yard.id, changedOn);
}
