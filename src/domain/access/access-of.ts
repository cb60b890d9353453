import { formatDay } from '../numbers/format.ts';

/** Days of access after a payment failed: the practice's own rule, so that an expired card ends nobody's week. */
export const GRACE_DAYS = 7;

const DAY_MS = 86_400_000;

/** The payment provider's words for a subscription's state. */
export type SubscriptionStatus =
  'incomplete' | 'incomplete_expired' | 'trialing' | 'active' | 'past_due' | 'canceled' | 'unpaid' | 'paused';

/** The mirrored subscription, as far as access depends on it. */
export interface PaidPeriod {
  readonly status: SubscriptionStatus;
  readonly currentPeriodEnd: Date;
  readonly trialEnd: Date | null;
  readonly cancelAtPeriodEnd: boolean;
  readonly endedAt: Date | null;
  /** When the first payment of the present period failed. */
  readonly pastDueSince: Date | null;
}

export type AccessState = 'none' | 'trial' | 'active' | 'cancelling' | 'past-due' | 'lapsed' | 'cancelled';

export interface Access {
  readonly state: AccessState;
  readonly held: boolean;
  /** The moment access ends if nothing more is paid, or the moment it ended; null when none is known. */
  readonly until: Date | null;
  /** Lessons, plan, marks, thread. A person's own records can always be taken home, whatever this says. */
  readonly mayRead: boolean;
  /** Sessions and test days. */
  readonly mayTrain: boolean;
  readonly sentence: string;
}

export interface AccessInput {
  readonly subscription: PaidPeriod | null;
  readonly held: boolean;
  readonly now: Date;
  /** Where dates in the sentence are read; UTC when left out. */
  readonly timeZone?: string;
}

interface Standing {
  readonly state: AccessState;
  readonly until: Date | null;
}

const none: Standing = { state: 'none', until: null };

const openUntil = (until: Date, now: Date, open: AccessState, after: AccessState): Standing =>
  now < until ? { state: open, until } : { state: after, until };

const afterGrace = (since: Date): Date => new Date(since.getTime() + GRACE_DAYS * DAY_MS);

/** An active or trial period. Past its end without news, the renewal counts as failed at that moment: grace, then lapsed. */
function runningStanding(paid: PaidPeriod, now: Date, open: 'active' | 'trial'): Standing {
  const until = open === 'trial' ? (paid.trialEnd ?? paid.currentPeriodEnd) : paid.currentPeriodEnd;
  if (paid.cancelAtPeriodEnd) return openUntil(until, now, 'cancelling', 'cancelled');
  return now < until ? { state: open, until } : openUntil(afterGrace(until), now, 'past-due', 'lapsed');
}

function standingOf(paid: PaidPeriod, now: Date): Standing {
  switch (paid.status) {
    case 'incomplete':
    case 'incomplete_expired':
      return none;
    case 'trialing':
      return runningStanding(paid, now, 'trial');
    case 'active':
      return runningStanding(paid, now, 'active');
    case 'past_due': {
      const until = paid.pastDueSince === null ? paid.currentPeriodEnd : afterGrace(paid.pastDueSince);
      return openUntil(until, now, 'past-due', 'lapsed');
    }
    case 'unpaid':
    case 'paused':
      return { state: 'lapsed', until: null };
    case 'canceled':
      return paid.endedAt === null
        ? { state: 'cancelled', until: null }
        : openUntil(paid.endedAt, now, 'cancelling', 'cancelled');
  }
}

const OPEN_STATES: readonly AccessState[] = ['trial', 'active', 'cancelling', 'past-due'];

function sentenceOf({ state, until }: Standing, held: boolean, timeZone: string): string {
  const day = until === null ? '' : formatDay(until, timeZone);
  if (held && state === 'none')
    return 'Your plan is held until a doctor has cleared you. Nothing is charged while it is held.';
  const heldToo = held
    ? ' Your plan is held: you can read everything, and training waits for clearance.'
    : '';
  switch (state) {
    case 'none':
      return 'No plan yet. Nothing has been charged.';
    case 'trial':
      return `Your trial runs until ${day}.${heldToo}`;
    case 'active':
      return `Your plan is paid until ${day}.${heldToo}`;
    case 'cancelling':
      return `Your plan ends on ${day}. Until then all of it is yours.${heldToo}`;
    case 'past-due':
      return `The last payment did not go through. You keep access until ${day}; a new card puts it right.${heldToo}`;
    case 'lapsed':
      return 'Your plan has stopped because a payment is open. Everything you wrote is kept; a new card opens it again.';
    case 'cancelled':
      return `Your plan has ended${day === '' ? '' : ` on ${day}`}. Everything you wrote is kept and can be taken home.`;
  }
}

/**
 * What a person may do now: a pure function of the mirrored subscription, the hold and the clock. Access ends at the very
 * moment that is paid for, `now < until`; a failed payment adds {@link GRACE_DAYS}. Held people may read and not train.
 */
export function accessOf({ subscription, held, now, timeZone = 'UTC' }: AccessInput): Access {
  const standing = subscription === null ? none : standingOf(subscription, now);
  const isOpen = OPEN_STATES.includes(standing.state);
  return {
    ...standing,
    held,
    mayRead: isOpen,
    mayTrain: isOpen && !held,
    sentence: sentenceOf(standing, held, timeZone),
  };
}
