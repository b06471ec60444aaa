import type { DayTimeline, TimelineJob } from './dayTimeline';
import { intersectWindows } from './minuteWindows';
import type { DayContext, GroundDay } from './planDayContext';
import { planDefaults } from './planDefaults';
import { reason } from './reasonNumbers';
import type { MinuteWindow, MissedDose, PlanDose, PlanInput, PlanZone, Reason } from './types';
import type { WaterLedger } from './waterLedger';
import { minutesForNetDepth, netDepthMm, type Patch } from './yardPatches';

/** A run in the timeline of a day, with why it is there. */
export interface PlanJob extends TimelineJob {
  patch: Patch;
  kind: 'set' | 'dose';
  reasons: Reason[];
  halfWay?: boolean;
  locked?: boolean;
}

export interface SeedDay {
  missed: MissedDose[];
  /** Why the zone has no dose at all on this day, empty when it has one. */
  without: Reason[];
}

/** How far a dose may move from its time: the default, and never past half-way to its neighbours. */
function shiftWindow(doses: readonly PlanDose[], index: number): MinuteWindow {
  const dose = doses[index];
  const at = dose?.atMinutes ?? 0;
  const before = doses[index - 1];
  const after = doses[index + 1];
  const earlier = before ? Math.min(planDefaults.doseShiftMinutes, (at - before.atMinutes) / 2) : planDefaults.doseShiftMinutes;
  const later = after ? Math.min(planDefaults.doseShiftMinutes, (after.atMinutes - at) / 2) : planDefaults.doseShiftMinutes;
  return { fromMinutes: Math.max(0, at - earlier), toMinutes: Math.min(1440, at + later) };
}

function nextDoseOn(zone: PlanZone, contexts: readonly DayContext[], index: number): string {
  const later = contexts.find((context) => context.index > index && (zone.seed?.dosesByDay[context.index]?.length ?? 0) > 0);
  return later?.day.on ?? '';
}

function daylightOf(context: DayContext): MinuteWindow[] {
  const { sunriseMinutes, sunsetMinutes } = context.day;
  if (sunriseMinutes === null || sunsetMinutes === null || sunsetMinutes <= sunriseMinutes) {
    return [{ fromMinutes: 0, toMinutes: 1440 }];
  }
  return [{ fromMinutes: Math.ceil(sunriseMinutes), toMinutes: Math.floor(sunsetMinutes) }];
}

function whyNotKept(context: DayContext, ground: GroundDay, open: readonly MinuteWindow[], shift: MinuteWindow, wantedMinutes: number): Reason {
  if (ground.closed) {
    return ground.closed;
  }
  const around = [{ fromMinutes: shift.fromMinutes, toMinutes: shift.toMinutes + 1 }];
  if (intersectWindows(context.homeWindows, around).length === 0) {
    return reason('nobody_home', { fromMinutes: shift.fromMinutes, toMinutes: shift.toMinutes });
  }
  const work = intersectWindows(intersectWindows(open, context.homeWindows), around);
  const hadMinutes = work.reduce((sum, window) => sum + window.toMinutes - window.fromMinutes, 0);
  return reason('no_time_left', { wantedMinutes, hadMinutes });
}

/**
 * Places the doses of one seeded zone on one day: in daylight, while somebody is at home, within the rules, near their times. A dose that cannot be
 * kept on every patch of the zone is named.
 * @param timeline - the day so far; changed
 * @param ledger - limited volumes; changed
 * @returns missed doses, and why the zone has none
 */
export function planSeedDoses(input: PlanInput, contexts: readonly DayContext[], context: DayContext, zone: PlanZone, patches: readonly Patch[], timeline: DayTimeline<PlanJob>, ledger: WaterLedger): SeedDay {
  const seed = zone.seed;
  const doses = [...(seed?.dosesByDay[context.index] ?? [])].sort((a, b) => a.atMinutes - b.atMinutes);
  if (seed === null || doses.length === 0) {
    return { missed: [], without: [reason('no_dose_today', { stage: seed?.stage ?? 'established', nextOn: nextDoseOn(zone, contexts, context.index) })] };
  }
  const wantedMm = doses.reduce((sum, dose) => sum + dose.depthMm, 0);
  const chancePct = context.day.rainProbabilityPct;
  if (context.index <= 1 && chancePct !== null && chancePct >= planDefaults.doseRainChancePct && context.day.rainMm >= 2 * wantedMm) {
    return { missed: [], without: [reason('doses_left_to_rain', { rainMm: context.day.rainMm, probabilityPct: chancePct, wantedMm })] };
  }
  const missed: MissedDose[] = [];
  let kept = 0;
  doses.forEach((dose, index) => {
    const shift = shiftWindow(doses, index);
    const failures: Reason[] = [];
    for (const patch of patches) {
      const ground = context.groundOf(zone.id, true, patch.position.device);
      const open = intersectWindows(ground.openWindows, daylightOf(context));
      const isDone = context.index === 0 && input.alreadyApplied.some((applied) =>
        applied.positionId === patch.position.id && applied.atMinutes >= shift.fromMinutes && applied.atMinutes <= shift.toMinutes);
      if (isDone) {
        kept += 1;
        continue;
      }
      if (context.index === 0 && input.notBeforeMinutes !== null && shift.toMinutes < input.notBeforeMinutes + input.leadMinutes) {
        failures.push(reason('past_for_today', { nowMinutes: input.notBeforeMinutes }));
        continue;
      }
      const reasons = [reason('dose', { stage: seed.stage, dayNumber: seed.dayNumber + context.index, number: index + 1, of: doses.length, depthMm: dose.depthMm })];
      const wanted = minutesForNetDepth(patch, dose.depthMm);
      const atMost = Math.min(cycleMinutes(patch), Math.floor(input.supply?.drawMinutesAtMost ?? 1440));
      if (wanted > atMost) {
        reasons.push(reason('cut_by_intake', { rateMmPerHour: patch.rateMmPerHour, intakeMmPerHour: zone.intakeMmPerHour, minutes: atMost, wantedMm: dose.depthMm, givenMm: netDepthMm(patch, atMost) }));
      }
      const refusal = ledger.refusal(patch, context.index, Math.min(wanted, atMost));
      if (refusal) {
        failures.push(refusal);
        continue;
      }
      const placed = ground.closed ? null : timeline.placeNearest({
        patch, kind: 'dose', reasons,
        positionId: patch.position.id, tapId: patch.tap.id, flowLpm: patch.tap.flowLpm,
        minutes: Math.min(wanted, atMost),
        openWindows: open, homeWindows: context.homeWindows, endsUnattended: patch.tap.shutOffTimer && !ground.mustBeAttended,
        earliestStartMinutes: Math.ceil(shift.fromMinutes), latestStartMinutes: Math.floor(shift.toMinutes),
      }, dose.atMinutes);
      if (!placed) {
        failures.push(whyNotKept(context, ground, open, shift, Math.min(wanted, atMost)));
        continue;
      }
      kept += 1;
      ledger.take(patch, context.index, placed.job.minutes);
      if (Math.abs(placed.startMinutes - dose.atMinutes) > 5) {
        reasons.push(reason('dose_moved', { wantedMinutes: dose.atMinutes, startMinutes: placed.startMinutes }));
      }
      if (patch.position.rateIsDefault) {
        reasons.push(reason('rate_default', { position: patch.position.name, rateMmPerHour: patch.rateMmPerHour }));
      }
    }
    const cause = failures[0] ?? (patches.length === 0 ? reason('zone_without_position', { zone: zone.name }) : null);
    if (cause) {
      missed.push({ zoneId: zone.id, atMinutes: dose.atMinutes, depthMm: dose.depthMm, reasons: [reason('dose_not_kept', { atMinutes: dose.atMinutes, depthMm: dose.depthMm }), cause] });
    }
  });
  return { missed, without: kept > 0 ? [] : missed[0]?.reasons ?? [] };
}

/**
 * Longest run of a patch before water would stand deeper than the ground holds [min]: all day when the soil takes water as fast as it comes.
 * Source: constant rate above a steady intake fills the surface storage in storage ÷ (rate − intake); science of run-off time without its initial surge.
 */
export function cycleMinutes(patch: Patch): number {
  const excess = patch.rateMmPerHour - patch.zone.intakeMmPerHour;
  if (excess <= 0) {
    return 1440;
  }
  return Math.max(1, Math.min(1440, Math.floor((planDefaults.surfaceStorageMm / excess) * 60)));
}
