import { reason } from './reasonNumbers';
import type { PlanInput, Reason } from './types';
import type { Patch } from './yardPatches';

/** What has been given out of limited volumes while a plan is made: litres of a month, and depth in seven days over a drain field or a well head. */
export class WaterLedger {
  private readonly leftByMonth: Map<string, number>;
  private readonly grossMm = new Map<string, Float64Array>();

  constructor(private readonly input: PlanInput) {
    this.leftByMonth = new Map((input.monthCaps ?? []).map((cap) => [cap.month, Math.max(0, cap.capLitres - cap.usedLitres)]));
  }

  /** Litres left in the month of a civil day; Infinity where nothing limits it. */
  leftLitres(on: string): number {
    return this.leftByMonth.get(on.slice(0, 7)) ?? Infinity;
  }

  /** Why a run may not be taken, or null when it may. */
  refusal(patch: Patch, index: number, minutes: number): Reason | null {
    const on = this.input.days[index]?.on ?? '';
    const litres = minutes * patch.tap.flowLpm;
    const left = this.leftLitres(on);
    if (litres > left + 1e-6) {
      return reason('month_cap', { leftLitres: left, capLitres: this.input.monthCaps?.find((cap) => cap.month === on.slice(0, 7))?.capLitres ?? 0 });
    }
    const limit = patch.position.weeklyLimit;
    if (limit) {
      const leftMm = this.leftInWeek(patch, index);
      if ((minutes * patch.rateMmPerHour) / 60 > leftMm + 1e-9) {
        return reason('weekly_limit', { name: limit.name, source: limit.source ?? '', limitMm: limit.depthMm, leftMm: Math.max(0, leftMm) });
      }
    }
    return null;
  }

  /** Mean depth that may still be laid down on a day under the weekly limit of a position [mm]. */
  leftInWeek(patch: Patch, index: number): number {
    const limit = patch.position.weeklyLimit;
    if (!limit) {
      return Infinity;
    }
    const own = this.grossMm.get(patch.position.id);
    let most = 0;
    // A set counts in every seven days that hold it, those that end later included: fixed sets may lie ahead.
    for (let end = index; end <= index + 6; end += 1) {
      let given = 0;
      for (let day = end - 6; day <= end; day += 1) {
        given += day < 0 ? limit.appliedMm[6 + day] ?? 0 : own?.[day] ?? 0;
      }
      most = Math.max(most, given);
    }
    return limit.depthMm - most;
  }

  take(patch: Patch, index: number, minutes: number): void {
    const on = this.input.days[index]?.on ?? '';
    const month = on.slice(0, 7);
    const left = this.leftByMonth.get(month);
    if (left !== undefined) {
      this.leftByMonth.set(month, left - minutes * patch.tap.flowLpm);
    }
    const own = this.grossMm.get(patch.position.id) ?? new Float64Array(this.input.dayCount);
    own[index] = (own[index] ?? 0) + (minutes * patch.rateMmPerHour) / 60;
    this.grossMm.set(patch.position.id, own);
  }
}
