import type { MinuteWindow } from './types';

/** Minutes in a civil day as plans count them. On the two days of a clock change wall-clock minutes still run 0 to 1440. */
export const DAY_MINUTES = 1440;

/**
 * Sorts, clips to the day and merges windows that touch.
 * @param windows - in any order, may overlap; empty and backward ones are dropped
 */
export function normalizeWindows(windows: readonly MinuteWindow[]): MinuteWindow[] {
  const clipped = windows
    .map((window) => ({ fromMinutes: Math.max(0, window.fromMinutes), toMinutes: Math.min(DAY_MINUTES, window.toMinutes) }))
    .filter((window) => window.toMinutes > window.fromMinutes)
    .sort((a, b) => a.fromMinutes - b.fromMinutes || a.toMinutes - b.toMinutes);
  const merged: MinuteWindow[] = [];
  for (const window of clipped) {
    const last = merged[merged.length - 1];
    if (last && window.fromMinutes <= last.toMinutes) {
      last.toMinutes = Math.max(last.toMinutes, window.toMinutes);
    } else {
      merged.push({ ...window });
    }
  }
  return merged;
}

/** The minutes that lie in both lists; both must be normalized. */
export function intersectWindows(a: readonly MinuteWindow[], b: readonly MinuteWindow[]): MinuteWindow[] {
  const common: MinuteWindow[] = [];
  for (const x of a) {
    for (const y of b) {
      const fromMinutes = Math.max(x.fromMinutes, y.fromMinutes);
      const toMinutes = Math.min(x.toMinutes, y.toMinutes);
      if (toMinutes > fromMinutes) {
        common.push({ fromMinutes, toMinutes });
      }
    }
  }
  return common.sort((x, y) => x.fromMinutes - y.fromMinutes);
}

/** Sum of the lengths [min] of normalized windows. */
export function totalMinutes(windows: readonly MinuteWindow[]): number {
  return windows.reduce((sum, window) => sum + window.toMinutes - window.fromMinutes, 0);
}

/** The window that holds the whole span [fromMinutes, toMinutes), or null. */
export function windowHolding(windows: readonly MinuteWindow[], fromMinutes: number, toMinutes: number): MinuteWindow | null {
  return windows.find((window) => window.fromMinutes <= fromMinutes && toMinutes <= window.toMinutes) ?? null;
}
