import type { ExplainedDay, ZoneDayTerm } from '@/scheduling/budget/explainZoneDay';
import type { GrassCondition } from '@/scheduling/budget/grassCondition';
import { formatDepth, formatNumber, type DisplayUnits } from './display';

const conditionWords: Record<GrassCondition, string> = {
  growing: '', resting: 'The lawn rests by choice. ', frosted: 'The grass is browned by frost. ', snow: 'Snow lies on the ground. ',
};

/** A day with what its words need besides its terms. */
export type ToldDay = ExplainedDay & { condition: GrassCondition };

/** What only some readers know: where the rain comes from, what somebody found in the ground. */
export interface TermSources {
  rainFrom?: string;
  found?: string;
}

/** A term of a day as it is read. */
export interface TermWords {
  key: ZoneDayTerm['key'];
  name: string;
  /** '+0.21 in' dries, '−0.30 in' wets; the start and the end stand for themselves. */
  effect: string;
  /** What is behind the number, and what was taken for what nobody measured. */
  because: string[];
}

const names: Record<ZoneDayTerm['key'], string> = {
  start: 'Short at the start', root_growth: 'By the depth of the roots', observation: 'By the soil check', rain: 'Rain that counted', irrigation: 'Sets', grass: 'Used by the grass',
  surface: 'Given off by bare ground', trees: 'Drunk by tree roots', drainage: 'Drained below the roots', end: 'Short at the end',
};

function grassBecause(day: ToldDay, units: DisplayUnits): string {
  const light = day.et0Mm - day.shadedEt0Mm < 0.005 ? 'in the open' : `${formatDepth(day.shadedEt0Mm, units)} of it in the zone’s own light`;
  const ground = day.evaporationMm > 0 ? 'for grass and bare ground together' : 'for the grass';
  return `${conditionWords[day.condition]}Reference ET ${formatDepth(day.et0Mm, units)}, ${light}; × ${formatNumber(day.cropCoefficient, 2)} ${ground}, × ${formatNumber(day.stressCoefficient, 2)} for stress.`;
}

function rainBecause(day: ToldDay, units: DisplayUnits, rainFrom: string | undefined): string {
  const lost = day.rainLossMm < 0.05 ? '' : day.runoffMm > 0.05 ? `; ${formatDepth(day.runoffMm, units)} ran off` : '; too little to get past the leaves';
  return `Of ${formatDepth(day.rainMm, units)}${rainFrom === undefined ? '' : ` by ${rainFrom}`}${lost}.`;
}

function because({ key }: ZoneDayTerm, day: ToldDay, units: DisplayUnits, { rainFrom, found }: TermSources): string | null {
  switch (key) {
    case 'root_growth': return `Roots ${formatDepth(day.rootDepthM * 1000, units)} deep hold ${formatDepth(day.totalAvailableMm, units)}.`;
    case 'observation': return found ?? null;
    case 'rain': return rainBecause(day, units, rainFrom);
    case 'grass': return grassBecause(day, units);
    case 'surface': return day.surfaceDepletionMm === null ? null : `The surface itself is ${formatDepth(day.surfaceDepletionMm, units)} short at the end.`;
    case 'end': return `The refill line lies at ${formatDepth(day.refillLineMm, units)}.`;
    default: return null;
  }
}

/** Less than this is not seen in any unit [mm]. */
const UNSEEN_MM = 0.02;
const alwaysTold: readonly ZoneDayTerm['key'][] = ['start', 'rain', 'grass', 'end'];

/** The terms of an explained day in words; what would read as nothing is left out. */
export function dayTermWords(terms: readonly ZoneDayTerm[], day: ToldDay, units: DisplayUnits, sources: TermSources = {}): TermWords[] {
  return terms.filter(({ key, depletionMm }) => alwaysTold.includes(key) || Math.abs(depletionMm) >= UNSEEN_MM).map((term) => {
    const { key, depletionMm, assumptions } = term;
    const depth = formatDepth(Math.abs(depletionMm), units);
    const reason = because(term, day, units, sources);
    return {
      key, name: names[key], effect: key === 'start' || key === 'end' ? depth : `${depletionMm < 0 ? '−' : '+'}${depth}`,
      because: [...(reason === null ? [] : [reason]), ...assumptions.map(({ method, source }) => `Taken: ${method} (${source}).`)],
    };
  });
}
