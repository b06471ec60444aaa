import highsLoader from 'highs';
import { believedRainChance, expectedRainMm, usefulRainMm } from '@/scheduling/planning/expectedRain';
import { planDefaults } from '@/scheduling/planning/planDefaults';
import { planWeights, zoneWeights } from '@/scheduling/planning/planObjective';
import type { PlanInput } from '@/scheduling/planning/types';
import { weekdayOf } from '@/scheduling/units/civilDay';
import { outsideShare, wetHours } from './planCost';

/** What the referee found. */
export interface Verdict {
  /** 'Optimal' is the only status from which the cost may be taken as the least there is. */
  status: string;
  /** Cost of the best plan of the model [L]; a lower bound for every feasible plan when optimal. */
  costL: number;
  seconds: number;
}

const text = (value: number): string => (value < 0 ? `- ${Math.abs(value).toPrecision(12)}` : `+ ${value.toPrecision(12)}`);

/** A stretch at home on a day on which the rules allow water, less the minutes to get ready. */
export interface Opening {
  day: number;
  home: number;
  fromMinutes: number;
  toMinutes: number;
}

/** Openings of a `refereeYard`, in the order of its days. */
export function openings(input: PlanInput): Opening[] {
  return input.days.flatMap((day, index) => {
    const isClosed = input.rules.some((rule) => rule.kind === 'weekdays' && !rule.weekdays.includes(weekdayOf(day.on)));
    return isClosed ? [] : day.homeWindows.map((window, home) => ({ day: index, home, fromMinutes: window.fromMinutes + input.leadMinutes, toMinutes: window.toMinutes }));
  });
}

/**
 * The decision problem of `refereeYard`s as a mixed-integer program in the LP format.
 *
 * Per patch and day: D depletion at the start, W depletion with the day's water in, sd/sw stress without and with its rain, vd/vw the part that is severe.
 * Per patch and opening: y set or none, x its minutes. Per opening: o somebody goes out.
 * Stress only costs, so its lines bound it from below. The day's end E = max(0, b + demand · Ks(b)), b = W − expected rain, is a line that bends at the refill
 * line: z chooses the side. Since no course is better for starting a day drier, E may be bounded from below too. Minutes are real numbers here and whole in a
 * plan, so the optimum of the model is never above that of the plans.
 *
 * @param prices - what a minute of each opening costs besides, its moves included [L/min], and the part of an outing that is charged; for a bound of large yards
 */
export function refereeModel(input: PlanInput, prices: { minuteL: readonly number[]; outingShare: number } = { minuteL: [], outingShare: 1 }): string {
  const weights = planWeights[input.priority ?? 'keep_green'];
  const zoneWeight = zoneWeights(input.zones);
  const flowLpm = input.taps[0]?.flowLpm ?? 0;
  const open = openings(input);
  const objective: string[] = [];
  const rows: string[] = [];
  const bounds: string[] = [];
  const binaries: string[] = [];
  const capTerms: string[] = [];
  input.positions.forEach((position, p) => {
    const zone = input.zones.find((each) => each.id === position.zoneId);
    if (!zone || position.rateMmPerHour === null) {
      return;
    }
    const areaM2 = zone.areaM2 * position.zoneShare;
    const perMinute = position.rateMmPerHour / 60 / position.runTimeMultiplier;
    const taw = zone.totalAvailableMm;
    const line = zone.refillLineMm;
    const reserve = taw - line;
    const stressL = weights.stressL * areaM2 * (zoneWeight.get(zone.id) ?? 1);
    const severeL = weights.severeL * areaM2 * (zoneWeight.get(zone.id) ?? 1);
    const refillMinutes = (mm: number): number => Math.max(1, Math.round(mm / perMinute));
    const leastMinutes = Math.max(1, Math.min(Math.max(planDefaults.leastSetMinutes, refillMinutes(Math.min(planDefaults.leastSetDepthMm, line / 2))), refillMinutes(line)));
    const stressed = (name: string, depth: string, lessMm: number, factor: number): void => {
      // s ≥ (depth − less − line) / reserve, v ≥ s − severeFrom
      objective.push(`${text(factor * stressL)} s${name} ${text(factor * severeL)} v${name}`);
      rows.push(`s${name} ${text(-1 / reserve)} ${depth} >= ${((-lessMm - line) / reserve).toPrecision(12)}`);
      rows.push(`v${name} - s${name} >= ${(-weights.severeFrom).toPrecision(12)}`);
    };
    input.days.forEach((day, d) => {
      const id = `_${p}_${d}`;
      const own = open.map((each, k) => ({ ...each, k })).filter((each) => each.day === d);
      bounds.push(`0 <= D${id} <= ${taw.toPrecision(12)}`, `-10000 <= W${id} <= ${taw.toPrecision(12)}`);
      rows.push(`W${id} - D${id} ${own.map(({ k }) => `${text(perMinute)} x_${p}_${k}`).join(' ')} = 0`);
      if (own.length > 0) {
        // No more than the soil has room for, to the nearest minute.
        rows.push(`${own.map(({ k }) => `${text(perMinute)} x_${p}_${k}`).join(' ')} - D${id} <= ${(perMinute / 2).toPrecision(12)}`);
      }
      for (const { k, fromMinutes, toMinutes } of own) {
        rows.push(`x_${p}_${k} ${text(-(toMinutes - fromMinutes))} y_${p}_${k} <= 0`, `x_${p}_${k} ${text(-leastMinutes)} y_${p}_${k} >= 0`, `o_${k} - y_${p}_${k} >= 0`);
        const minuteL = prices.minuteL[k] ?? 0;
        objective.push(`${text(flowLpm * (1 - weights.waitingPerDay * d) + weights.offPreferredL * outsideShare(input, fromMinutes, toMinutes) + minuteL)} x_${p}_${k}`);
        objective.push(`${text(weights.setL + weights.nightWetL * wetHours(input, d, toMinutes) * areaM2 + minuteL * input.moveMinutes)} y_${p}_${k}`);
        binaries.push(`y_${p}_${k}`);
        capTerms.push(`${text(flowLpm)} x_${p}_${k}`);
      }
      const chance = usefulRainMm(day) > 0 ? believedRainChance(day, d) : 0;
      stressed(`d${id}`, `W${id}`, 0, 1 - chance);
      if (chance > 0) {
        stressed(`w${id}`, `W${id}`, usefulRainMm(day), chance);
      }
      const rain = expectedRainMm(day, d);
      const demand = zone.demandMmByDay[d] ?? 0;
      const slope = 1 - demand / reserve;
      const next = `D_${p}_${d + 1}`;
      // z = 0: E ≥ b + demand; z = 1: E ≥ b · slope + demand · TAW / reserve. Apart at most at b = −W at its lowest, where the first is below zero anyway.
      const apart = (demand * (taw + 60)) / reserve + 1;
      rows.push(`${next} - W${id} ${text(apart)} z${id} >= ${(demand - rain).toPrecision(12)}`);
      rows.push(`${next} ${text(-slope)} W${id} ${text(-apart)} z${id} >= ${((demand * taw) / reserve - slope * rain - apart).toPrecision(12)}`);
      binaries.push(`z${id}`);
    });
    const last = input.days.length;
    bounds.push(`0 <= D_${p}_${last} <= ${taw.toPrecision(12)}`);
    rows.push(`D_${p}_0 = ${(position.depletionMm ?? zone.depletionMm).toPrecision(12)}`);
    objective.push(`${text((weights.endWater * flowLpm) / perMinute)} D_${p}_${last}`);
    stressed(`e_${p}`, `D_${p}_${last}`, 0, weights.endStressDays);
  });
  open.forEach((each, k) => {
    const span = each.toMinutes - each.fromMinutes;
    objective.push(`${text(weights.outingL * prices.outingShare)} o_${k}`);
    binaries.push(`o_${k}`);
    rows.push(`${input.positions.map((_, p) => `+ x_${p}_${k} ${text(input.moveMinutes)} y_${p}_${k}`).join(' ')} <= ${span + input.moveMinutes}`);
  });
  const cap = input.monthCaps?.[0];
  if (cap && capTerms.length > 0) {
    rows.push(`${capTerms.join(' ')} <= ${(cap.capLitres - cap.usedLitres).toPrecision(12)}`);
  }
  const named = rows.map((row, index) => ` c${index}: ${row}`);
  return ['Minimize', ` obj: ${objective.join('\n  ')}`, 'Subject To', ...named, 'Bounds', ...bounds.map((bound) => ` ${bound}`), 'Binary', ...binaries.map((name) => ` ${name}`), 'End', ''].join('\n');
}

/** Solves the model of a yard from scratch. */
export async function referee(input: PlanInput, options: { secondsAtMost: number; gap: number }): Promise<Verdict> {
  const highs = await highsLoader();
  const from = performance.now();
  const solution = highs.solve(refereeModel(input), { time_limit: options.secondsAtMost, mip_rel_gap: options.gap, output_flag: false });
  const seconds = (performance.now() - from) / 1000;
  return { status: solution.Status, costL: solution.Status === 'Optimal' ? solution.ObjectiveValue : Number.NaN, seconds };
}
