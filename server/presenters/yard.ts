import { abilitiesOf } from '@/server/policies/yardPolicy';
import type { YardRow } from '@/server/readModels/readYard';
import type { PositionResponse } from '@/shared/contracts/equipment';
import type { PermitResponse, Supply, WaterRuleResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import type { ZoneResponse } from '@/shared/contracts/zones';
import { presentHose, presentPositions, presentSprinkler, presentTap } from './equipment';

type Nullable<T, K extends keyof T> = Omit<T, K> & { [F in K]?: T[F] | null };
type ZoneRow = Nullable<Omit<ZoneResponse, 'hasSunDiary'>, 'sideAM' | 'sideBM' | 'seededOn' | 'sunHoursOn'> & { hasSunDiary?: boolean; horizonDeg?: number[] | null };
type RuleRow = Nullable<WaterRuleResponse, 'weekdays' | 'dateParity' | 'windows' | 'weekdaysByDigit' | 'devices' | 'stage' | 'seasonFrom' | 'seasonTo'>;
type PermitRow = Nullable<PermitResponse, 'windows' | 'liftsRuleIds'>;

export function presentZone(zone: ZoneRow): ZoneResponse {
  return {
    id: zone.id, name: zone.name, areaM2: zone.areaM2, sideAM: zone.sideAM ?? null, sideBM: zone.sideBM ?? null,
    grass: zone.grass, grassIsDefault: zone.grassIsDefault, soil: zone.soil, soilIsDefault: zone.soilIsDefault,
    slopePct: zone.slopePct, slopeIsDefault: zone.slopeIsDefault, sunHours: zone.sunHours, sunHoursIsDefault: zone.sunHoursIsDefault,
    sunHoursOn: zone.sunHoursOn ?? null, sunHoursOnIsDefault: zone.sunHoursOnIsDefault, hasSunDiary: zone.hasSunDiary ?? (zone.horizonDeg ?? null) !== null,
    compaction: zone.compaction, compactionIsDefault: zone.compactionIsDefault, treeRootShare: zone.treeRootShare, treeRootShareIsDefault: zone.treeRootShareIsDefault,
    coverFraction: zone.coverFraction, coverFractionIsDefault: zone.coverFractionIsDefault,
    seededOn: zone.seededOn ?? null, mulch: zone.mulch, resting: zone.resting, priority: zone.priority,
  };
}

export function presentRule(rule: RuleRow): WaterRuleResponse {
  return {
    id: rule.id, name: rule.name, weekdays: rule.weekdays ?? null, dateParity: rule.dateParity ?? null,
    windows: rule.windows?.map(({ fromMinutes, toMinutes }) => ({ fromMinutes, toMinutes })) ?? null,
    weekdaysByDigit: rule.weekdaysByDigit ?? null, attended: rule.attended, devices: rule.devices ?? null, stage: rule.stage ?? null, exemptSeeded: rule.exemptSeeded,
    seasonFrom: rule.seasonFrom ?? null, seasonTo: rule.seasonTo ?? null, source: rule.source, sourceOn: rule.sourceOn,
  };
}

export function presentPermit(permit: PermitRow): PermitResponse {
  return {
    id: permit.id, name: permit.name, zoneIds: permit.zoneIds, fromOn: permit.fromOn, toOn: permit.toOn, blackoutMonths: permit.blackoutMonths,
    windows: permit.windows?.map(({ fromMinutes, toMinutes }) => ({ fromMinutes, toMinutes })) ?? null, liftsRuleIds: permit.liftsRuleIds ?? null,
    source: permit.source, sourceOn: permit.sourceOn,
  };
}

function presentSupply({ supplyKind, supplyFlowLpm, supplyRestMinutes, supplyDrawMinutes }: YardRow): Supply | null {
  return supplyKind === null || supplyFlowLpm === null ? null
    : { kind: supplyKind, flowLpm: supplyFlowLpm, restMinutes: supplyRestMinutes ?? 0, drawMinutesAtMost: supplyDrawMinutes };
}

/** What is done and what is still to do before the plan rests on the yard's own measurements. */
function setUpSteps(yard: YardRow, positions: readonly PositionResponse[]): YardResponse['setUp'] {
  const every = <T>(things: readonly T[], test: (thing: T) => boolean) => things.length > 0 && things.every(test);
  return [
    { step: 'tap', done: yard.taps.length > 0 },
    { step: 'bucket_test', done: every(yard.taps, (tap) => tap.lastTestedAt !== null) },
    { step: 'hose', done: yard.hoses.length > 0 },
    { step: 'sprinkler', done: yard.sprinklers.length > 0 },
    { step: 'zone', done: yard.zones.length > 0 },
    { step: 'position', done: every(yard.zones, (zone) => positions.some((position) => position.zoneId === zone.id)) },
    { step: 'catch_test', done: every(positions, (position) => position.rateSource === 'catch_test') },
    { step: 'hours', done: every(yard.hours, (window) => !window.isDefault) },
  ];
}

/** A yard with all its facts, what is still to do, and what this member may do. */
export function presentYard(yard: YardRow): YardResponse {
  const positions = presentPositions(yard.positions);
  return {
    id: yard.id, name: yard.name, placeName: yard.placeName, role: yard.role, timeZone: yard.timeZone, units: yard.units,
    latitudeDeg: yard.latitudeDeg, longitudeDeg: yard.longitudeDeg, elevationM: yard.elevationM, elevationIsDefault: yard.elevationIsDefault,
    moveMinutes: yard.moveMinutes, moveMinutesIsDefault: yard.moveMinutesIsDefault, reminderLeadMinutes: yard.reminderLeadMinutes,
    addressDigit: yard.addressDigit, waterStage: yard.waterStage, waterStageIsDefault: yard.waterStageIsDefault, supply: presentSupply(yard),
    taps: yard.taps.map(presentTap), hoses: yard.hoses.map(presentHose), sprinklers: yard.sprinklers.map(presentSprinkler),
    zones: yard.zones.map(presentZone), positions,
    hours: yard.hours.map(({ weekday, fromMinutes, toMinutes, isDefault }) => ({ weekday, fromMinutes, toMinutes, isDefault })),
    rules: yard.rules.map(presentRule), permits: yard.permits.map(presentPermit), setUp: setUpSteps(yard, positions), abilities: abilitiesOf(yard.role),
    preferences: { wantsMorningEmail: yard.wantsMorningEmail, wantsMoveEmail: yard.wantsMoveEmail },
  };
}
