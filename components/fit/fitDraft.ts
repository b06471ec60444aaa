import { numberText } from '@/components/ui/numberText';
import { fitHelps, type FitHelp } from '@/scheduling/sprinkler/fitHelp';
import { doesItFit, type FitAnswer } from '@/scheduling/sprinkler/hoseHours';
import { doesItFitRequestSchema, type DoesItFitRequest } from '@/shared/contracts/catchTests';
import type { UnitSystem } from '@/shared/contracts/common';
import { fromShown, toShown, unitLabel, type Quantity } from '@/shared/display';
import { limits } from '@/shared/limits';
import { typedInUnits } from '@/shared/typedInUnits';
import { z } from '@/shared/zod';

const text = z.string().max(40);

/** What stands in the fields, as typed. */
export const fitDraftSchema = z.object({ area: text, depth: text, flow: text, hours: text, moves: text, moveMinutes: text, hoseLength: text, hoseBore: text });
export type FitDraft = z.infer<typeof fitDraftSchema>;

/** The example: one inch on 5,000 sq ft at 5 gpm is 10.4 hours, before moves. */
export const fitExample: Record<UnitSystem, FitDraft> = {
  us: { area: '5000', depth: '1', flow: '5', hours: '6', moves: '0', moveMinutes: '5', hoseLength: '100', hoseBore: '15.875' },
  metric: { area: '465', depth: '25.4', flow: '18.9', hours: '6', moves: '0', moveMinutes: '5', hoseLength: '30', hoseBore: '15.875' },
};

const measured = { area: 'area', depth: 'depth', flow: 'flow', hoseLength: 'length' } as const satisfies Partial<Record<keyof FitDraft, Quantity>>;

/** The same question in other units. */
export function fitInUnits(draft: FitDraft, from: UnitSystem, to: UnitSystem): FitDraft {
  const next = { ...draft };
  for (const field of Object.keys(measured) as (keyof typeof measured)[]) {
    next[field] = typedInUnits(measured[field], draft[field], { us: fitExample.us[field], metric: fitExample.metric[field] }, from, to);
  }
  return next;
}

export interface FitQuestionAsked {
  request: Required<DoesItFitRequest>;
  hose: { lengthM: number; boreMm: number };
}

/** Checks what was typed and turns it into SI, by the same contract as the server's. */
export function fitSchema(units: UnitSystem) {
  const quantity = (kind: Quantity, minSi: number, maxSi: number) => numberText({
    min: Number(toShown(kind, minSi, units).toPrecision(2)), max: Math.floor(toShown(kind, maxSi, units)), unit: unitLabel(kind, units),
  });
  return z.object({
    area: quantity('area', 0.1, limits.areaMaxM2), depth: quantity('depth', 0.3, 200), flow: quantity('flow', limits.flowMinLpm * 1.05, limits.flowMaxLpm),
    hours: numberText({ min: 0, max: 168, unit: 'hours' }), moves: numberText({ min: 0, max: 500, whole: true }), moveMinutes: numberText({ min: 0, max: 60, unit: 'min' }),
    hoseLength: quantity('length', 0.3, limits.hoseLengthMaxM), hoseBore: z.string(),
  }).transform((typed, context): FitQuestionAsked => {
    const request = {
      areaM2: fromShown('area', typed.area, units), depthMmPerWeek: fromShown('depth', typed.depth, units), flowLpm: fromShown('flow', typed.flow, units),
      hoursPerWeek: typed.hours, movesPerWeek: typed.moves, moveMinutes: typed.moveMinutes,
    };
    const checked = doesItFitRequestSchema.safeParse(request);
    if (!checked.success) {
      const fields: Record<string, string> = { areaM2: 'area', depthMmPerWeek: 'depth', flowLpm: 'flow', hoursPerWeek: 'hours', movesPerWeek: 'moves', moveMinutes: 'moveMinutes' };
      checked.error.issues.forEach((issue) => context.addIssue({ code: 'custom', message: issue.message, path: [fields[String(issue.path[0])] ?? 'area'] }));
      return z.NEVER;
    }
    return { request, hose: { lengthM: fromShown('length', typed.hoseLength, units), boreMm: Number(typed.hoseBore) } };
  });
}

/** Whether it fits and what would help, by the functions that the server uses. */
export function answerFit({ request: { areaM2, ...question }, hose }: FitQuestionAsked): { answer: FitAnswer; helps: FitHelp[] } {
  const asked = { areasM2: [areaM2], ...question };
  return { answer: doesItFit(asked), helps: fitHelps(asked, hose) };
}
