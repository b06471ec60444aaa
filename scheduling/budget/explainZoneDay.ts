import type { Assumption } from '@/scheduling/weather';
import type { ZoneDay } from './zoneDay';

/** Names of the terms of a day, in the order in which they happen. */
export type ZoneDayTermKey = 'start' | 'root_growth' | 'observation' | 'rain' | 'irrigation' | 'grass' | 'surface' | 'trees' | 'drainage' | 'end';

/** What of a closed day its explanation rests on. */
export type ExplainedDay = Pick<ZoneDay,
  'et0Mm' | 'shadedEt0Mm' | 'cropCoefficient' | 'stressCoefficient' | 'etcMm' | 'evaporationMm' | 'treeUptakeMm' | 'rainMm' | 'rainLossMm' | 'runoffMm' | 'effectiveRainMm' | 'irrigationMm'
  | 'drainageMm' | 'rootGrowthMm' | 'observationMm' | 'depletionStartMm' | 'depletionEndMm' | 'surfaceDepletionMm' | 'totalAvailableMm' | 'refillLineMm' | 'depletionFraction' | 'rootDepthM' | 'assumptions'>;

/** One term of a day. */
export interface ZoneDayTerm {
  key: ZoneDayTermKey;
  /** What it does to the depletion: positive dries, negative wets [mm]. The start and the end stand for themselves. */
  depletionMm: number;
  /** Numbers behind it, by their names in the code. */
  numbers: Readonly<Record<string, number>>;
  /** What was assumed for it. */
  assumptions: readonly Assumption[];
}

const FIELDS: Readonly<Record<Exclude<ZoneDayTermKey, 'end'>, readonly string[]>> = {
  start: ['depletionStartMm'],
  root_growth: ['rootDepthM'],
  observation: ['observation'],
  rain: ['precipitationMm', 'hourlyMm', 'compaction'],
  irrigation: ['irrigationMm'],
  grass: [
    'et0Mm', 'solarMjM2', 'tdewC', 'rhMinPct', 'rhMaxPct', 'windMps', 'windHeightM', 'relativeSolar', 'sunHours', 'sunHoursOn', 'skyView', 'horizon', 'transmissivity', 'leafOutDay',
    'cropCoefficient', 'stage', 'condition', 'depletionFraction',
  ],
  surface: ['coverFraction', 'surfaceLayer'],
  trees: ['treeRoots'],
  drainage: [],
};

/**
 * Explains a day term by term. The terms between the start and the end, added to the start, give the end; what did nothing that day is left out.
 * @returns the terms in order, with the start first and the end last
 */
export function explainZoneDay(day: ExplainedDay): ZoneDayTerm[] {
  const of = (key: Exclude<ZoneDayTermKey, 'end'>) => day.assumptions.filter(({ field }) => FIELDS[key].includes(field));
  const grassMm = day.etcMm - day.evaporationMm - day.treeUptakeMm;
  const terms: ZoneDayTerm[] = [
    { key: 'start', depletionMm: day.depletionStartMm, numbers: {}, assumptions: of('start') },
    { key: 'root_growth', depletionMm: day.rootGrowthMm, numbers: { rootDepthM: day.rootDepthM, totalAvailableMm: day.totalAvailableMm }, assumptions: of('root_growth') },
    { key: 'observation', depletionMm: day.observationMm, numbers: {}, assumptions: of('observation') },
    { key: 'rain', depletionMm: -day.effectiveRainMm, numbers: { rainMm: day.rainMm, rainLossMm: day.rainLossMm, runoffMm: day.runoffMm }, assumptions: of('rain') },
    { key: 'irrigation', depletionMm: -day.irrigationMm, numbers: {}, assumptions: of('irrigation') },
    {
      key: 'grass', depletionMm: grassMm,
      numbers: {
        et0Mm: day.et0Mm, shadedEt0Mm: day.shadedEt0Mm, cropCoefficient: day.cropCoefficient, stressCoefficient: day.stressCoefficient,
        refillLineMm: day.refillLineMm, depletionFraction: day.depletionFraction,
      },
      assumptions: of('grass'),
    },
    { key: 'surface', depletionMm: day.evaporationMm, numbers: { surfaceDepletionMm: day.surfaceDepletionMm ?? 0 }, assumptions: of('surface') },
    { key: 'trees', depletionMm: day.treeUptakeMm, numbers: { et0Mm: day.et0Mm }, assumptions: of('trees') },
    { key: 'drainage', depletionMm: day.drainageMm, numbers: {}, assumptions: of('drainage') },
  ];
  const end: ZoneDayTerm = { key: 'end', depletionMm: day.depletionEndMm, numbers: { refillLineMm: day.refillLineMm, totalAvailableMm: day.totalAvailableMm }, assumptions: [] };
  // Grass and rain are named even when they did nothing: a dry or a dark day is an answer too.
  return [...terms.filter(({ key, depletionMm }) => depletionMm !== 0 || key === 'start' || key === 'grass' || (key === 'rain' && day.rainMm > 0)), end];
}

/** What is left when the terms of an explained day are added up [mm]; 0 but for rounding of the machine. */
export function closingErrorOfTerms(terms: readonly ZoneDayTerm[]): number {
  const end = terms.find(({ key }) => key === 'end')?.depletionMm ?? 0;
  return end - terms.reduce((sum, { key, depletionMm }) => (key === 'end' ? sum : sum + depletionMm), 0);
}
