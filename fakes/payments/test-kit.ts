import Stripe from 'stripe';
import { createMemoryStore } from '../core/memory-store.ts';
import { serveHttp } from '../core/serve-http.ts';
import type { Deliver } from './deliveries.ts';
import { createPayments } from './index.ts';
import { API_VERSION } from './ledger.ts';

export const SECRET = 'whsec_of_the_tests';
export const DAY = 86_400;
/** 1 Dec 2026, 12:00 UTC */
export const START = Date.UTC(2026, 11, 1, 12) / 1000;

/** Chance that repeats itself: the minimal standard generator of Park and Miller. */
export function repeatableRandom(): () => number {
  let state = 20_261_201;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}

export const sdkFor = (origin: string) => {
  const { hostname, port } = new URL(origin);
  return new Stripe('sk_test_tests', {
    apiVersion: API_VERSION,
    host: hostname,
    port: Number(port),
    protocol: 'http',
    telemetry: false,
    maxNetworkRetries: 0,
  });
};

interface Sent {
  body: string;
  signature: string;
  event: Stripe.Event;
}

/** A stand-in on a real socket with an empty store, the real SDK, and a product that notes every event. */
export async function openKit(answer: (sent: Sent) => number = () => 200) {
  const store = createMemoryStore();
  const sent: Sent[] = [];
  const time = { now: new Date(START * 1000) };
  const deliver: Deliver = async (_url, body, headers) => {
    const one = {
      body,
      signature: headers['stripe-signature'] ?? '',
      event: JSON.parse(body) as Stripe.Event,
    };
    sent.push(one);
    return { status: answer(one) };
  };
  const door: { handler: (request: Request) => Promise<Response> } = {
    handler: async () => new Response(null, { status: 503 }),
  };
  const served = await serveHttp((request) => door.handler(request), 0);
  const payments = createPayments({
    store,
    webhookUrl: 'http://product.test/api/webhooks/stripe',
    webhookSecret: SECRET,
    origin: served.origin,
    now: () => time.now,
    random: repeatableRandom(),
    deliver,
  });
  door.handler = payments.handler;
  const stripe = sdkFor(served.origin);
  const types = () => sent.map(({ event }) => event.type);

  const post = (path: string, fields: Record<string, string>) =>
    fetch(new URL(path, served.origin), {
      method: 'POST',
      body: new URLSearchParams(fields),
      redirect: 'manual',
    });
  const get = async (path: string) => {
    const reply = await fetch(new URL(path, served.origin), { redirect: 'manual' });
    return { status: reply.status, text: await reply.text(), location: reply.headers.get('location') };
  };

  return {
    store,
    payments,
    stripe,
    origin: served.origin,
    sent,
    types,
    time,
    post,
    get,
    close: async () => {
      await payments.close();
      await served.close();
    },
  };
}

export type Kit = Awaited<ReturnType<typeof openKit>>;

/** A monthly price of €39.00 and a customer on a clock of their own. */
export async function openShop({ stripe }: Kit) {
  const clock = await stripe.testHelpers.testClocks.create({ frozen_time: START, name: 'of the tests' });
  const product = await stripe.products.create({ name: 'Flight with a coach' });
  const price = await stripe.prices.create({
    product: product.id,
    currency: 'eur',
    unit_amount: 3900,
    recurring: { interval: 'month' },
  });
  const customer = await stripe.customers.create({ email: 'edda@example.test', test_clock: clock.id });
  const moveTo = (moment: number) => stripe.testHelpers.testClocks.advance(clock.id, { frozen_time: moment });
  return { clock, product, price, customer, moveTo };
}

type Shop = Awaited<ReturnType<typeof openShop>>;

/** Opens a checkout for the shop's customer and price. */
export function openSession({ stripe }: Kit, { customer, price }: Shop, trialDays?: number) {
  return stripe.checkout.sessions.create({
    mode: 'subscription',
    customer: customer.id,
    client_reference_id: 'member-1',
    line_items: [{ price: price.id, quantity: 1 }],
    success_url: 'http://product.test/join/payment?session={CHECKOUT_SESSION_ID}',
    cancel_url: 'http://product.test/join/plan',
    ...(trialDays && { subscription_data: { trial_period_days: trialDays, metadata: { plan: 'month' } } }),
  });
}

/** Joins with a card at the checkout page and gives the subscription back. */
export async function join(
  kit: Kit,
  shop: Shop,
  card: string,
  trialDays?: number,
): Promise<Stripe.Subscription> {
  const session = await openSession(kit, shop, trialDays);
  await kit.post(`/pay/${session.id}`, { number: card });
  const done = await kit.stripe.checkout.sessions.retrieve(session.id, { expand: ['subscription'] });
  if (typeof done.subscription !== 'object' || done.subscription === null) throw new Error('nobody joined');
  return done.subscription;
}
