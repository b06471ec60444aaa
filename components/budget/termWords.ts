import type { ZoneDayTerm } from '@/scheduling/budget/explainZoneDay';
import type { UnitSystem } from '@/shared/contracts/common';
import type { ObservationResponse } from '@/shared/contracts/ground';
import type { BudgetDayResponse, RainSource } from '@/shared/contracts/water';
import { formatDepth, formatNumber, formatQuantity } from '@/shared/display';
import { foundWords } from './groundWords';

export const rainWords: Record<RainSource, string> = { gauge: 'your gauge', weather: 'weather service', forecast: 'forecast', none: 'none known' };

const conditionWords: Record<BudgetDayResponse['condition'], string> = {
  growing: '', resting: 'The lawn rests by choice. ', frosted: 'The grass is browned by frost. ', snow: 'Snow lies on the ground. ',
};

/** A term in words: what it is, and what is behind its number. */
export interface TermWords {
  name: string;
  because: string | null;
}

function rainBecause(day: BudgetDayResponse, units: UnitSystem): string {
  const lost = day.rainLossMm < 0.05 ? '' : day.runoffMm > 0.05 ? `, ${formatDepth(day.runoffMm, units)} ran off` : ', too little to get past the leaves';
  return `of ${formatDepth(day.rainMm, units)} by ${rainWords[day.rainSource]}${lost}`;
}

function grassBecause(day: BudgetDayResponse, units: UnitSystem): string {
  const light = day.et0Mm - day.shadedEt0Mm < 0.005 ? 'in the open' : `${formatDepth(day.shadedEt0Mm, units)} of it in the zone’s own light`;
  const ground = day.evaporationMm > 0 ? 'for grass and bare ground together' : 'for the grass';
  return `${conditionWords[day.condition]}Reference ET ${formatDepth(day.et0Mm, units)}, ${light}; × ${formatNumber(day.cropCoefficient, 2)} ${ground}, × ${formatNumber(day.stressCoefficient, 2)} for stress.`;
}

/** Words for a term of a day. @param found - what somebody found in the ground on that day */
export function termWords({ key }: ZoneDayTerm, day: BudgetDayResponse, found: ObservationResponse | null, units: UnitSystem): TermWords {
  switch (key) {
    case 'start': return { name: 'Short at the start', because: null };
    case 'root_growth': return { name: 'By the depth of the roots', because: `Roots ${formatQuantity('bore', day.rootDepthM * 1000, units)} deep hold ${formatDepth(day.totalAvailableMm, units)}.` };
    case 'observation': return {
      name: 'By the soil check', because: found === null ? null : `The ${foundWords(found)}: that counts for ${formatNumber(found.weight * 100, 0)} % of the difference.`,
    };
    case 'rain': return { name: 'Rain that counted', because: rainBecause(day, units) };
    case 'irrigation': return { name: 'Sets', because: null };
    case 'grass': return { name: 'Used by the grass', because: grassBecause(day, units) };
    case 'surface': return {
      name: 'Given off by bare ground', because: day.surfaceDepletionMm === null ? null : `The surface itself is ${formatDepth(day.surfaceDepletionMm, units)} short at the end.`,
    };
    case 'trees': return { name: 'Drunk by tree roots', because: null };
    case 'drainage': return { name: 'Drained below the roots', because: null };
    case 'end': return { name: 'Short at the end', because: `The refill line lies at ${formatDepth(day.refillLineMm, units)}.` };
  }
}
