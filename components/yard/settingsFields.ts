import { zodResolver } from '@hookform/resolvers/zod';
import type { Resolver } from 'react-hook-form';
import { numberText, optionalNumberText } from '@/components/ui/numberText';
import { nameSchema, unitSystemSchema, type UnitSystem } from '@/shared/contracts/common';
import { supplyKinds, WATER_STAGE_MOST } from '@/shared/contracts/waterRules';
import type { UpdateYardRequest, YardResponse } from '@/shared/contracts/yards';
import { fromShown, toShown, unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { fieldText } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';

/** Stages of shortage to choose from; the first goes back to the default. */
export const stageChoices = [
  { value: 'default', label: 'None called out' },
  ...Array.from({ length: WATER_STAGE_MOST + 1 }, (_, stage) => ({ value: String(stage), label: stage === 0 ? 'Stage 0, somebody looked: none' : `Stage ${stage}` })),
];

/** What the settings ask for, as text in the yard's units. */
export function settingsSchema(units: UnitSystem) {
  const within = (quantity: 'length' | 'flow', min: number, max: number) => ({ min: Number(toShown(quantity, min, units).toPrecision(3)), max: Number(toShown(quantity, max, units).toPrecision(3)), unit: unitLabel(quantity, units) });
  const flow = within('flow', limits.flowMinLpm, limits.flowMaxLpm);
  return z.object({
    name: nameSchema, units: unitSystemSchema, moveMinutes: optionalNumberText({ min: 1, max: 60, unit: 'min', whole: true }), lead: numberText({ min: 0, max: 720, unit: 'min', whole: true }),
    elevation: optionalNumberText({ min: Math.ceil(toShown('length', -430, units)), max: Math.floor(toShown('length', 6000, units)), unit: unitLabel('length', units) }),
    addressDigit: z.string(), waterStage: z.string(), supply: z.enum(['none', ...supplyKinds]), supplyFlow: optionalNumberText(flow),
    supplyRest: optionalNumberText({ min: 0, max: limits.supplyRestMaxMinutes, unit: 'min', whole: true }),
    supplyDraw: optionalNumberText({ min: limits.supplyDrawMinMinutes, max: limits.supplyDrawMaxMinutes, unit: 'min', whole: true }),
  }).superRefine((values, issue) => {
    if (values.supply !== 'none' && values.supplyFlow === null) {
      issue.addIssue({ code: 'custom', path: ['supplyFlow'], message: `Write something from ${flow.min} ${flow.unit} to ${flow.max} ${flow.unit}.` });
    }
  });
}
export type SettingsText = z.input<ReturnType<typeof settingsSchema>>;
export type SettingsValues = z.output<ReturnType<typeof settingsSchema>>;

/** Checks the form; what was typed about a supply that is no longer chosen does not count. */
export function settingsResolver(units: UnitSystem): Resolver<SettingsText, unknown, SettingsValues> {
  const check = zodResolver(settingsSchema(units));
  return (values, context, options) => check(values.supply === 'none' ? { ...values, supplyFlow: '', supplyRest: '', supplyDraw: '' } : values, context, options);
}

/** What the form begins with. */
export function settingsText(yard: YardResponse): SettingsText {
  const { supply, units } = yard;
  return {
    name: yard.name, units, moveMinutes: yard.moveMinutesIsDefault ? '' : String(yard.moveMinutes), lead: String(yard.reminderLeadMinutes),
    elevation: yard.elevationIsDefault ? '' : fieldText('length', yard.elevationM, units),
    addressDigit: yard.addressDigit === null ? '' : String(yard.addressDigit), waterStage: yard.waterStageIsDefault ? 'default' : String(yard.waterStage),
    supply: supply?.kind ?? 'none', supplyFlow: supply === null ? '' : fieldText('flow', supply.flowLpm, units),
    supplyRest: supply === null || supply.restMinutes === 0 ? '' : String(supply.restMinutes), supplyDraw: supply?.drawMinutesAtMost == null ? '' : String(supply.drawMinutesAtMost),
  };
}

/** The request for the checked form. What was not touched keeps every place of its number. */
export function settingsBody(values: SettingsValues, yard: YardResponse, touched: { readonly elevation?: boolean; readonly supplyFlow?: boolean }): UpdateYardRequest {
  const { units } = yard;
  return {
    name: values.name, units: values.units, moveMinutes: values.moveMinutes, reminderLeadMinutes: values.lead,
    ...(touched.elevation ? { elevationM: values.elevation === null ? null : fromShown('length', values.elevation, units) } : {}),
    addressDigit: values.addressDigit === '' ? null : Number(values.addressDigit), waterStage: values.waterStage === 'default' ? null : Number(values.waterStage),
    supply: values.supply === 'none' || values.supplyFlow === null ? null : {
      kind: values.supply, flowLpm: touched.supplyFlow || yard.supply === null ? fromShown('flow', values.supplyFlow, units) : yard.supply.flowLpm,
      restMinutes: values.supplyRest ?? 0, drawMinutesAtMost: values.supplyDraw,
    },
  };
}
