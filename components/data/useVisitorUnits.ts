import { useState } from 'react';
import type { UnitSystem } from '@/shared/contracts/common';

const key = 'dapple.units';

/** Inches for the countries that use them, unless this device was told otherwise. */
function firstUnits(): UnitSystem {
  try {
    const kept = window.localStorage.getItem(key);
    if (kept === 'us' || kept === 'metric') {
      return kept;
    }
  } catch {
    // Storage is closed in some private windows; the language then decides each time.
  }
  return /-(US|LR|MM)$/i.test(navigator.language) || navigator.language === 'en' ? 'us' : 'metric';
}

/** Units of the pages that need no account, remembered on this device. */
export function useVisitorUnits(): [UnitSystem, (units: UnitSystem) => void] {
  const [units, setUnits] = useState(firstUnits);
  const choose = (next: UnitSystem) => {
    setUnits(next);
    try {
      window.localStorage.setItem(key, next);
    } catch {
      // As above: the choice then ends with the page.
    }
  };
  return [units, choose];
}
