import { numberText, optionalNumberText } from '@/components/ui/numberText';
import type { Option } from '@/components/ui/SelectField';
import { isCivilDay } from '@/scheduling/units/civilDay';
import type { UnitSystem } from '@/shared/contracts/common';
import { fromShown, toShown, unitLabel, type Quantity } from '@/shared/display';
import { parseNumber } from '@/shared/parseQuantity';
import { typedInUnits } from '@/shared/typedInUnits';
import { z } from '@/shared/zod';

interface Words {
  label: string;
  hint?: string;
  /** Where the start value comes from when it is a default. */
  defaultSource?: string;
}

/** A number field of a calculator, in the units shown and in SI behind them. */
export interface NumberRule extends Words {
  kind: 'number';
  /** Null for a number that is the same in both systems. */
  quantity: Quantity | null;
  /** Unit of a number without a quantity. */
  unit?: string;
  start: Record<UnitSystem, string>;
  minSi: number;
  maxSi: number;
  whole?: boolean;
}

/** The same, which may stay empty and is null then. */
export interface OptionalNumberRule extends Omit<NumberRule, 'kind'> {
  kind: 'optional';
}

/** Several numbers in one field, parted by blanks. */
export interface ListRule extends Omit<NumberRule, 'kind' | 'whole'> {
  kind: 'list';
  least: number;
  most: number;
}

export interface ChoiceRule extends Words {
  kind: 'choice';
  start: string;
  options: (units: UnitSystem) => readonly Option[];
}

export interface DayRule extends Words {
  kind: 'day';
  start: string;
}

export type Rule = NumberRule | OptionalNumberRule | ListRule | ChoiceRule | DayRule;
export type Rules = Readonly<Record<string, Rule>>;

/** What stands in the fields, as typed. */
export type Draft = Record<string, string>;

/** What the fields mean, in SI. */
export type Values<R extends Rules> = {
  [K in keyof R]: R[K] extends NumberRule ? number : R[K] extends OptionalNumberRule ? number | null : R[K] extends ListRule ? number[] : string;
};

/** The same start value in both systems. */
export const same = (text: string): Record<UnitSystem, string> => ({ us: text, metric: text });

export function unitOf(rule: NumberRule | OptionalNumberRule | ListRule, units: UnitSystem): string | undefined {
  return rule.quantity === null ? rule.unit : unitLabel(rule.quantity, units);
}

const startOf = (rule: Rule, units: UnitSystem): string => (typeof rule.start === 'string' ? rule.start : rule.start[units]);

/** The example that stands in the fields at first. */
export function startDraft(rules: Rules, units: UnitSystem): Draft {
  return Object.fromEntries(Object.entries(rules).map(([name, rule]) => [name, startOf(rule, units)]));
}

/** Numbers of a list as typed: parted by blanks, semicolons or lines, a comma as well as a point for decimals. */
const partsOf = (text: string): string[] => text.replace(/,(?=\s)/g, ' ').split(/[\s;]+/).filter((part) => part !== '');

/** The same draft in other units. */
export function draftInUnits(rules: Rules, draft: Draft, from: UnitSystem, to: UnitSystem): Draft {
  return Object.fromEntries(Object.entries(rules).map(([name, rule]) => {
    const typed = draft[name] ?? '';
    if (rule.kind === 'choice' || rule.kind === 'day' || rule.quantity === null) return [name, typed];
    if (typed === rule.start[from]) return [name, rule.start[to]];
    const { quantity } = rule;
    const turned = (part: string): string => typedInUnits(quantity, part, { us: '', metric: '' }, from, to);
    return [name, rule.kind === 'list' ? partsOf(typed).map(turned).join(' ') : turned(typed)];
  }));
}

/** Bounds of a rule as a person reads them, rounded so that the least and the most that are written are also taken. */
function shownBounds(rule: NumberRule | OptionalNumberRule | ListRule, units: UnitSystem): { min: number; max: number } {
  const shown = (si: number): number => (rule.quantity === null ? si : toShown(rule.quantity, si, units));
  const rounded = (value: number, up: boolean): number => {
    if (value === 0 || Number.isInteger(value)) return value;
    const scale = 10 ** (2 - Math.floor(Math.log10(Math.abs(value))));
    return (up ? Math.ceil(value * scale) : Math.floor(value * scale)) / scale;
  };
  return { min: rounded(shown(rule.minSi), true), max: rounded(shown(rule.maxSi), false) };
}

function listSchema(rule: ListRule, units: UnitSystem): z.ZodType<number[], string> {
  const { min, max } = shownBounds(rule, units);
  return z.string().transform((text, context) => {
    const wrong = (message: string): never => {
      context.addIssue({ code: 'custom', message });
      return z.NEVER;
    };
    const parts = partsOf(text);
    if (parts.length < rule.least) return wrong(`Write ${rule.least === 1 ? 'a number' : `${rule.least} numbers or more`}, with a blank between two.`);
    if (parts.length > rule.most) return wrong(`At most ${rule.most} numbers, please.`);
    const found: number[] = [];
    for (const part of parts) {
      const value = parseNumber(part);
      if (value === null) return wrong(`“${part.slice(0, 20)}” is no number.`);
      if (value < min || value > max) return wrong(`${part} is not between ${min} and ${max}.`);
      found.push(rule.quantity === null ? value : fromShown(rule.quantity, value, units));
    }
    return found;
  });
}

function ruleSchema(rule: Rule, units: UnitSystem): z.ZodType<unknown, string> {
  switch (rule.kind) {
    case 'choice': {
      const known = rule.options(units).map((option) => option.value);
      return z.string().refine((value) => known.includes(value), 'Choose one of these.');
    }
    case 'day':
      return z.string().refine(isCivilDay, 'Choose a day.');
    case 'list':
      return listSchema(rule, units);
    case 'number':
    case 'optional': {
      const { quantity } = rule;
      const unit = unitOf(rule, units);
      const bounds = { ...shownBounds(rule, units), ...(unit === undefined ? {} : { unit }), ...(rule.whole ? { whole: true } : {}) };
      const toSi = (shown: number): number => (quantity === null ? shown : fromShown(quantity, shown, units));
      return rule.kind === 'number'
        ? numberText(bounds).transform(toSi)
        : optionalNumberText(bounds).transform((shown) => (shown === null ? null : toSi(shown)));
    }
  }
}

/** Checks what was typed and turns it into SI. */
export function valuesSchema<R extends Rules>(rules: R, units: UnitSystem): z.ZodType<Values<R>, Draft> {
  const shape = Object.fromEntries(Object.entries(rules).map(([name, rule]) => [name, ruleSchema(rule, units)]));
  // The shape has exactly the names of the rules, each with the value its kind gives.
  return z.object(shape) as unknown as z.ZodType<Values<R>, Draft>;
}
