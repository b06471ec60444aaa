import { numberText } from '@/components/ui/numberText';
import type { UnitSystem } from '@/shared/contracts/common';
import { establishmentStages, type CreateProposalRequest, type EstablishmentScheduleInput } from '@/shared/contracts/proposals';
import { formatNumber, fromShown, toShown, unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { parseClock } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';

type Stage = EstablishmentScheduleInput['stages'][number];

/** One stage as it stands in the fields. Times are clock times with commas, or empty for spread over daylight. */
export interface StageText { dosesPerDay: string; everyDays: string; depth: string; times: string; forDays: string }
export interface ProposeText { stages: StageText[]; reason: string }

function clockText(minutes: number): string {
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`;
}

/** The present schedule as text to change. */
export function proposeText(schedule: EstablishmentScheduleInput, units: UnitSystem): ProposeText {
  return {
    reason: '',
    stages: schedule.stages.map((stage) => ({
      dosesPerDay: String(stage.dosesPerDay), everyDays: String(stage.everyDays), depth: formatNumber(toShown('depth', stage.depthMm, units), units === 'us' ? 2 : 1),
      times: (stage.timesMinutes ?? []).map(clockText).join(', '), forDays: stage.forDays === null ? '' : String(stage.forDays),
    })),
  };
}

/** Checks what was typed and turns it into the request, in SI. */
export function proposeSchema(zoneId: string, units: UnitSystem) {
  const stage = z.object({
    dosesPerDay: numberText({ min: 1, max: limits.dosesPerDayMax, whole: true }), everyDays: numberText({ min: 1, max: 14, whole: true }),
    depth: numberText({ min: 0.01, max: Number(toShown('depth', limits.doseDepthMaxMm, units).toFixed(1)), unit: unitLabel('depth', units) }),
    times: z.string(), forDays: z.string(),
  }).superRefine((values, issue) => {
    const parts = values.times.split(/[,;]/).map((part) => part.trim()).filter(Boolean);
    const minutes = parts.map(parseClock);
    if (minutes.some((one) => one === null)) {
      issue.addIssue({ code: 'custom', path: ['times'], message: 'Write times such as 9:30, 12:00, 14:00.' });
    } else if (parts.length > 0 && parts.length !== values.dosesPerDay) {
      issue.addIssue({ code: 'custom', path: ['times'], message: 'Give one time for each dose, or none to spread them over daylight.' });
    } else if (minutes.some((one, at) => at > 0 && (one ?? 0) <= (minutes[at - 1] ?? 0))) {
      issue.addIssue({ code: 'custom', path: ['times'], message: 'Put the times in order.' });
    }
    if (values.forDays.trim() !== '' && !/^[1-9]\d?$/.test(values.forDays.trim())) {
      issue.addIssue({ code: 'custom', path: ['forDays'], message: 'Write a number of days from 1 to 90, or leave it empty.' });
    }
  });
  return z.object({ stages: z.array(stage).length(4), reason: z.string().trim().min(1, 'Say why; the owner reads it.').max(limits.reasonLength) })
    .transform((values): CreateProposalRequest => ({
      zoneId, reason: values.reason,
      schedule: {
        stages: values.stages.map((one, at): Stage => {
          const minutes = one.times.split(/[,;]/).map((part) => part.trim()).filter(Boolean).map((part) => parseClock(part) ?? 0);
          return {
            stage: (establishmentStages[at] ?? 'taper') as Stage['stage'], dosesPerDay: one.dosesPerDay, everyDays: one.everyDays, depthMm: fromShown('depth', one.depth, units),
            timesMinutes: minutes.length === 0 ? null : minutes, forDays: one.forDays.trim() === '' ? null : Number(one.forDays),
          };
        }),
      },
    }));
}
