/** The one source of 'now'. Injected, so that tests set it and the demo moves it. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };

/** The demo's clock: real time plus an offset that only ever grows. Kept in `practice.clockOffsetSeconds`. */
export class MovingClock implements Clock {
  constructor(private offsetMs: number) {}

  now(): Date {
    return new Date(Date.now() + this.offsetMs);
  }

  /** Moves forward. @throws RangeError when asked to go back */
  advance(seconds: number): void {
    if (!(seconds > 0)) throw new RangeError('the clock only moves forward');
    this.offsetMs += seconds * 1000;
  }

  get offsetSeconds(): number {
    return Math.round(this.offsetMs / 1000);
  }
}

/** Recognises the demo's clock across the two bundles (front and pages), where `instanceof` cannot. */
export const isMovingClock = (clock: Clock): clock is MovingClock => 'advance' in clock;
