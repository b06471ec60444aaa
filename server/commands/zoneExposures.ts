import { yearOfExposure, type ZoneExposure } from '@/scheduling/sun';

/** Where the light of a yard's zones is reckoned. */
export interface ExposurePlace {
  latitudeDeg: number;
  longitudeDeg: number;
}

/** A zone that has a horizon from its sun diary. */
export interface HorizonZone {
  id: string;
  /** 360 heights [°]. */
  horizonDeg: readonly number[];
}

/** Years of light that are kept; each takes about 40 kB. */
const KEPT_AT_MOST = 200;
/** A year of light takes longer than the rest of a budget and follows from place and horizon alone, so that nothing kept here can be behind the facts. */
const kept = new Map<string, ZoneExposure>();

/** What a diary's horizon rests on, to be shown with each day. */
const DIARY = { field: 'horizon', method: 'light from the sun diary: each unbroken time of shade taken as one obstacle of even height, just tall enough', source: 'geometry' };

/**
 * A year of light for each zone that has a horizon, by zone. Horizons that nobody asked for lately are reckoned anew.
 * @throws PhysicsError for a horizon that is none
 */
export function zoneExposures({ latitudeDeg, longitudeDeg }: ExposurePlace, zones: readonly HorizonZone[]): Map<string, ZoneExposure> {
  const keyOf = (zone: HorizonZone) => `${latitudeDeg} ${longitudeDeg} ${zone.horizonDeg.join(',')}`;
  const missing = zones.filter((zone) => !kept.has(keyOf(zone)));
  const found = missing.length === 0 ? [] : yearOfExposure({
    latitudeDeg, longitudeDeg, obstacles: [], zones: missing.map(({ id, horizonDeg }) => ({ id, horizon: { heightDeg: horizonDeg, assumptions: [DIARY] } })),
  });
  missing.forEach((zone, index) => {
    const exposure = found[index];
    if (exposure) kept.set(keyOf(zone), exposure);
  });
  const answer = new Map<string, ZoneExposure>();
  for (const zone of zones) {
    const key = keyOf(zone);
    const exposure = kept.get(key);
    if (!exposure) continue;
    // The newest stand at the end; the oldest are let go first.
    kept.delete(key);
    kept.set(key, exposure);
    answer.set(zone.id, exposure);
  }
  for (const oldest of [...kept.keys()].slice(0, Math.max(0, kept.size - KEPT_AT_MOST))) kept.delete(oldest);
  return answer;
}
