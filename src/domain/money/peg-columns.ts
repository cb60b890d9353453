import type { Peg } from '../charts/pegs.ts';

/** One stretch of paying (or trying) of one member, as ISO days. A trial lies at its beginning. */
export interface PaidStretch {
  memberId: string;
  from: string;
  trialUntil: string | null;
  endedOn: string | null;
  /** A payment of the present month is open. */
  failed: boolean;
}

/** The state of one stretch in one month (`2026-11`), null where it does not reach. */
function pegIn(stretch: PaidStretch, month: string, today: string): Peg {
  const { from, trialUntil, endedOn, failed } = stretch;
  const within = (day: string) => day.slice(0, 7);
  const isPresent = month === within(today);
  if (within(from) > month) return null;
  if (endedOn !== null && within(endedOn) === month) return 'left';
  if (endedOn !== null && within(endedOn) < month) return null;
  if (failed && isPresent) return 'failed';
  // A month that ended before the trial did brought no money.
  const tried = trialUntil !== null && (isPresent ? trialUntil >= today : within(trialUntil) > month);
  return tried ? 'trial' : 'coach';
}

/**
 * The ledger's columns: a member each, in the order they came, a peg a month. Who left and came back has one column; the
 * later stretch counts where both touch a month.
 * @param months ISO months, oldest first; the last is the month of `today`
 */
export function pegColumns(
  stretches: readonly PaidStretch[],
  months: readonly string[],
  today: string,
): Peg[][] {
  const byMember = new Map<string, PaidStretch[]>();
  for (const stretch of stretches.toSorted((a, b) => a.from.localeCompare(b.from)))
    byMember.set(stretch.memberId, [...(byMember.get(stretch.memberId) ?? []), stretch]);
  return [...byMember.values()]
    .map((mine) =>
      months.map((month) => mine.reduce<Peg>((peg, stretch) => pegIn(stretch, month, today) ?? peg, null)),
    )
    .filter((column) => column.some((peg) => peg !== null));
}
