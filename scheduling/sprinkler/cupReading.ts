import { requirePositive } from '@/scheduling/units/physicsError';

/** How the cups are read: a ruler in millimetres, a measuring jug in millilitres, a scale in grams. */
export type CupReading =
  | { kind: 'depth' }
  | { kind: 'volume'; mouthAreaCm2: number }
  | { kind: 'weight'; mouthAreaCm2: number };

/** Half the finest division people can tell: 1/8 in on a ruler (called enough by UF/IFAS), 1 mL on a jug, 1 g on a kitchen scale. Defaults. */
export const READING_ERRORS = { rulerMm: 3.175 / 2, jugMl: 0.5, scaleG: 0.5 } as const;

/**
 * Depth of water in a cup from its reading.
 * @param value - [mm], [mL] or [g], by the kind of reading
 * @returns depth [mm]
 * @throws PhysicsError when the mouth is not above zero
 * Source: depth = volume ÷ mouth area; 1 g of water is 1 mL.
 */
export function depthFromReading(reading: CupReading, value: number): number {
  if (reading.kind === 'depth') {
    return value;
  }
  return (value / requirePositive('mouthAreaCm2', reading.mouthAreaCm2)) * 10;
}

/** Error of one reading as depth [mm]. */
export function readingErrorMm(reading: CupReading): number {
  switch (reading.kind) {
    case 'depth':
      return READING_ERRORS.rulerMm;
    case 'volume':
      return depthFromReading(reading, READING_ERRORS.jugMl);
    case 'weight':
      return depthFromReading(reading, READING_ERRORS.scaleG);
  }
}

/** Mouth area [cm²] of a round cup from its mouth diameter [mm]. */
export function mouthAreaCm2(mouthDiameterMm: number): number {
  return (Math.PI * (requirePositive('mouthDiameterMm', mouthDiameterMm) / 10) ** 2) / 4;
}
