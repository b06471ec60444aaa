/** The one place that tells the time. Production: the system's. Demonstration: a June morning that runs on. */
export interface Clock {
  readonly isDemonstration: boolean;
  now(): Date;
}

/** A clock that people may set: the demonstration's, and the one of tests. */
export interface SettableClock extends Clock {
  /** Puts the time of every server on this database to the instant; from there it runs on. */
  setTo(instant: Date): Promise<void>;
  /** Lets the time of this process stand at an instant, for work that lives through the past; null lets it run on. */
  standAt(instant: Date | null): void;
  /** Says that somebody still watches the time, and takes over what another server set it to. */
  beat(): Promise<void>;
  /**
   * Runs work while no other server sets the time.
   * @throws AppError conflict when another is at it already
   */
  alone<T>(work: () => Promise<T>): Promise<T>;
  /** True while some server is inside `alone`: periodic work waits for the next tick then. */
  isBeingSet(): Promise<boolean>;
}

export const systemClock: Clock = { isDemonstration: false, now: () => new Date() };

export function isSettable(clock: Clock): clock is SettableClock {
  return 'setTo' in clock;
}
