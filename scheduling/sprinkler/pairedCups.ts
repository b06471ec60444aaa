import { PhysicsError, requireNonNegative } from '@/scheduling/units/physicsError';
import { readingErrorMm, type CupReading } from './cupReading';

/** What cups in a brown patch and in the green beside it say: too little water comes down, water comes down but the ground does not take it, or neither is sure. */
export type PairedVerdict = 'coverage' | 'ground' | 'unclear';

/** Below this share of the green cups the brown patch gets too little; above the other it gets as much. Common practice. */
const SHORT_SHARE = 0.6;
const ALIKE_SHARE = 0.8;

/**
 * Tells poor coverage from ground that repels water or hurt roots: the same depth in both means the ground, much less in the brown patch means coverage.
 * @param input.brownMm - depths in the brown patch [mm], at least one
 * @param input.greenMm - depths in the green beside it [mm], at least one
 * @returns verdict, share of the green depth that the brown patch gets (null when the green cups are empty), and whether it rests on enough cups
 * @throws PhysicsError for no cups or negative depths
 * Source: trade practice; two cups each is the least that shows a spread.
 */
export function pairedCups(input: { brownMm: number[]; greenMm: number[]; reading: CupReading }): { verdict: PairedVerdict; share: number | null; isThin: boolean } {
  const meanOf = (field: 'brownMm' | 'greenMm'): number => {
    const values = input[field];
    if (values.length === 0) {
      throw new PhysicsError(field, values.length, 'must hold at least one cup');
    }
    return values.reduce((sum, value, index) => sum + requireNonNegative(`${field}[${index}]`, value), 0) / values.length;
  };
  const brown = meanOf('brownMm');
  const green = meanOf('greenMm');
  const isThin = input.brownMm.length < 2 || input.greenMm.length < 2;
  if (green <= 0) {
    return { verdict: 'unclear', share: null, isThin };
  }
  const share = brown / green;
  const errorMm = readingErrorMm(input.reading) * Math.SQRT2;
  const isReadable = green > 2 * errorMm;
  const verdict = !isReadable ? 'unclear' : share >= ALIKE_SHARE ? 'ground' : share < SHORT_SHARE && green - brown > errorMm ? 'coverage' : 'unclear';
  return { verdict, share, isThin };
}
