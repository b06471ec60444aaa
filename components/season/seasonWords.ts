import { daysBetween } from '@/scheduling/units/civilDay';
import type { SeasonResponse } from '@/shared/contracts/season';
import { formatCivilDay } from '@/shared/display';

export type GrassSeason = SeasonResponse['grasses'][number];
type Window = GrassSeason['germination'][number];

const SOON_DAYS = 21;

/** 'late August', 'mid September': weather decides the day, so a third of a month is as near as the future can be told. */
export function aboutWhen(on: string, todayOn: string): string {
  const day = Number(on.slice(8));
  const [, month = '', year = ''] = formatCivilDay(on, 'dated').split(' ');
  return `${day <= 10 ? 'early' : day <= 20 ? 'mid' : 'late'} ${month}${year === todayOn.slice(0, 4) ? '' : ` ${year}`}`;
}

/** 'from late August to mid October', or 'now, until about mid October'. */
export function windowWords({ fromOn, untilOn }: Window, todayOn: string): string {
  return fromOn <= todayOn ? `now, until about ${aboutWhen(untilOn, todayOn)}` : `from ${aboutWhen(fromOn, todayOn)} to ${aboutWhen(untilOn, todayOn)}`;
}

/** The screen's answer: what the season asks for next. A coming freeze goes before seed. */
export function seasonHeadline({ today, nextFreezeOn, freeze, grasses }: SeasonResponse): string {
  if (nextFreezeOn !== null) {
    return `Frost is forecast for ${formatCivilDay(nextFreezeOn, 'long')}: the hose comes off before.`;
  }
  if (freeze !== null && daysBetween(today, freeze.hoseOffBy) <= SOON_DAYS && daysBetween(today, freeze.lateOn) >= 0) {
    return `The first freeze may come from ${formatCivilDay(freeze.earlyOn, 'long')} on: take the hose off in time.`;
  }
  const windows = grasses.flatMap(({ sowing }) => sowing.slice(0, 1));
  const open = windows.find(({ fromOn }) => fromOn <= today);
  if (open) {
    return `Now is the time to overseed, until about ${aboutWhen(open.untilOn, today)}.`;
  }
  const next = [...windows].sort((a, b) => a.fromOn.localeCompare(b.fromOn))[0];
  return next ? `The next time to overseed begins in ${aboutWhen(next.fromOn, today)}.` : 'No time of the coming year suits seed here.';
}

/** When a weed preventer has its time, in a sentence. */
export function preventerWords({ today, preventer }: SeasonResponse): string {
  const { opensOn, closesOn, isNeverCold } = preventer;
  if (isNeverCold) {
    return 'The soil here never gets so cold that crabgrass rests: there is no single time for it. The label decides.';
  }
  if (opensOn === null) {
    return 'In the coming spring the soil stays too cool for crabgrass as far as can be told.';
  }
  const until = closesOn === null ? '' : `; crabgrass comes up from about ${aboutWhen(closesOn, today)}`;
  return opensOn <= today ? `The soil is warm enough now for it to be down${until}.` : `Down by ${aboutWhen(opensOn, today)}, when the soil reaches 53 to 58 °F (12 to 14 °C)${until}.`;
}

/** When the first freeze is to be expected, in a sentence. */
export function freezeWords({ freeze }: SeasonResponse): string {
  if (freeze === null) {
    return 'No freeze in any year on record.';
  }
  const mild = freeze.frostFreeSeasons === 0 ? '' : ` ${freeze.frostFreeSeasons} of ${freeze.seasons + freeze.frostFreeSeasons} seasons had none.`;
  return `Likely about ${formatCivilDay(freeze.likelyOn, 'dated')}; in the years on record between ${formatCivilDay(freeze.earlyOn, 'dated')} and ${formatCivilDay(freeze.lateOn, 'dated')}.${mild}`;
}
