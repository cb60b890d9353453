import { and, eq, inArray, isNull } from 'drizzle-orm';
import type Stripe from 'stripe';
import { formatDay } from '#domain/numbers/format';
import { GRACE_DAYS } from '#domain/access/access-of';
import type { App } from '#server/app';
import { reminders, stripeCustomers, stripeEvents, subscriptions, users } from '#server/db/schema/index';
import { syncCustomer } from './sync.ts';

/** The customer that an event is about, if it is about one. */
function customerOf(event: Stripe.Event): string | null {
  const object = event.data.object as {
    object?: string;
    id?: string;
    customer?: string | { id: string } | null;
  };
  if (object.object === 'customer') return object.id ?? null;
  return typeof object.customer === 'string' ? object.customer : (object.customer?.id ?? null);
}

/** Stores a verified event once and enqueues its work in the same transaction. A second delivery changes nothing. */
export async function receiveEvent(app: App, event: Stripe.Event): Promise<void> {
  const object = event.data.object as { id?: string };
  await app.transaction(async (tx, enqueue) => {
    const fresh = await tx
      .insert(stripeEvents)
      .values({
        id: event.id,
        type: event.type,
        objectId: object.id ?? '',
        customerId: customerOf(event),
        receivedAt: app.clock.now(),
      })
      .onConflictDoNothing()
      .returning({ id: stripeEvents.id });
    if (fresh.length > 0) await enqueue('payment-event', { eventId: event.id });
  });
}

const day = (date: Date, timeZone: string) => formatDay(date, timeZone);

/** Tells the member about a failed payment or an ended plan, once for each occasion. */
async function tell(app: App, event: { type: string; objectId: string }, customerId: string): Promise<void> {
  const letter =
    event.type === 'invoice.payment_failed'
      ? 'payment-failed'
      : event.type === 'customer.subscription.deleted'
        ? 'cancelled'
        : null;
  if (!letter) return;
  const [row] = await app.db
    .select({
      userId: users.id,
      timeZone: users.timeZone,
      until: subscriptions.pastDueSince,
      ended: subscriptions.endedAt,
    })
    .from(stripeCustomers)
    .innerJoin(users, eq(users.id, stripeCustomers.memberId))
    .innerJoin(subscriptions, eq(subscriptions.memberId, users.id))
    .where(eq(stripeCustomers.customerId, customerId))
    .orderBy(subscriptions.startedAt);
  if (!row) return;
  const now = app.clock.now();
  const until =
    letter === 'cancelled'
      ? (row.ended ?? now)
      : new Date((row.until ?? now).getTime() + GRACE_DAYS * 86_400_000);
  await app.transaction(async (tx, enqueue) => {
    const fresh = await tx
      .insert(reminders)
      .values({ userId: row.userId, about: `${letter}:${event.objectId}`, sentAt: now })
      .onConflictDoNothing()
      .returning({ about: reminders.about });
    if (fresh.length > 0)
      await enqueue('mail', { letter, userId: row.userId, data: { until: day(until, row.timeZone) } });
  });
}

/**
 * Job: reads the event's customer anew, writes the mirror, tells the member. Everything that has come about that customer by
 * then is settled with it, so a burst of events is one reading. May run twice.
 */
export async function applyPaymentEvent(app: App, eventId: string): Promise<void> {
  const [event] = await app.db.select().from(stripeEvents).where(eq(stripeEvents.id, eventId));
  if (!event || event.appliedAt) return;
  const { customerId } = event;
  const pending = customerId
    ? await app.db
        .select()
        .from(stripeEvents)
        .where(and(eq(stripeEvents.customerId, customerId), isNull(stripeEvents.appliedAt)))
    : [event];
  if (customerId) {
    await syncCustomer(app, customerId);
    for (const one of pending) await tell(app, one, customerId);
  }
  await app.db
    .update(stripeEvents)
    .set({ appliedAt: app.clock.now() })
    .where(
      inArray(
        stripeEvents.id,
        pending.map(({ id }) => id),
      ),
    );
}
