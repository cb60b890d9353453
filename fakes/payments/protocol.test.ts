import { HttpResponse, http } from 'msw';
import { setupServer } from 'msw/node';
import Stripe from 'stripe';
import { expect, onTestFinished, test } from 'vitest';
import { createMemoryStore } from '../core/memory-store.ts';
import { mswHandlers } from '../core/msw.ts';
import { createPayments } from './index.ts';
import { join, openKit, openShop, repeatableRandom, sdkFor, SECRET, START } from './test-kit.ts';

async function setUp(answer?: Parameters<typeof openKit>[0]) {
  const kit = await openKit(answer);
  onTestFinished(kit.close);
  return kit;
}

test('the same handler answers the SDK through msw, where every other request fails', async () => {
  const origin = 'http://127.0.0.1:1';
  const now = () => new Date(START * 1000);
  const payments = createPayments({
    store: createMemoryStore(),
    webhookUrl: 'http://product.test/api/webhooks/stripe',
    webhookSecret: SECRET,
    origin,
    now,
    random: repeatableRandom(),
  });
  const heard: string[] = [];
  const server = setupServer(
    ...mswHandlers(payments.handler, origin),
    http.post('http://product.test/api/webhooks/stripe', async ({ request }) => {
      const signature = request.headers.get('stripe-signature') ?? '';
      const event = stripe.webhooks.constructEvent(
        await request.text(),
        signature,
        SECRET,
        300,
        undefined,
        START * 1000,
      );
      heard.push(event.type);
      return HttpResponse.json({});
    }),
  );
  server.listen({ onUnhandledRequest: 'error' });
  onTestFinished(() => server.close());
  onTestFinished(payments.close);
  const stripe = sdkFor(origin);
  const made = await stripe.customers.create({ email: 'msw@example.test', metadata: { member: 'one' } });
  expect(await stripe.customers.retrieve(made.id)).toMatchObject({
    email: 'msw@example.test',
    metadata: { member: 'one' },
  });
  await payments.idle();
  expect(heard).toEqual(['customer.created']);
  await expect(fetch('http://127.0.0.1:2/')).rejects.toThrow();
});

test('unknown, missing and ill-formed parameters are refused by name, in the shape of the SDK', async () => {
  const kit = await setUp();
  const { price } = await openShop(kit);
  const raw = (path: string, body: string) =>
    fetch(`${kit.origin}${path}`, {
      method: 'POST',
      headers: { authorization: 'Bearer sk_test', 'content-type': 'application/x-www-form-urlencoded' },
      body,
    });
  const faultOf = async (path: string, body: string) => {
    const reply = await raw(path, body);
    const { error } = (await reply.json()) as { error: { code: string; param: string } };
    return [reply.status, error.code, error.param];
  };
  expect(await faultOf('/v1/customers', 'emial=a@b.test')).toEqual([400, 'parameter_unknown', 'emial']);
  expect(
    await faultOf(
      '/v1/checkout/sessions',
      `mode=subscription&line_items[0][price]=${price.id}&line_items[0][colour]=red&success_url=http://a.test`,
    ),
  ).toEqual([400, 'parameter_unknown', 'line_items[0][colour]']);
  expect(await faultOf('/v1/prices', 'currency=eur&product=x')).toEqual([
    400,
    'parameter_missing',
    'unit_amount',
  ]);
  expect(await faultOf('/v1/prices', 'currency=eur&unit_amount=3.5')).toEqual([
    400,
    'parameter_invalid',
    'unit_amount',
  ]);
  await expect(kit.stripe.customers.retrieve('cus_none')).rejects.toMatchObject({
    type: 'StripeInvalidRequestError',
    code: 'resource_missing',
    statusCode: 404,
  });
  expect((await fetch(`${kit.origin}/v1/customers`)).status).toBe(401);
  expect((await fetch(`${kit.origin}/v1/nothing`, { headers: { authorization: 'Bearer x' } })).status).toBe(
    404,
  );
});

test('one key, one effect: the same request is answered again, another one refused', async () => {
  const kit = await setUp();
  const key = { idempotencyKey: 'customer-1' };
  const [one, two] = await Promise.all([
    kit.stripe.customers.create({ email: 'once@example.test' }, key),
    kit.stripe.customers.create({ email: 'once@example.test' }, key),
  ]);
  expect(two.id).toBe(one.id);
  expect((await kit.stripe.customers.list()).data).toHaveLength(1);
  await expect(kit.stripe.customers.create({ email: 'other@example.test' }, key)).rejects.toMatchObject({
    type: 'StripeIdempotencyError',
  });
  const bad = { idempotencyKey: 'price-1' };
  const asked = { currency: 'eur', unit_amount: 100, product: 'prod_none' };
  await expect(kit.stripe.prices.create(asked, bad)).rejects.toMatchObject({ code: 'resource_missing' });
  await kit.stripe.products.create({ id: 'prod_none', name: 'Late' });
  await expect(kit.stripe.prices.create(asked, bad)).rejects.toMatchObject({ code: 'resource_missing' });
});

test('lists are paged to their end by the SDK itself, newest first', async () => {
  const kit = await setUp();
  for (let n = 0; n < 25; n += 1) await kit.stripe.customers.create({ email: `m${n}@example.test` });
  const emails: (string | null)[] = [];
  for await (const { email } of kit.stripe.customers.list({ limit: 10 })) emails.push(email);
  expect(emails).toEqual(Array.from({ length: 25 }, (_, n) => `m${24 - n}@example.test`));
});

test('expanding reaches through lists and refuses what is not there', async () => {
  const kit = await setUp();
  const shop = await openShop(kit);
  const { id } = await join(kit, shop, '4242424242424242');
  const read = await kit.stripe.subscriptions.retrieve(id, {
    expand: ['items.data.price.product', 'customer'],
  });
  expect(read.items.data[0]?.price.product).toMatchObject({ name: 'Flight with a coach' });
  const { data } = await kit.stripe.subscriptions.list({ expand: ['data.latest_invoice'] });
  expect(data[0]?.latest_invoice).toMatchObject({ object: 'invoice', status: 'paid' });
  await expect(kit.stripe.subscriptions.retrieve(id, { expand: ['colour'] })).rejects.toMatchObject({
    statusCode: 400,
  });
});

test('events are signed so that the SDK accepts them, and changed or old ones it does not', async () => {
  const kit = await setUp();
  await kit.stripe.customers.create({ email: 'signed@example.test' });
  await kit.payments.idle();
  const [sent] = kit.sent;
  if (!sent) throw new Error('nothing was sent');
  const check = (body: string, atSeconds: number) =>
    kit.stripe.webhooks.constructEvent(body, sent.signature, SECRET, 300, undefined, atSeconds * 1000);
  expect(check(sent.body, START + 10)).toMatchObject({
    type: 'customer.created',
    api_version: '2026-10-28.endive',
  });
  expect(() => check(sent.body.replace('signed', 'forged'), START)).toThrow(
    Stripe.errors.StripeSignatureVerificationError,
  );
  expect(() => check(sent.body, START + 400)).toThrow(/timestamp/i);
  const event = await kit.stripe.events.retrieve(sent.event.id);
  expect(event.data.object).toMatchObject({ email: 'signed@example.test' });
  const listed = await kit.stripe.events.list({ types: ['customer.*'] });
  expect(listed.data.map(({ id }) => id)).toEqual([sent.event.id]);
});

test('a delivery that is not answered well is tried again, later and later', async () => {
  const answers = [500, 503, 200];
  const kit = await setUp(() => answers.shift() ?? 200);
  await kit.stripe.customers.create({ email: 'later@example.test' });
  await kit.payments.idle();
  expect(kit.sent).toHaveLength(1);
  kit.time.now = new Date((START + 1) * 1000);
  await kit.payments.idle();
  expect(kit.sent).toHaveLength(2);
  kit.time.now = new Date((START + 2) * 1000);
  await kit.payments.idle();
  expect(kit.sent).toHaveLength(2);
  kit.time.now = new Date((START + 3) * 1000);
  await kit.payments.idle();
  expect(kit.sent.map(({ event }) => event.id)).toEqual(Array(3).fill(kit.sent[0]?.event.id));
  expect((await kit.get('/')).text).toContain('500, 503, 200');
});

test('the chaos switch doubles, shuffles and drops', async () => {
  const kit = await setUp();
  const chaos = (wish: object) =>
    fetch(`${kit.origin}/_fake/chaos`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(wish),
    });
  await chaos({ duplicate: true });
  await kit.stripe.customers.create({ email: 'twice@example.test' });
  await kit.payments.idle();
  expect(kit.types()).toEqual(['customer.created', 'customer.created']);

  await chaos({ drop: 1 });
  await kit.stripe.customers.create({ email: 'lost@example.test' });
  await kit.payments.idle();
  expect(kit.sent).toHaveLength(2);
  expect((await kit.stripe.events.list()).data).toHaveLength(2);

  await chaos({ shuffle: true });
  const shop = await openShop(kit);
  await join(kit, shop, '4242424242424242');
  await shop.moveTo(START + 40 * 86_400);
  await kit.payments.idle();
  const posted = kit.sent.slice(2).map(({ event }) => event.id);
  const written = (await kit.stripe.events.list({ limit: 100 })).data.map(({ id }) => id).reverse();
  const inOrder = written.filter((id) => posted.includes(id));
  expect(new Set(posted)).toEqual(new Set(inOrder));
  expect(posted).not.toEqual(inOrder);
  expect((await chaos({ drop: 3 })).status).toBe(400);
});
