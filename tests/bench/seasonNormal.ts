/** Share of a standard normal variable below a value. Abramowitz and Stegun 1964, 26.2.17, error under 7.5e-8. */
export function normalCdf(value: number): number {
  const t = 1 / (1 + 0.2316419 * Math.abs(value));
  const tail = Math.exp((-value * value) / 2) / Math.sqrt(2 * Math.PI)
    * t * (0.31938153 + t * (-0.356563782 + t * (1.781477937 + t * (-1.821255978 + t * 1.330274429))));
  return value >= 0 ? 1 - tail : tail;
}

/** Value below which a share of a standard normal variable lies, by bisection of `normalCdf`, within ±8. @param share - 0 to 1 */
export function normalQuantile(share: number): number {
  let low = -8;
  let high = 8;
  for (let step = 0; step < 44; step += 1) {
    const middle = (low + high) / 2;
    if (normalCdf(middle) < share) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
