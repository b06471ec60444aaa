import { QueryTypes, type Sequelize } from 'sequelize';
import type { PlanDevice, PlanInput, PlanPermit, PlanPosition, PlanSupply } from '@/scheduling/planning/types';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { Permit } from '@/server/models';
import type { PositionRow } from '@/server/readModels/positionRates';
import type { GuardedGround, SprinklerKind } from '@/shared/contracts/equipment';
import type { SupplyKind } from '@/shared/contracts/waterRules';
import { partsOfRule } from './planRules';

/** Days before the first that share a limit of seven days with it. */
const DAYS_BEFORE = 6;

/** What limits the water of a yard besides its rules, and what was done under these limits. */
export interface PlanLimits {
  addressDigit: number | null;
  waterStage: number;
  supplyKind: SupplyKind | null;
  supplyFlowLpm: number | null;
  supplyRestMinutes: number | null;
  supplyDrawMinutes: number | null;
  permits: Pick<Permit, 'id' | 'name' | 'source' | 'sourceOn' | 'zoneIds' | 'fromOn' | 'toOn' | 'blackoutMonths' | 'windows' | 'liftsRuleIds'>[];
  /** Mean depth laid down at a position on each of the six days before the first, oldest first [mm]; without an entry there was none. */
  appliedMm: Map<string, number[]>;
  /** Whether the last set of a position stood half-way between the marks; without an entry it has had none. */
  halfWayLast: Map<string, boolean>;
}

type YardLimits = Omit<PlanLimits, 'permits' | 'appliedMm' | 'halfWayLast'>;

/** Reads the limits of a yard for a plan from a day on. */
export async function loadPlanLimits(database: Sequelize, yardId: string, today: string): Promise<PlanLimits> {
  const [yard] = await database.query<YardLimits>(
    `SELECT address_digit AS "addressDigit", water_stage AS "waterStage", supply_kind AS "supplyKind", supply_flow_lpm AS "supplyFlowLpm",
       supply_rest_minutes AS "supplyRestMinutes", supply_draw_minutes AS "supplyDrawMinutes" FROM yards WHERE id = $1`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  const given = await database.query<{ positionId: string; on: string; appliedMm: number }>(
    `SELECT position_id AS "positionId", "on"::text AS "on", sum(applied_mm) AS "appliedMm" FROM round_sets
     WHERE yard_id = $1 AND "on" >= $2 AND "on" < $3 AND applied_mm > 0 GROUP BY position_id, "on"`,
    { bind: [yardId, addDays(today, -DAYS_BEFORE), today], type: QueryTypes.SELECT },
  );
  const appliedMm = new Map<string, number[]>();
  for (const row of given) {
    const days = appliedMm.get(row.positionId) ?? Array.from({ length: DAYS_BEFORE }, () => 0);
    days[DAYS_BEFORE - daysBetween(row.on, today)] = row.appliedMm;
    appliedMm.set(row.positionId, days);
  }
  // A set of a running round that still waits will stand where its round says.
  const last = await database.query<{ positionId: string; halfWay: boolean }>(
    `SELECT DISTINCT ON (s.position_id) s.position_id AS "positionId", s.half_way AS "halfWay"
     FROM round_sets s LEFT JOIN rounds r ON r.yard_id = s.yard_id AND r.id = s.round_id
     WHERE s.yard_id = $1 AND s.kind = 'set' AND (s.applied_mm > 0 OR (r.status = 'running' AND s.status IN ('waiting', 'running')))
     ORDER BY s.position_id, s."on" DESC, s.planned_start_at DESC, s.id`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  return {
    addressDigit: yard?.addressDigit ?? null, waterStage: yard?.waterStage ?? 0, supplyKind: yard?.supplyKind ?? null, supplyFlowLpm: yard?.supplyFlowLpm ?? null,
    supplyRestMinutes: yard?.supplyRestMinutes ?? null, supplyDrawMinutes: yard?.supplyDrawMinutes ?? null, appliedMm,
    permits: (await Permit.findAll({ where: { yardId }, order: [['fromOn', 'ASC'], ['id', 'ASC']] })).filter((permit) => permit.toOn >= today),
    halfWayLast: new Map(last.map((row) => [row.positionId, row.halfWay])),
  };
}

/** The limits of the whole yard in the words of the planner; what nobody told is left out. Pure. */
export function limitsOfYard(limits: PlanLimits): Pick<PlanInput, 'addressDigit' | 'waterStage' | 'permits' | 'supply'> {
  const supply = supplyOf(limits);
  return {
    waterStage: limits.waterStage, permits: limits.permits.map(permitOf),
    ...(limits.addressDigit === null ? {} : { addressDigit: limits.addressDigit }), ...(supply === null ? {} : { supply }),
  };
}

const supplyNames: Record<SupplyKind, string> = { house: 'The house pipe', well: 'The well' };

function supplyOf({ supplyKind, supplyFlowLpm, supplyRestMinutes, supplyDrawMinutes }: PlanLimits): PlanSupply | null {
  return supplyKind === null || supplyFlowLpm === null ? null
    : { name: supplyNames[supplyKind], flowLpm: supplyFlowLpm, restMinutes: supplyRestMinutes ?? 0, drawMinutesAtMost: supplyDrawMinutes };
}

function permitOf(permit: PlanLimits['permits'][number]): PlanPermit {
  const { id, name, source, sourceOn, zoneIds, fromOn, toOn, blackoutMonths } = permit;
  return { id, name, source, sourceOn, zoneIds, fromOn, toOn, blackoutMonths, allowed: permit.windows ?? null, liftsRuleIds: permit.liftsRuleIds?.flatMap(partsOfRule) ?? null };
}

/** What a rule about devices calls a kind of sprinkler: a wand is held in the hand, a soaker hose is its own, all else is a sprinkler. */
export function deviceOf(kind: SprinklerKind): PlanDevice {
  return kind === 'soaker' ? 'soaker' : kind === 'hand_wand' ? 'hand_held' : 'sprinkler';
}

const groundNames: Record<GuardedGround, string> = { drain_field: 'The drain field', well_head: 'The ground by the well' };

type LimitedRow = Pick<PositionRow, 'id' | 'sprinklerKind' | 'heightM' | 'hoseLengthM' | 'weeklyLimitOver' | 'weeklyLimitMm' | 'weeklyLimitSource' | 'alternateSets'>;

/** The limits of one position in the words of the planner; what nobody told is left out. Pure. */
export function limitsOfPosition(row: LimitedRow, limits: PlanLimits): Pick<PlanPosition, 'device' | 'heightM' | 'hoseLengthM' | 'weeklyLimit' | 'alternate'> {
  return {
    device: deviceOf(row.sprinklerKind),
    ...(row.heightM === null ? {} : { heightM: row.heightM }),
    ...(row.hoseLengthM === null ? {} : { hoseLengthM: row.hoseLengthM }),
    ...(row.weeklyLimitOver === null || row.weeklyLimitMm === null ? {} : {
      weeklyLimit: {
        depthMm: row.weeklyLimitMm, name: groundNames[row.weeklyLimitOver], source: row.weeklyLimitSource,
        appliedMm: limits.appliedMm.get(row.id) ?? Array.from({ length: DAYS_BEFORE }, () => 0),
      },
    }),
    // The very first set stands on the marks.
    ...(row.alternateSets ? { alternate: { lastWasHalfWay: limits.halfWayLast.get(row.id) ?? true } } : {}),
  };
}
