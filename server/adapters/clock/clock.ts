/** The one place that tells the time. Production: the system's. Demonstration: a June morning that runs on. */
export interface Clock {
  readonly isDemonstration: boolean;
  now(): Date;
}

export const systemClock: Clock = { isDemonstration: false, now: () => new Date() };
