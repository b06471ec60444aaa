import type { UnitSystem } from '@/shared/contracts/common';
import type { PortfolioResponse } from '@/shared/contracts/proposals';
import { formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { capital, counted, countWord } from '@/shared/roundWords';

export type PortfolioYard = PortfolioResponse['yards'][number];

/** 'Seven yards, two need you.' */
export function portfolioHeadline(yards: readonly PortfolioYard[]): string {
  const needy = yards.filter((yard) => yard.need !== null).length;
  const many = capital(counted(yards.length, 'yard'));
  if (needy === 0) {
    return yards.length === 1 ? 'Your yard is on track.' : `${many}, all on track.`;
  }
  return yards.length === 1 ? 'Your yard needs you.' : `${many}, ${countWord(needy)} ${needy === 1 ? 'needs' : 'need'} you.`;
}

const stepWords: Record<string, string> = {
  tap: 'the tap', bucket_test: 'a bucket test', hose: 'the hose', sprinkler: 'a sprinkler', zone: 'a zone', position: 'a position', catch_test: 'a catch-cup test', hours: 'hours at home',
};

/** What a yard needs in a few words. */
export function needText(need: NonNullable<PortfolioYard['need']>, units: UnitSystem): string {
  const number = (name: string) => Number(need.values[name] ?? Number.NaN);
  const text = (name: string) => String(need.values[name] ?? '');
  switch (need.code) {
    case 'water_still_on': return `Water still on, ${formatMinutes(number('minutesPast'))} over`;
    case 'surface_drying': return `${text('zone')} drying`;
    case 'seed_missed_doses': return `${text('zone')}: ${counted(number('missed'), 'dose')} missed`;
    case 'not_started': return `Not started: ${counted(number('sets'), 'set')} from ${formatClock(number('startMinutes'), units)}`;
    case 'past_refill_line': return `${text('zone')} ${formatDepth(number('depletionMm'), units)} short, past its refill line`;
    case 'does_not_fit': return `Does not fit: ${formatMinutes(number('shortMinutes'))} short`;
    case 'set_up_unfinished': return `Not set up yet: ${stepWords[text('step')] ?? 'a step'} is missing`;
    case 'no_catch_test': return `No catch-cup test yet at ${counted(number('positions'), 'position')}`;
    case 'proposal_waiting': return `${capital(counted(number('proposals'), 'proposal'))} waiting for an answer`;
  }
}
