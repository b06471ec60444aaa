import type { CupProblem } from '@/scheduling/sprinkler/cupProblems';
import { formatDepth, formatMinutes, formatNumber, type DisplayUnits } from './display';

/** One or two plain sentences for what makes a catch-cup test doubtful, and what to do. */
export function cupProblemText(problem: CupProblem, units: DisplayUnits): string {
  const number = (name: string): number => {
    const value = problem.values[name];
    return typeof value === 'number' ? value : Number.NaN;
  };
  const count = (name: string): string => formatNumber(number(name), 0);
  switch (problem.code) {
    case 'all_empty':
      return `Every cup is empty after ${formatMinutes(number('minutes'))}. Run longer, or look whether the water reaches the cups.`;
    case 'too_shallow': {
      const instead = problem.values.reading === 'depth' ? ', or measure millilitres or weigh the cups' : '';
      return `${formatDepth(number('meanMm'), units)} is too shallow to read within 10 %. Run about ${formatMinutes(number('neededMinutes'))}${instead}.`;
    }
    case 'too_few_cups':
      return `${count('count')} ${number('count') === 1 ? 'cup says' : 'cups say'} little about a portable sprinkler: the range is wide. Use at least ${count('wanted')}, better 20.`;
    case 'cups_missing':
      return `${count('count')} of ${count('of')} cups have no reading and are left out.`;
    case 'poor_coverage':
      return `${count('count')} nearly empty ${number('count') === 1 ? 'cup stands' : 'cups stand'} beside a full one: that is coverage, not time. Move or overlap the sprinkler before running longer.`;
    case 'odd_cup':
      return `${count('count')} ${number('count') === 1 ? 'cup does' : 'cups do'} not fit its neighbours. Look whether it tipped, splashed or was misread.`;
    case 'multiplier_limited':
      return 'The pattern is so uneven that running longer would drown the wet half. Another position does more than more minutes.';
  }
}
