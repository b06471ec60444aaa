import type { SettableClock } from '@/server/adapters/clock/clock';
import { AppError } from '@/server/errors';

/** A clock that stands until a test moves it. */
export class FixedClock implements SettableClock {
  private held = false;

  constructor(private time: Date, readonly isDemonstration = false) {}

  now(): Date {
    return new Date(this.time);
  }

  /** Puts the clock to an instant, given as a Date or in ISO form. */
  set(instant: Date | string): void {
    this.time = new Date(instant);
  }

  /** Moves the clock on by some minutes [min], which may be fractions. */
  advance(minutes: number): void {
    this.time = new Date(this.time.getTime() + minutes * 60_000);
  }

  standAt(instant: Date | null): void {
    if (instant !== null) {
      this.set(instant);
    }
  }

  setTo(instant: Date): Promise<void> {
    this.set(instant);
    return Promise.resolve();
  }

  beat(): Promise<void> {
    return Promise.resolve();
  }

  async alone<T>(work: () => Promise<T>): Promise<T> {
    if (this.held) {
      throw new AppError('conflict', 'The clock is being moved already. Wait until that has ended.');
    }
    this.held = true;
    try {
      return await work();
    } finally {
      this.held = false;
    }
  }

  isBeingSet(): Promise<boolean> {
    return Promise.resolve(this.held);
  }
}
