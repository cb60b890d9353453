import { RateLimiterMemory } from 'rate-limiter-flexible';
import { AppError } from '#server/errors';

/** How often, per address, network or person. Counted in this process (see docs/decisions.md). */
const LIMITS = {
  'sign-in-address': { points: 5, duration: 3600 },
  'sign-in-network': { points: 20, duration: 3600 },
  'confirm-network': { points: 60, duration: 3600 },
  upload: { points: 30, duration: 3600 },
} as const;

export type LimitName = keyof typeof LIMITS;

export interface Limits {
  /** Takes one turn. Answers false when none is left. */
  take(name: LimitName, key: string): Promise<boolean>;
}

export function createLimits(): Limits {
  const limiters = new Map(
    Object.entries(LIMITS).map(([name, options]) => [
      name,
      new RateLimiterMemory({ keyPrefix: name, ...options }),
    ]),
  );
  return {
    async take(name, key) {
      try {
        await limiters.get(name)?.consume(key);
        return true;
      } catch (refusal) {
        if (refusal instanceof Error) throw refusal;
        return false;
      }
    },
  };
}

/** @throws AppError too-many when no turn is left */
export async function takeOrRefuse(limits: Limits, name: LimitName, key: string): Promise<void> {
  if (!(await limits.take(name, key))) {
    throw new AppError('too-many', 'That was often enough for now. Try again in an hour.');
  }
}
