import type { GrassId } from '@/scheduling/grass/grass';
import { requireFinite } from '@/scheduling/units/physicsError';

/** What a grass needs to germinate. */
export interface GerminationHeat {
  /** Temperature below which nothing advances [°C]. */
  baseC: number;
  /** Heat sum above the base until half the seed has germinated in the laboratory [°C·d]. */
  heatSumCd: number;
  source: string;
  /** True when the numbers are a default and not published for this grass. */
  isDefault: boolean;
}

const LB05 = 'Larsen and Bibby 2005, Crop Sci 45:2030-2037';

/**
 * Heat to half germination in the laboratory, by grass. Only perennial ryegrass and Kentucky bluegrass are published; the others are defaults set so
 * that the days agree with what is known of them, as named in `source`.
 */
export const GERMINATION_HEAT: Record<Exclude<GrassId, 'cool_mix' | 'warm_mix'>, GerminationHeat> = {
  perennial_ryegrass: { baseC: 3.6, heatSumCd: 63.9, source: LB05, isDefault: false },
  kentucky_bluegrass: { baseC: 2.6, heatSumCd: 115.6, source: LB05, isDefault: false },
  tall_fescue: { baseC: 3.6, heatSumCd: 100, source: 'default below the days to 80 % of CRREL Special Report 97-19 (10 d at 15 °C, 9 d at 20 °C)', isDefault: true },
  fine_fescue: { baseC: 3.6, heatSumCd: 95, source: 'default within the 7 to 12 days of seed sellers', isDefault: true },
  bermuda: { baseC: 12, heatSumCd: 120, source: 'default, from memory: none at 15/5 °C, 10 to 30 days', isDefault: true },
  zoysia: { baseC: 12, heatSumCd: 140, source: 'default, from memory', isDefault: true },
  st_augustine: { baseC: 12, heatSumCd: 140, source: 'default, from memory; mostly laid as sod', isDefault: true },
  buffalo: { baseC: 10, heatSumCd: 150, source: 'default, from memory', isDefault: true },
};

/** The grasses whose seed a mix is taken to hold: the first up and the last up decide its range. */
const MIXES: Record<'cool_mix' | 'warm_mix', (keyof typeof GERMINATION_HEAT)[]> = {
  cool_mix: ['perennial_ryegrass', 'tall_fescue', 'kentucky_bluegrass'],
  warm_mix: ['bermuda', 'zoysia'],
};

/** Grasses of a sowing, a mix taken apart. */
export function grassesOf(grass: GrassId): (keyof typeof GERMINATION_HEAT)[] {
  return grass === 'cool_mix' || grass === 'warm_mix' ? MIXES[grass] : [grass];
}

/**
 * Field emergence as multiples of the laboratory heat sum: the field is clearly slower (field sums of 200 to 220 °C·d for pasture grasses, Moot et
 * al. 2000; the laboratory predicts the field weakly). `likely` is what stages go by; `fast` and `slow` give the range. Defaults, common practice.
 */
export const FIELD_FACTORS = {
  fast: { firstUp: 1, mostlyUp: 1.7 },
  likely: { firstUp: 1.3, mostlyUp: 2.2 },
  slow: { firstUp: 1.7, mostlyUp: 3 },
} as const;

export type ClockPace = keyof typeof FIELD_FACTORS;

/**
 * Days to half germination at a constant temperature, in the laboratory.
 * @returns days, or null at or below the base temperature: it never gets there
 * @throws PhysicsError when the temperature is not finite
 * Source: thermal time θ = (T − Tb)·t.
 */
export function laboratoryDays(grass: keyof typeof GERMINATION_HEAT, temperatureC: number): number | null {
  requireFinite('temperatureC', temperatureC);
  const { baseC, heatSumCd } = GERMINATION_HEAT[grass];
  return temperatureC <= baseC ? null : heatSumCd / (temperatureC - baseC);
}

/** Progress of a grass toward half laboratory germination by one day at a soil temperature: 1 is reached in the laboratory's time. */
export function dailyProgress(grass: keyof typeof GERMINATION_HEAT, soilTemperatureC: number): number {
  const { baseC, heatSumCd } = GERMINATION_HEAT[grass];
  return Math.max(0, soilTemperatureC - baseC) / heatSumCd;
}
