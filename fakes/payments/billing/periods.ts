import type { PriceDoc } from '../docs.ts';

export const DAY_SECONDS = 86_400;
const MONTHS: Record<string, number> = { month: 1, year: 12 };
const DAYS: Record<string, number> = { day: 1, week: 7 };

/** `n` months after a moment; the 31st becomes the last day of a shorter month. Seconds since 1970, UTC. */
export function addMonths(from: number, n: number): number {
  const date = new Date(from * 1000);
  const first = new Date(Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + n, 1));
  const days = new Date(Date.UTC(first.getUTCFullYear(), first.getUTCMonth() + 1, 0)).getUTCDate();
  const timeOfDay = from % DAY_SECONDS;
  return first.getTime() / 1000 + (Math.min(date.getUTCDate(), days) - 1) * DAY_SECONDS + timeOfDay;
}

/** The first end of a period after `start`, counted in whole periods from the anchor, so that days do not drift. */
export function periodEnd(anchor: number, start: number, price: PriceDoc): number {
  const interval = price.recurring?.interval ?? 'month';
  const count = price.recurring?.interval_count ?? 1;
  const days = DAYS[interval];
  const step = (n: number) =>
    days === undefined
      ? addMonths(anchor, n * count * (MONTHS[interval] ?? 1))
      : anchor + n * count * days * DAY_SECONDS;
  let n = anchor > start ? 0 : 1;
  while (step(n) <= start) n += 1;
  return step(n);
}

/** Whether two prices come due in the same rhythm. */
export const sameRhythm = (one: PriceDoc, other: PriceDoc) =>
  one.recurring?.interval === other.recurring?.interval &&
  one.recurring?.interval_count === other.recurring?.interval_count;

/** `month`, `3 months`: how often a price comes due. */
export function rhythmOf(price: PriceDoc): string {
  const { interval = 'month', interval_count: count = 1 } = price.recurring ?? {};
  return count === 1 ? interval : `${count} ${interval}s`;
}
