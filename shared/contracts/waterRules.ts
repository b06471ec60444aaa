import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, minuteWindowSchema, nameSchema, noteSchema } from './common';

/** What lays the water down, for rules that bind some devices only. */
export const ruleDevices = ['sprinkler', 'soaker', 'hand_held'] as const;
export type RuleDevice = (typeof ruleDevices)[number];

/** Stages of water shortage that a supplier may call out; 0 is none. */
export const WATER_STAGE_MOST = 5;
export const waterStageSchema = z.number().int().min(0).max(WATER_STAGE_MOST);
/** Last digit of the house number. */
export const addressDigitSchema = z.number().int().min(0).max(9);

const monthDay = z.string().regex(/^(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])$/, 'Give a month and day as MM-DD.')
  .refine((text) => civilDaySchema.safeParse(`2024-${text}`).success, 'That day is not in the calendar.');
const weekday = z.number().int().min(0).max(6);
const windowsSchema = z.array(minuteWindowSchema).min(1, 'Give at least one span of hours.').max(limits.windowsPerDay);
const sourceFields = { source: noteSchema.min(1, 'Say where it is written.'), sourceOn: civilDaySchema };
const isOnce = (values: readonly unknown[]) => new Set(values).size === values.length;

const ruleFields = {
  name: nameSchema,
  weekdays: z.array(weekday).min(1, 'Choose at least one weekday.').max(7).nullable(),
  dateParity: z.enum(['odd', 'even']).nullable(),
  windows: windowsSchema.nullable(),
  /** Weekdays open to each last digit of the house number, index 0 to 9. */
  weekdaysByDigit: z.array(z.array(weekday).max(7)).length(10, 'Give the days of all ten digits.')
    .refine((days) => days.some((own) => own.length > 0), 'Give a day to at least one digit.').nullable(),
  /** No hose may run unattended, shut-off timer or not. */
  attended: z.boolean(),
  devices: z.array(z.enum(ruleDevices)).min(1, 'Choose what the rule binds.').max(ruleDevices.length).refine(isOnce, 'Name every device once.').nullable(),
  stage: waterStageSchema.min(1, 'Stage 0 is no shortage: leave it out for a rule that always holds.').nullable(),
  /** It does not bind ground with a running sowing. */
  exemptSeeded: z.boolean(),
  seasonFrom: monthDay.nullable(), seasonTo: monthDay.nullable(),
  ...sourceFields, source: noteSchema.min(1, 'Say where the rule is written.'),
};
/** A local water rule as data: what is left out does not limit. Always with its source and date. */
export const createWaterRuleRequestSchema = z.object({
  ...ruleFields,
  weekdays: ruleFields.weekdays.default(null), dateParity: ruleFields.dateParity.default(null), windows: ruleFields.windows.default(null),
  weekdaysByDigit: ruleFields.weekdaysByDigit.default(null), attended: ruleFields.attended.default(false),
  devices: ruleFields.devices.default(null), stage: ruleFields.stage.default(null), exemptSeeded: ruleFields.exemptSeeded.default(false),
  seasonFrom: ruleFields.seasonFrom.default(null), seasonTo: ruleFields.seasonTo.default(null),
}).superRefine((rule, issue) => {
  if (rule.weekdays === null && rule.dateParity === null && rule.windows === null && rule.weekdaysByDigit === null && !rule.attended) {
    issue.addIssue({ code: 'custom', path: ['weekdays'], message: 'Choose the weekdays, the dates or the hours that the rule allows, or that no hose may run unattended.' });
  }
  if ((rule.seasonFrom === null) !== (rule.seasonTo === null)) {
    issue.addIssue({ code: 'custom', path: ['seasonTo'], message: 'Give both ends of the season, or neither.' });
  }
});
export type CreateWaterRuleRequest = z.input<typeof createWaterRuleRequestSchema>;
/** What is left out stays; the rule as it then stands has to satisfy what a new one has to. */
export const updateWaterRuleRequestSchema = z.object(ruleFields).partial();
export type UpdateWaterRuleRequest = z.infer<typeof updateWaterRuleRequestSchema>;
const shownWindows = z.array(z.object({ fromMinutes: z.number(), toMinutes: z.number() })).nullable();
export const waterRuleSchema = z.object({
  id: idSchema, name: z.string(), weekdays: z.array(z.number()).nullable(), dateParity: z.enum(['odd', 'even']).nullable(), windows: shownWindows,
  weekdaysByDigit: z.array(z.array(z.number())).nullable(), attended: z.boolean(), devices: z.array(z.enum(ruleDevices)).nullable(), stage: z.number().nullable(),
  exemptSeeded: z.boolean(), seasonFrom: z.string().nullable(), seasonTo: z.string().nullable(), source: z.string(), sourceOn: civilDaySchema,
});
export type WaterRuleResponse = z.infer<typeof waterRuleSchema>;

const permitFields = {
  name: nameSchema,
  zoneIds: z.array(idSchema).min(1, 'Choose the zones that it names.').max(limits.zonesPerYard).refine(isOnce, 'Name every zone once.'),
  fromOn: civilDaySchema, toOn: civilDaySchema,
  blackoutMonths: z.array(z.number().int().min(1).max(12)).max(11, 'A permit holds in at least one month.').refine(isOnce, 'Name every month once.'),
  windows: windowsSchema.nullable(),
  /** Rules that it lifts; null for all of them. */
  liftsRuleIds: z.array(idSchema).min(1, 'Choose the rules that it lifts.').max(limits.rulesPerYard).refine(isOnce, 'Name every rule once.').nullable(),
  ...sourceFields, source: noteSchema.min(1, 'Say who gave the permit, or where it is written.'),
};
/** Leave to water newly seeded ground outside the rules, to the last day included. Always with its source and date. */
export const createPermitRequestSchema = z.object({
  ...permitFields, blackoutMonths: permitFields.blackoutMonths.default([]), windows: permitFields.windows.default(null), liftsRuleIds: permitFields.liftsRuleIds.default(null),
}).superRefine((permit, issue) => {
  if (permit.toOn < permit.fromOn) {
    issue.addIssue({ code: 'custom', path: ['toOn'], message: 'The last day must not come before the first.' });
  }
});
export type CreatePermitRequest = z.input<typeof createPermitRequestSchema>;
export const updatePermitRequestSchema = z.object(permitFields).partial();
export type UpdatePermitRequest = z.infer<typeof updatePermitRequestSchema>;
export const permitSchema = z.object({
  id: idSchema, name: z.string(), zoneIds: z.array(idSchema), fromOn: civilDaySchema, toOn: civilDaySchema, blackoutMonths: z.array(z.number()), windows: shownWindows,
  liftsRuleIds: z.array(idSchema).nullable(), source: z.string(), sourceOn: civilDaySchema,
});
export type PermitResponse = z.infer<typeof permitSchema>;

export const supplyKinds = ['house', 'well'] as const;
export type SupplyKind = (typeof supplyKinds)[number];
/** What all taps draw from together: a narrow house pipe or a well. */
export const supplySchema = z.object({
  kind: z.enum(supplyKinds),
  /** Most that may be drawn at once [L/min]. */
  flowLpm: z.number().min(limits.flowMinLpm).max(limits.flowMaxLpm),
  /** Rest between the end of one draw and the start of the next [min]. */
  restMinutes: z.number().int().min(0).max(limits.supplyRestMaxMinutes),
  /** Longest draw without a rest [min]; null for no such limit. */
  drawMinutesAtMost: z.number().int().min(limits.supplyDrawMinMinutes).max(limits.supplyDrawMaxMinutes).nullable(),
});
export type Supply = z.infer<typeof supplySchema>;
