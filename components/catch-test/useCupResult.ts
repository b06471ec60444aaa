import { useDeferredValue, useEffect, useMemo, useState } from 'react';
import { mouthAreaCm2, type CupReading as ReckonedReading } from '@/scheduling/sprinkler/cupReading';
import { cupTest, type CupTestResult } from '@/scheduling/sprinkler/cupTest';
import { rowMove, type RowMove } from '@/scheduling/sprinkler/rowMove';
import type { CupReading } from '@/shared/contracts/catchTests';
import type { ReadCups } from './cupDraft';

/** A reading kind of the contract as the computation takes it: by the area of the mouth. */
export function reckonedReading(reading: CupReading): ReckonedReading {
  return reading.kind === 'depth' ? reading : { kind: reading.kind, mouthAreaCm2: mouthAreaCm2(reading.mouthDiameterMm) };
}

/** The result of what was read so far, by the function that the server uses; null while there is not enough for one. */
export function reckon({ layout, reading, minutes, values }: Pick<ReadCups, 'layout' | 'reading' | 'minutes' | 'values'>): CupTestResult | null {
  if (layout === null || reading === null || minutes === null || values.every((value) => value === null)) {
    return null;
  }
  return cupTest({ layout, minutes, values, reading: reckonedReading(reading) });
}

/** The result, a moment behind the typing so that typing stays quick. */
export function useCupResult(read: ReadCups): CupTestResult | null {
  const settled = useDeferredValue(read);
  return useMemo(() => reckon(settled), [settled]);
}

const settleMs = 400;

/** The best move distance of a single row, worked out when the typing rests; null before and for a grid. */
export function useRowMove(read: ReadCups, result: CupTestResult | null, currentMoveM: number | null): RowMove | null {
  const { layout, minutes } = read;
  const question = useMemo(
    () => (layout?.kind === 'row' && minutes !== null && result !== null && result.meanMm > 0 ? { layout, minutes, depthsMm: result.depthsMm } : null),
    [layout, minutes, result],
  );
  const [answer, setAnswer] = useState<{ question: typeof question; move: RowMove | null }>({ question: null, move: null });
  useEffect(() => {
    if (question === null) {
      return undefined;
    }
    const timer = setTimeout(() => setAnswer({ question, move: rowMove(question, currentMoveM ?? undefined) }), settleMs);
    return () => clearTimeout(timer);
  }, [question, currentMoveM]);
  return question === null ? null : answer.move;
}
