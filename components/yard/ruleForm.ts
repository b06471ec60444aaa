import { civilDaySchema, nameSchema } from '@/shared/contracts/common';
import { ruleDevices, WATER_STAGE_MOST, type WaterRuleResponse } from '@/shared/contracts/waterRules';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { weekdays } from './weekdays';

const time = z.number().nullable();
/** Two spans of hours, as a form with four times asks for them. */
export const spanFields = { from1: time, to1: time, from2: time, to2: time };
interface Spans { from1: number | null; to1: number | null; from2: number | null; to2: number | null }
interface Window { fromMinutes: number; toMinutes: number }

/** The times of the form for stored windows. */
export function spansOf(windows: readonly Window[] | null | undefined): Spans {
  const [first, second] = windows ?? [];
  return { from1: first?.fromMinutes ?? null, to1: first?.toMinutes ?? null, from2: second?.fromMinutes ?? null, to2: second?.toMinutes ?? null };
}

/** Windows for the times of the form, and what the form has no room for; null for none. */
export function windowsOf(values: Spans, stored: readonly Window[] | null | undefined): Window[] | null {
  const pairs: [number | null, number | null][] = [[values.from1, values.to1], [values.from2, values.to2]];
  const windows = pairs.flatMap(([from, to]) => (from === null || to === null ? [] : [{ fromMinutes: from, toMinutes: to }]));
  const all = windows.length === 0 ? [] : [...windows, ...(stored ?? []).slice(2)];
  return all.length === 0 ? null : all;
}

/** What is wrong with the times of a form, by field. */
export function spanProblems(values: Spans): { path: keyof Spans; message: string }[] {
  return ([['from1', 'to1'], ['from2', 'to2']] as const).flatMap(([from, to]): { path: keyof Spans; message: string }[] => {
    const [start, end] = [values[from], values[to]];
    if ((start === null) !== (end === null)) {
      return [{ path: to, message: 'Give both times, or neither.' }];
    }
    return start !== null && end !== null && end <= start ? [{ path: to, message: 'The end must come after the start.' }] : [];
  });
}

/** A field of the form for each weekday that holds the digits which may water on it. */
export const digitFields = ['digits0', 'digits1', 'digits2', 'digits3', 'digits4', 'digits5', 'digits6'] as const;
/** The field of a weekday, 0 is Sunday. */
export const digitField = (day: number): (typeof digitFields)[number] => digitFields[day] ?? 'digits0';
const digits = z.array(z.string());

/** What the rule dialog asks for. */
export const ruleSchema = z.object({
  name: nameSchema, weekdays: z.array(z.string()), parity: z.enum(['any', 'odd', 'even']), ...spanFields,
  byDigit: z.enum(['no', 'yes']), digits0: digits, digits1: digits, digits2: digits, digits3: digits, digits4: digits, digits5: digits, digits6: digits,
  attended: z.boolean(), devices: z.array(z.enum(ruleDevices)).min(1, 'Choose what the rule binds.'), stage: z.string(), exemptSeeded: z.boolean(),
  season: z.enum(['all', 'part']), seasonFrom: z.string(), seasonTo: z.string(),
  source: z.string().trim().min(1, 'Say where the rule is written.').max(limits.noteLength), sourceOn: civilDaySchema,
}).superRefine((rule, issue) => {
  for (const { path, message } of spanProblems(rule)) {
    issue.addIssue({ code: 'custom', path: [path], message });
  }
  const hasDigits = rule.byDigit === 'yes' && digitFields.some((field) => rule[field].length > 0);
  if (rule.byDigit === 'yes' && !hasDigits) {
    issue.addIssue({ code: 'custom', path: ['digits1'], message: 'Give a day to at least one digit.' });
  }
  if (rule.weekdays.length === 0 && rule.parity === 'any' && rule.from1 === null && rule.from2 === null && rule.byDigit === 'no' && !rule.attended) {
    issue.addIssue({ code: 'custom', path: ['weekdays'], message: 'Choose the weekdays, the dates or the hours that the rule allows, or that no hose may run unattended.' });
  }
  if (rule.season === 'part') {
    (['seasonFrom', 'seasonTo'] as const).forEach((end) => {
      if (!civilDaySchema.safeParse(rule[end]).success) {
        issue.addIssue({ code: 'custom', path: [end], message: 'Give both ends of the season.' });
      }
    });
  }
});
export type RuleText = z.input<typeof ruleSchema>;
export type RuleValues = z.output<typeof ruleSchema>;

export const stageOptions = [
  { value: '', label: 'Always' },
  ...Array.from({ length: WATER_STAGE_MOST }, (_, index) => ({ value: String(index + 1), label: `From shortage stage ${index + 1} on` })),
];

/** What the form begins with. */
export function ruleStart(rule: WaterRuleResponse | null): RuleText {
  const digitsOf = (day: number): string[] => (rule?.weekdaysByDigit ?? []).flatMap((days, digit) => (days.includes(day) ? [String(digit)] : []));
  return {
    name: rule?.name ?? '', weekdays: (rule?.weekdays ?? []).map(String), parity: rule?.dateParity ?? 'any', ...spansOf(rule?.windows),
    byDigit: rule?.weekdaysByDigit ? 'yes' : 'no', digits0: digitsOf(0), digits1: digitsOf(1), digits2: digitsOf(2), digits3: digitsOf(3), digits4: digitsOf(4), digits5: digitsOf(5), digits6: digitsOf(6),
    attended: rule?.attended ?? false, devices: rule?.devices ?? [...ruleDevices], stage: rule?.stage == null ? '' : String(rule.stage), exemptSeeded: rule?.exemptSeeded ?? false,
    season: rule?.seasonFrom ? 'part' : 'all', seasonFrom: rule?.seasonFrom ? `2024-${rule.seasonFrom}` : '2024-05-15', seasonTo: rule?.seasonTo ? `2024-${rule.seasonTo}` : '2024-10-01',
    source: rule?.source ?? '', sourceOn: rule?.sourceOn ?? '',
  };
}

/** The request for the checked form. */
export function ruleBody(values: RuleValues, rule: WaterRuleResponse | null) {
  const isPart = values.season === 'part';
  return {
    name: values.name, weekdays: values.weekdays.length === 0 ? null : values.weekdays.map(Number), dateParity: values.parity === 'any' ? null : values.parity,
    windows: windowsOf(values, rule?.windows),
    weekdaysByDigit: values.byDigit === 'no' ? null
      : Array.from({ length: 10 }, (_, digit) => weekdays.map(({ day }) => day).filter((day) => values[digitField(day)].includes(String(digit)))),
    attended: values.attended, devices: values.devices.length === ruleDevices.length ? null : values.devices, stage: values.stage === '' ? null : Number(values.stage),
    exemptSeeded: values.exemptSeeded, seasonFrom: isPart ? values.seasonFrom.slice(5) : null, seasonTo: isPart ? values.seasonTo.slice(5) : null,
    source: values.source, sourceOn: values.sourceOn,
  };
}
