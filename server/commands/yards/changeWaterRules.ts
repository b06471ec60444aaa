import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { AppError, notFound } from '@/server/errors';
import { WaterRule } from '@/server/models';
import { createWaterRuleRequestSchema, ruleDevices, type UpdateWaterRuleRequest } from '@/shared/contracts/waterRules';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { changesOf, holdYard, refuseMoreThan, type FactChange } from './yardFacts';

type RuleFields = z.output<typeof createWaterRuleRequestSchema>;

const sorted = (weekdays: readonly number[]): number[] => [...new Set(weekdays)].sort((a, b) => a - b);

/** One way to write a rule: days in order, and a rule that names every device binds all. */
function inOrder(rule: RuleFields): RuleFields {
  const devices = ruleDevices.filter((device) => rule.devices?.includes(device));
  return {
    ...rule, weekdays: rule.weekdays && sorted(rule.weekdays), weekdaysByDigit: rule.weekdaysByDigit?.map(sorted) ?? null,
    devices: rule.devices === null || devices.length === ruleDevices.length ? null : devices,
  };
}

async function tell(change: FactChange, verb: string, rule: WaterRule, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'water_rule', subjectId: rule.id, data: { name: rule.name, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

async function ruleOf(change: FactChange, ruleId: string): Promise<WaterRule> {
  await holdYard(change);
  const rule = await WaterRule.findOne({ where: { yardId: change.yardId, id: ruleId } });
  if (!rule) {
    throw notFound('water rule');
  }
  return rule;
}

/** @throws AppError limit_reached */
export async function createWaterRule(change: FactChange, request: RuleFields): Promise<WaterRule> {
  await holdYard(change);
  await refuseMoreThan(WaterRule, { yardId: change.yardId }, limits.rulesPerYard, 'water rules for one yard');
  const rule = await WaterRule.create({ id: randomUUID(), yardId: change.yardId, ...inOrder(request) });
  await tell(change, 'water_rule.created', rule, { source: rule.source, sourceOn: rule.sourceOn });
  return rule;
}

/** Changes the fields that are given. @throws AppError not_found, invalid_input when what comes out is no rule */
export async function updateWaterRule(change: FactChange, ruleId: string, request: UpdateWaterRuleRequest): Promise<WaterRule> {
  const rule = await ruleOf(change, ruleId);
  const { name, weekdays, dateParity, windows, weekdaysByDigit, attended, devices, stage, exemptSeeded, seasonFrom, seasonTo, source, sourceOn } = rule;
  const merged = createWaterRuleRequestSchema.safeParse({
    name, weekdays, dateParity, windows, weekdaysByDigit, attended, devices, stage, exemptSeeded, seasonFrom, seasonTo, source, sourceOn, ...request,
  });
  if (!merged.success) {
    const fields = merged.error.issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message, code: issue.code }));
    throw new AppError('invalid_input', fields[0]?.message ?? 'That is no rule.', fields);
  }
  const fields = inOrder(merged.data);
  const changes = changesOf(rule.get(), fields);
  if (Object.keys(changes).length > 0) {
    await rule.update(fields);
    await tell(change, 'water_rule.updated', rule, { changes });
  }
  return rule;
}

/** A permit that lifted it lifts the others still. @throws AppError not_found */
export async function deleteWaterRule(change: FactChange, ruleId: string): Promise<void> {
  const rule = await ruleOf(change, ruleId);
  await change.database.query(
    'UPDATE permits SET lifts_rule_ids = array_remove(lifts_rule_ids, $2::uuid) WHERE yard_id = $1 AND $2::uuid = ANY(lifts_rule_ids)',
    { bind: [change.yardId, ruleId], type: QueryTypes.UPDATE },
  );
  await rule.destroy();
  await tell(change, 'water_rule.deleted', rule, { source: rule.source, sourceOn: rule.sourceOn });
}
