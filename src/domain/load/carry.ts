import { neighbours, rungOf, type Kit, type Rung } from '../movement/ladders.ts';
import { LIMITS } from './limits.ts';

/** A rung and the amount of one set on it. */
export interface Place {
  readonly rung: Rung;
  readonly amount: number;
}

/** Effort of one set in units of the ladder's easiest rung. */
export const setCost = ({ rung, amount }: Place): number => rung.costPerUnit * amount;

/** Rounded, so that 12 × 1.4 / 1.4 is 12 and not a hair more. */
const exactAmount = (from: Place, to: Rung): number => Number((setCost(from) / to.costPerUnit).toFixed(9));

/**
 * The next rung down at the same effort or a little less, or null at the foot of the ladder and where one unit of the
 * easier rung would be more.
 */
export function stepDown(from: Place, kit?: ReadonlySet<Kit>): Place | null {
  const { down } = neighbours(from.rung.id, kit);
  if (down === null) return null;
  const amount = Math.floor(exactAmount(from, down));
  return amount < 1 ? null : { rung: down, amount };
}

/**
 * The next rung up at the same effort or a little more, or null at the head of the ladder and where that little is more
 * than {@link LIMITS.rungRisePercent}.
 */
export function stepUp(from: Place, kit?: ReadonlySet<Kit>): Place | null {
  const { up } = neighbours(from.rung.id, kit);
  if (up === null) return null;
  const to = { rung: up, amount: Math.ceil(exactAmount(from, up)) };
  return setCost(to) * 100 > setCost(from) * (100 + LIMITS.rungRisePercent) ? null : to;
}

/** Where a target stands on its ladder. Throws a RangeError for an unknown rung. */
export const placeOfTarget = (target: { readonly rung: string; readonly amount: number }): Place => ({
  rung: rungOf(target.rung),
  amount: target.amount,
});
