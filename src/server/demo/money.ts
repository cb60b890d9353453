import { eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { syncCustomer } from '#server/billing/sync';
import * as schema from '#server/db/schema/index';
import { ensurePrice, type Plan } from '#server/services/plans';
import type { Person } from './cast.ts';

const DAY = 86_400_000;

type NewPlan = Omit<typeof schema.plans.$inferInsert, 'createdAt' | 'position'>;

export const DEMO_PLANS: readonly NewPlan[] = [
  {
    slug: 'lessons-month',
    name: 'Lessons alone',
    summary: 'Every lesson, session and test day; no coach.',
    interval: 'month',
    amountMinor: 1200,
    trialDays: 14,
  },
  {
    slug: 'coach-month',
    name: 'With a coach',
    summary: 'All of it, and a coach who answers within a day.',
    interval: 'month',
    amountMinor: 3800,
    trialDays: 14,
  },
  {
    slug: 'two-month',
    name: 'Two on one mat',
    summary: 'Two people in one house, each with their own plan.',
    interval: 'month',
    amountMinor: 5800,
    trialDays: 0,
  },
  {
    slug: 'coach-year',
    name: 'With a coach, a year at once',
    summary: 'Twelve months for the price of ten.',
    interval: 'year',
    amountMinor: 38_000,
    trialDays: 0,
  },
];

export interface Payer {
  memberId: string;
  person: Person;
  email: string;
  joined: Date;
}

/** Adds months as a calendar does; the 31st becomes a month's last day. */
function addMonths(date: Date, months: number): Date {
  const day = date.getUTCDate();
  const moved = new Date(
    Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + months, 1, date.getUTCHours(), date.getUTCMinutes()),
  );
  const last = new Date(Date.UTC(moved.getUTCFullYear(), moved.getUTCMonth() + 1, 0)).getUTCDate();
  moved.setUTCDate(Math.min(day, last));
  return moved;
}

/** The starts of all periods from joining to now, oldest first. */
function periodStarts(joined: Date, interval: Plan['interval'], now: Date): Date[] {
  const step = interval === 'year' ? 12 : 1;
  const starts: Date[] = [];
  for (let index = 0; ; index += step) {
    const start = addMonths(joined, index);
    if (start > now) return starts;
    starts.push(start);
  }
}

interface Paid extends Payer {
  plan: Plan;
  starts: Date[];
  /** Start of the period that the provider knows. */
  openedAt: Date;
}

/** Invoices of the months before the provider's books begin, straight into the mirror. */
async function writePast(
  app: App,
  { memberId, plan, starts, person }: Paid,
  number: () => string,
): Promise<void> {
  const past = person.arc === 'cancelled' ? starts : starts.slice(0, -1);
  if (past.length === 0) return;
  await app.db.insert(schema.invoices).values(
    past.map((issuedAt, index) => ({
      id: `past_${memberId}_${index}`,
      memberId,
      number: number(),
      status: 'paid' as const,
      amountMinor: plan.amountMinor,
      paidMinor: plan.amountMinor,
      currency: plan.currency,
      issuedAt,
      paidAt: issuedAt,
    })),
  );
}

/** A plan that ended: known to the mirror alone. */
async function writeEnded(app: App, { memberId, plan, starts }: Paid): Promise<void> {
  const last = starts.at(-2) ?? starts.at(-1) ?? new Date(0);
  const endedAt = addMonths(last, 1);
  await app.db.insert(schema.subscriptions).values({
    id: `past_${memberId}`,
    memberId,
    planId: plan.id,
    status: 'canceled',
    startedAt: starts[0] ?? last,
    currentPeriodStart: last,
    currentPeriodEnd: endedAt,
    cancelAtPeriodEnd: true,
    endedAt,
    syncedAt: endedAt,
  });
}

/** Customer, card and running subscription at the provider, as of the practice's test clock. */
async function openSubscription(app: App, clockId: string, paid: Paid): Promise<string> {
  const { person, plan, memberId, email } = paid;
  const customer = await app.stripe.customers.create({
    email,
    name: person.name,
    metadata: { member: memberId },
    test_clock: clockId,
    payment_method: 'pm_card_visa',
    invoice_settings: { default_payment_method: 'pm_card_visa' },
  });
  await app.db
    .insert(schema.stripeCustomers)
    .values({ memberId, customerId: customer.id, createdAt: paid.joined });
  await app.stripe.subscriptions.create({
    customer: customer.id,
    items: [{ price: plan.stripePriceId ?? '' }],
    ...(person.arc === 'trial' || person.arc === 'new' ? { trial_period_days: 14 } : {}),
  });
  if (person.arc === 'card failed') {
    const bad = await app.stripe.paymentMethods.attach('pm_card_chargeCustomerFail', {
      customer: customer.id,
    });
    await app.stripe.customers.update(customer.id, { invoice_settings: { default_payment_method: bad.id } });
  }
  return customer.id;
}

/**
 * The money of the demo: past invoices in the mirror, running subscriptions at the stand-in. Each is opened at the moment
 * its present period began by moving one test clock forward through them in order; the clock ends at the practice's now.
 */
export async function fillMoney(app: App, payers: readonly Payer[]): Promise<void> {
  const now = app.clock.now();
  const plans = new Map<string, Plan>();
  for (const plan of await app.db.select().from(schema.plans))
    plans.set(plan.slug, await ensurePrice(app, plan));
  const paid = payers.map((payer): Paid => {
    const plan = plans.get(payer.person.plan ?? 'coach-month');
    if (!plan) throw new Error('a plan of the cast is missing');
    const starts = periodStarts(payer.joined, plan.interval, now);
    // A failed card: opened a month earlier, so that the renewal some days ago is the one that failed.
    const openedAt =
      payer.person.arc === 'card failed'
        ? new Date(addMonths(now, -1).getTime() - 2 * DAY)
        : (starts.at(-1) ?? payer.joined);
    return { ...payer, plan, starts, openedAt };
  });
  let last = 0;
  const number = () => `SK-0${String(1000 + (last += 1))}`;
  for (const one of paid) await writePast(app, one, number);
  const running = paid
    .filter(({ person }) => person.arc !== 'cancelled')
    .sort((a, b) => a.openedAt.getTime() - b.openedAt.getTime());
  for (const one of paid.filter(({ person }) => person.arc === 'cancelled')) await writeEnded(app, one);
  const seconds = (date: Date) => Math.floor(date.getTime() / 1000);
  const begin = running[0]?.openedAt ?? now;
  const clock = await app.stripe.testHelpers.testClocks.create({ frozen_time: seconds(begin) });
  await app.db.update(schema.practice).set({ testClockId: clock.id }).where(eq(schema.practice.id, 1));
  let at = seconds(begin);
  const customers: string[] = [];
  for (const one of running) {
    if (seconds(one.openedAt) > at) {
      at = seconds(one.openedAt);
      await app.stripe.testHelpers.testClocks.advance(clock.id, { frozen_time: at });
    }
    customers.push(await openSubscription(app, clock.id, one));
  }
  await app.stripe.testHelpers.testClocks.advance(clock.id, { frozen_time: seconds(now) });
  for (const customer of customers) await syncCustomer(app, customer);
}
