import type { BudgetDayResponse } from '@/shared/contracts/water';
import type { UnitSystem } from '@/shared/contracts/common';
import { morningDepletionMm } from '@/scheduling/budget/morningDepletion';
import { dayWord, formatDepth } from '@/shared/display';

/** The first day, from today on, at whose end the depletion is past the refill line; null when none in the days known. */
export function refillLineDay(days: readonly BudgetDayResponse[], todayOn: string): BudgetDayResponse | null {
  return days.find((day) => day.on >= todayOn && day.depletionEndMm >= day.refillLineMm) ?? null;
}

/** How a zone stands, in one sentence. Forecast days count with the sets that are planned in them. */
export function zoneSentence(days: readonly BudgetDayResponse[], todayOn: string, units: UnitSystem): string {
  const today = days.find((day) => day.on === todayOn) ?? days.filter((day) => !day.isForecast).at(-1);
  if (!today) {
    return 'No water budget yet: it begins when weather is there.';
  }
  const morningMm = morningDepletionMm(today);
  const short = `${formatDepth(morningMm, units)} short this morning`;
  if (morningMm >= today.refillLineMm) {
    return `${short}, past its refill line of ${formatDepth(today.refillLineMm, units)}.`;
  }
  const crossing = refillLineDay(days, todayOn);
  return crossing === null
    ? `${short}; without more water it stays above its refill line through ${dayWord(days.at(-1)?.on ?? todayOn, todayOn)}.`
    : `${short}; without more water it reaches its refill line ${/^(today|tomorrow)$/.test(dayWord(crossing.on, todayOn)) ? dayWord(crossing.on, todayOn) : `on ${dayWord(crossing.on, todayOn)}`}.`;
}
