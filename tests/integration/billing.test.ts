import { eq } from 'drizzle-orm';
import type { APIContext } from 'astro';
import Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { applyPaymentEvent, receiveEvent } from '#server/billing/apply-event';
import { ensureCustomer, openCheckout, setCancelling } from '#server/billing/checkout';
import { syncCustomer } from '#server/billing/sync';
import { invoices, practice, stripeEvents, subscriptions } from '#server/db/schema/index';
import { memberState } from '#server/services/members';
import { answerReadiness } from '#server/services/readiness';
import { addPlanOnSale, CLEAR, codeOf, lettersTo, payAt, queued } from '#support/joining';
import { addPerson } from '#support/people';
import { useApp, WEBHOOK_SECRET } from '#support/test-app';
import { POST } from '../../src/pages/api/webhooks/stripe.ts';

const CARD = { succeeds: '4242424242424242', declined: '4000000000000002', failsLater: '4000000000000341' };
const world = useApp();

/** The webhook's own route, on the raw body, as the front hands it over. */
async function post(payload: string, signature: string): Promise<Response> {
  const request = new Request('http://localhost:4321/api/webhooks/stripe', {
    method: 'POST',
    headers: { 'stripe-signature': signature },
    body: payload,
  });
  return POST({ request, locals: { app: world.app } } as unknown as APIContext) as Promise<Response>;
}
const sign = (payload: string, secret = WEBHOOK_SECRET, timestamp = Math.floor(Date.now() / 1000)) =>
  Stripe.webhooks.generateTestHeaderString({ payload, secret, timestamp });

/** Every event about a customer, oldest first. */
async function eventsOf(customer: string): Promise<Stripe.Event[]> {
  const all = await world.app.stripe.events.list({ limit: 100 }).autoPagingToArray({ limit: 1000 });
  return all.reverse().filter(({ data }) => JSON.stringify(data.object).includes(customer));
}

/** A visitor with answers, a customer on a clock of their own, and an open checkout. */
async function startJoin(trialDays = 0) {
  const { app } = world;
  const visitor = await addPerson(app, 'visitor');
  await answerReadiness(app, visitor, { once: app.random.uuid(), answers: CLEAR });
  const clock = await app.stripe.testHelpers.testClocks.create({
    frozen_time: Math.floor(app.clock.now().getTime() / 1000),
  });
  await app.db
    .insert(practice)
    .values({ id: 1, name: 'Newel', testClockId: clock.id })
    .onConflictDoUpdate({ target: practice.id, set: { testClockId: clock.id } });
  const plan = await addPlanOnSale(app, trialDays);
  const address = await openCheckout(app, visitor, plan.id);
  const customer = await ensureCustomer(app, visitor);
  const moveDays = async (days: number) => {
    world.clock.moveDays(days);
    const frozen_time = Math.floor(app.clock.now().getTime() / 1000);
    await app.stripe.testHelpers.testClocks.advance(clock.id, { frozen_time });
  };
  return { visitor, plan, address, customer, moveDays };
}

const mirror = async (memberId: string) => {
  const [subscription] = await world.app.db
    .select()
    .from(subscriptions)
    .where(eq(subscriptions.memberId, memberId));
  const list = await world.app.db
    .select()
    .from(invoices)
    .where(eq(invoices.memberId, memberId))
    .orderBy(invoices.issuedAt, invoices.id);
  return { subscription: subscription, list };
};

/** Delivers and works through events, some twice. */
async function deliver(events: readonly Stripe.Event[]): Promise<void> {
  for (const event of events) {
    const payload = JSON.stringify(event);
    expect((await post(payload, sign(payload))).status).toBe(200);
    await applyPaymentEvent(world.app, event.id);
  }
}

describe('the webhook', () => {
  it('refuses a bad signature, a changed body and an old one with 400, and stores nothing', async () => {
    const { customer } = await startJoin();
    const [event] = await eventsOf(customer);
    const payload = JSON.stringify(event);
    const old = Math.floor(Date.now() / 1000) - 400;
    for (const [body, header] of [
      [payload, sign(payload, 'whsec_of_somebody_else')],
      [payload.replace('"id"', '"Id"'), sign(payload)],
      [payload, sign(payload, WEBHOOK_SECRET, old)],
      [payload, ''],
    ] as const) {
      await expect(post(body, header)).rejects.toMatchObject({ name: 'AppError', status: 400 });
    }
    expect(await world.app.db.$count(stripeEvents, eq(stripeEvents.id, event?.id ?? ''))).toBe(0);
  });

  it('stores each event once and enqueues it once, even when two copies arrive together', async () => {
    const { customer } = await startJoin();
    const [event] = await eventsOf(customer);
    if (!event) throw new Error('the stand-in told of no event');
    await Promise.all([receiveEvent(world.app, event), receiveEvent(world.app, event)]);
    await receiveEvent(world.app, event);
    const jobs = (await queued(world.app, 'payment-event')).filter(({ eventId }) => eventId === event.id);
    expect(jobs).toHaveLength(1);
  });

  it('ends in the provider’s own state whatever the order, with every event twice', async () => {
    const { app } = world;
    const { visitor, address, customer, moveDays } = await startJoin();
    await payAt(address, CARD.succeeds);
    await moveDays(32);
    const events = await eventsOf(customer);
    expect(events.length).toBeGreaterThan(8);
    const shuffled = [...events, ...events]
      .map((event, index) => ({ event, key: (index * 7919) % 101 }))
      .sort((a, b) => a.key - b.key)
      .map(({ event }) => event);
    await deliver(shuffled);
    const byEvents = await mirror(visitor.id);
    await syncCustomer(app, customer);
    expect(byEvents).toEqual(await mirror(visitor.id));

    const { data: real } = await app.stripe.subscriptions.list({ customer, status: 'all' });
    const item = real[0]?.items.data[0];
    expect(byEvents.subscription).toMatchObject({ id: real[0]?.id, status: 'active' });
    expect(byEvents.subscription?.currentPeriodEnd).toEqual(new Date((item?.current_period_end ?? 0) * 1000));
    expect(byEvents.list.map(({ status, paidMinor }) => [status, paidMinor])).toEqual([
      ['paid', 3900],
      ['paid', 3900],
    ]);
    expect(await lettersTo(app, visitor.id)).toEqual(['welcome']);
    expect((await memberState(app, visitor.id))?.access).toMatchObject({ state: 'active', mayTrain: true });
  });
});

describe('a plan', () => {
  it('is not given by a card that is declined, and never sold twice', async () => {
    const { app } = world;
    const { visitor, plan, address, customer } = await startJoin();
    await payAt(address, CARD.declined);
    await deliver(await eventsOf(customer));
    expect((await memberState(app, visitor.id))?.access.mayRead).toBe(false);
    await payAt(address, CARD.succeeds);
    await deliver(await eventsOf(customer));
    expect((await memberState(app, visitor.id))?.access.mayTrain).toBe(true);
    expect(await codeOf(openCheckout(app, visitor, plan.id))).toBe('conflict');
  });

  it('outlives a failed card by the seven days of grace, writes once, and opens again when paid', async () => {
    const { app } = world;
    const { visitor, address, customer, moveDays } = await startJoin();
    await payAt(address, CARD.failsLater);
    await deliver(await eventsOf(customer));
    await moveDays(31);
    const told = await eventsOf(customer);
    await deliver([...told, ...told]);
    const access = async () => (await memberState(app, visitor.id))?.access;
    expect(await access()).toMatchObject({ state: 'past-due', mayRead: true, mayTrain: true });
    world.clock.moveDays(8);
    expect(await access()).toMatchObject({ state: 'lapsed', mayRead: false, mayTrain: false });
    expect((await lettersTo(app, visitor.id)).filter((letter) => letter === 'payment-failed')).toHaveLength(
      1,
    );

    const [open] = (await app.stripe.invoices.list({ customer, status: 'open' })).data;
    const good = await app.stripe.paymentMethods.attach('pm_card_visa', { customer });
    await app.stripe.invoices.pay(open?.id ?? '', { payment_method: good.id });
    await deliver(await eventsOf(customer));
    expect(await access()).toMatchObject({ state: 'active', mayRead: true });
  });

  it('is open in a trial without a charge, and has none the second time', async () => {
    const { app } = world;
    const { visitor, plan, address, customer, moveDays } = await startJoin(14);
    await payAt(address, CARD.succeeds);
    await deliver(await eventsOf(customer));
    const { subscription, list } = await mirror(visitor.id);
    expect(subscription?.status).toBe('trialing');
    expect(list.reduce((sum, invoice) => sum + invoice.paidMinor, 0)).toBe(0);
    await app.stripe.subscriptions.cancel(subscription?.id ?? '');
    await deliver(await eventsOf(customer));
    expect((await lettersTo(app, visitor.id)).at(-1)).toBe('cancelled');
    await moveDays(1);
    await payAt(await openCheckout(app, visitor, plan.id), CARD.succeeds);
    await deliver(await eventsOf(customer));
    expect((await memberState(app, visitor.id))?.subscription).toMatchObject({
      status: 'active',
      trialEnd: null,
    });
  });

  it('that is cancelled runs to its paid end, can be kept after all, and then ends', async () => {
    const { app } = world;
    const { visitor, address, customer, moveDays } = await startJoin();
    await payAt(address, CARD.succeeds);
    await deliver(await eventsOf(customer));
    const access = async () => (await memberState(app, visitor.id))?.access;
    await setCancelling(app, visitor, true);
    expect(await access()).toMatchObject({ state: 'cancelling', mayTrain: true });
    await setCancelling(app, visitor, false);
    expect(await access()).toMatchObject({ state: 'active' });
    await setCancelling(app, visitor, true);
    await moveDays(31);
    await deliver(await eventsOf(customer));
    expect(await access()).toMatchObject({ state: 'cancelled', mayRead: false });
    expect((await lettersTo(app, visitor.id)).filter((letter) => letter === 'cancelled')).toHaveLength(1);
    expect(await codeOf(setCancelling(app, visitor, false))).toBe('conflict');
  });
});
