/**
 * Diffuse part of the solar radiation of one hour, from its clearness.
 * Fitted to hourly data: not for daily totals.
 * @param clearness - kt, radiation at the ground over radiation above the air, 0-1 [–]
 * @returns df, 0-1 [–]
 * Source: Erbs, Klein, Duffie 1982, Solar Energy 28:293
 */
export function erbsDiffuseFraction(clearness: number): number {
  const kt = Math.min(1, Math.max(0, clearness));
  if (kt <= 0.22) return 1 - 0.09 * kt;
  if (kt > 0.8) return 0.165;
  return 0.9511 - 0.1604 * kt + 4.388 * kt ** 2 - 16.638 * kt ** 3 + 12.336 * kt ** 4;
}

/**
 * Diffuse part of the solar radiation of one hour, older piecewise-linear fit, kept to compare with.
 * @param clearness - kt, 0-1 [–]
 * @returns df, 0-1 [–]
 * Source: Orgill and Hollands 1977, Solar Energy 19:357
 */
export function orgillHollandsDiffuseFraction(clearness: number): number {
  const kt = Math.min(1, Math.max(0, clearness));
  if (kt < 0.35) return 1 - 0.249 * kt;
  if (kt > 0.75) return 0.177;
  return 1.557 - 1.84 * kt;
}

/** One hour's light taken apart. */
export interface BeamAndDiffuse {
  /** kt [–] */
  clearness: number;
  /** On a horizontal surface, same unit as the input. */
  diffuse: number;
  /** On a horizontal surface, same unit as the input. */
  beam: number;
  /** On a surface that faces the sun; 0 with the sun at or below the horizon. */
  directNormal: number;
}

/**
 * Takes horizontal radiation apart into beam and diffuse.
 * @param global - radiation on the ground [W/m² or MJ/m² per period]
 * @param extraterrestrialNormal - radiation above the air on a surface facing the sun, same unit
 * @param sineOfAltitude - sine of the sun's height; clearness is reckoned with no less than the sine of 3.7° (0.065), where it loses its meaning
 * Source: Erbs, Klein, Duffie 1982
 */
export function splitRadiation(global: number, extraterrestrialNormal: number, sineOfAltitude: number): BeamAndDiffuse {
  const horizontal = extraterrestrialNormal * Math.max(0.065, sineOfAltitude);
  const clearness = horizontal > 0 ? Math.min(1, Math.max(0, global / horizontal)) : 0;
  const up = sineOfAltitude > 0;
  const diffuse = up ? global * erbsDiffuseFraction(clearness) : global;
  const beam = global - diffuse;
  return { clearness, diffuse, beam, directNormal: up && sineOfAltitude > 0 ? beam / sineOfAltitude : 0 };
}
