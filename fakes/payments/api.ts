import { createHash } from 'node:crypto';
import qs from 'qs';
import type { Doc } from '../core/doc-store.ts';
import { endSubscription, itemOf, liveUntil, periodEnd, type Price, type Subscription } from './billing.ts';
import { ApiError, expand, need, shown, timeOf, type Desk } from './kinds.ts';

type Params = Record<string, unknown>;

interface Call {
  desk: Desk;
  params: Params;
  /** The parts of the path that the route's pattern names. */
  ids: string[];
}

interface Route {
  method: string;
  pattern: RegExp;
  /** Top-level parameters this stand-in understands; any other is refused, so that a typing slip shows. */
  allows: readonly string[];
  run: (call: Call) => Promise<Doc>;
}

const text = (value: unknown): string | undefined =>
  typeof value === 'string' && value !== '' ? value : undefined;
const truth = (value: unknown): boolean => value === 'true';
const whole = (value: unknown, name: string): number => {
  const number = Number(value);
  if (!Number.isInteger(number))
    throw new ApiError(400, `Invalid integer: ${String(value)}`, { param: name });
  return number;
};
const strings = (value: unknown): Record<string, string> =>
  value && typeof value === 'object' ? (value as Record<string, string>) : {};

async function listOf(
  desk: Desk,
  kind: string,
  params: Params,
  keep: (body: Doc) => boolean = () => true,
): Promise<Doc> {
  const all = (await desk.store.list(kind)).filter(keep);
  const after = text(params['starting_after']);
  const from = after ? all.findIndex((body) => body['id'] === after) + 1 : 0;
  const limit = params['limit'] === undefined ? 10 : whole(params['limit'], 'limit');
  return {
    object: 'list',
    url: `/v1/${kind}s`,
    has_more: all.length > from + limit,
    data: all.slice(from, from + limit).map(shown),
  };
}

async function create(desk: Desk, kind: string, body: Doc & { id: string }, event?: string): Promise<Doc> {
  await desk.store.put(kind, body.id, body);
  if (event) await desk.emit(event, body);
  return body;
}

const LIST = ['limit', 'starting_after', 'ending_before', 'created'];
const at = (id: string) => new RegExp(`^/v1/${id}$`);

const ROUTES: readonly Route[] = [
  {
    method: 'POST',
    pattern: at('customers'),
    allows: ['email', 'name', 'metadata', 'test_clock', 'preferred_locales'],
    run: async ({ desk, params }) =>
      create(
        desk,
        'customer',
        {
          id: desk.newId('cus_'),
          object: 'customer',
          created: desk.now(),
          email: text(params['email']) ?? null,
          name: text(params['name']) ?? null,
          metadata: strings(params['metadata']),
          test_clock: text(params['test_clock']) ?? null,
          invoice_settings: { default_payment_method: null },
          livemode: false,
        },
        'customer.created',
      ),
  },
  {
    method: 'GET',
    pattern: at('customers/(cus_\\w+)'),
    allows: [],
    run: ({ desk, ids }) => need(desk, 'customer', ids[0]),
  },
  {
    method: 'DELETE',
    pattern: at('customers/(cus_\\w+)'),
    allows: [],
    run: async ({ desk, ids: [id = ''] }) => {
      await need(desk, 'customer', id);
      const running = (await desk.store.list<Subscription>('subscription')).filter(
        (one) => one.customer === id && one.status !== 'canceled',
      );
      for (const one of running) await endSubscription(desk, one, await timeOf(desk, id));
      await desk.store.remove('customer', id);
      return { id, object: 'customer', deleted: true };
    },
  },
  {
    method: 'POST',
    pattern: at('products'),
    allows: ['name', 'description', 'metadata', 'active'],
    run: async ({ desk, params }) =>
      create(desk, 'product', {
        id: desk.newId('prod_'),
        object: 'product',
        active: true,
        created: desk.now(),
        name: text(params['name']) ?? '',
        description: text(params['description']) ?? null,
        metadata: strings(params['metadata']),
      }),
  },
  {
    method: 'POST',
    pattern: at('products/(prod_\\w+)'),
    allows: ['name', 'description', 'metadata', 'active'],
    run: async ({ desk, params, ids }) => {
      const product = await need<Doc & { id: string }>(desk, 'product', ids[0]);
      return create(desk, 'product', {
        ...product,
        ...(text(params['name']) && { name: params['name'] }),
        ...(params['active'] !== undefined && { active: truth(params['active']) }),
      });
    },
  },
  {
    method: 'POST',
    pattern: at('prices'),
    allows: ['product', 'currency', 'unit_amount', 'recurring', 'metadata', 'nickname'],
    run: async ({ desk, params }) => {
      await need(desk, 'product', params['product']);
      const recurring = strings(params['recurring']);
      return create(desk, 'price', {
        id: desk.newId('price_'),
        object: 'price',
        active: true,
        created: desk.now(),
        type: 'recurring',
        product: params['product'],
        currency: text(params['currency']) ?? 'eur',
        unit_amount: whole(params['unit_amount'], 'unit_amount'),
        recurring: { interval: recurring['interval'] ?? 'month', interval_count: 1, usage_type: 'licensed' },
        metadata: strings(params['metadata']),
      });
    },
  },
  {
    method: 'GET',
    pattern: at('prices'),
    allows: [...LIST, 'product', 'active'],
    run: ({ desk, params }) =>
      listOf(
        desk,
        'price',
        params,
        (price) => !text(params['product']) || price['product'] === params['product'],
      ),
  },
  {
    method: 'GET',
    pattern: at('prices/(price_\\w+)'),
    allows: [],
    run: ({ desk, ids }) => need(desk, 'price', ids[0]),
  },
  {
    method: 'POST',
    pattern: at('prices/(price_\\w+)'),
    allows: ['active', 'metadata', 'nickname'],
    run: async ({ desk, params, ids }) => {
      const price = await need<Doc & { id: string }>(desk, 'price', ids[0]);
      return create(desk, 'price', {
        ...price,
        ...(params['active'] !== undefined && { active: truth(params['active']) }),
      });
    },
  },
  {
    method: 'POST',
    pattern: at('checkout/sessions'),
    allows: [
      'mode',
      'customer',
      'line_items',
      'success_url',
      'cancel_url',
      'client_reference_id',
      'metadata',
      'subscription_data',
      'locale',
      'payment_method_collection',
      'consent_collection',
      'allow_promotion_codes',
    ],
    run: async ({ desk, params }) => {
      await need(desk, 'customer', params['customer']);
      const [line] = (params['line_items'] ?? []) as { price?: string }[];
      await need(desk, 'price', line?.price);
      const id = desk.newId('cs_test_');
      const wish = strings(params['subscription_data']);
      return create(desk, 'checkout.session', {
        id,
        object: 'checkout.session',
        mode: params['mode'],
        status: 'open',
        payment_status: 'unpaid',
        created: desk.now(),
        expires_at: desk.now() + 86_400,
        customer: params['customer'],
        client_reference_id: text(params['client_reference_id']) ?? null,
        success_url: params['success_url'],
        cancel_url: text(params['cancel_url']) ?? null,
        metadata: strings(params['metadata']),
        subscription: null,
        url: `${desk.origin}/pay/${id}`,
        _price: line?.price,
        _trialDays: wish['trial_period_days']
          ? whole(wish['trial_period_days'], 'subscription_data[trial_period_days]')
          : 0,
        _metadata: strings(wish['metadata']),
      });
    },
  },
  {
    method: 'GET',
    pattern: at('checkout/sessions/(cs_\\w+)'),
    allows: [],
    run: ({ desk, ids }) => need(desk, 'checkout.session', ids[0]),
  },
  {
    method: 'POST',
    pattern: at('checkout/sessions/(cs_\\w+)/expire'),
    allows: [],
    run: async ({ desk, ids }) =>
      create(
        desk,
        'checkout.session',
        { ...(await need<Doc & { id: string }>(desk, 'checkout.session', ids[0])), status: 'expired' },
        'checkout.session.expired',
      ),
  },
  {
    method: 'POST',
    pattern: at('billing_portal/sessions'),
    allows: ['customer', 'return_url', 'locale', 'configuration', 'flow_data'],
    run: async ({ desk, params }) => {
      await need(desk, 'customer', params['customer']);
      const id = desk.newId('bps_');
      return create(desk, 'billing_portal.session', {
        id,
        object: 'billing_portal.session',
        created: desk.now(),
        customer: params['customer'],
        return_url: text(params['return_url']) ?? null,
        url: `${desk.origin}/portal/${id}`,
      });
    },
  },
  {
    method: 'GET',
    pattern: at('subscriptions'),
    allows: [...LIST, 'customer', 'status', 'price'],
    run: ({ desk, params }) =>
      listOf(
        desk,
        'subscription',
        params,
        (one) =>
          (!text(params['customer']) || one['customer'] === params['customer']) &&
          (params['status'] === 'all' || one['status'] !== 'canceled'),
      ),
  },
  {
    method: 'GET',
    pattern: at('subscriptions/(sub_\\w+)'),
    allows: [],
    run: ({ desk, ids }) => need(desk, 'subscription', ids[0]),
  },
  {
    method: 'POST',
    pattern: at('subscriptions/(sub_\\w+)'),
    allows: [
      'cancel_at_period_end',
      'items',
      'proration_behavior',
      'metadata',
      'trial_end',
      'default_payment_method',
    ],
    run: async ({ desk, params, ids }) => {
      const subscription = await need<Subscription>(desk, 'subscription', ids[0]);
      const now = await timeOf(desk, subscription.customer);
      if (params['cancel_at_period_end'] !== undefined) {
        subscription.cancel_at_period_end = truth(params['cancel_at_period_end']);
        subscription['canceled_at'] = subscription.cancel_at_period_end ? now : null;
      }
      const [wish] = (params['items'] ?? []) as { price?: string }[];
      if (wish?.price) {
        const item = itemOf(subscription);
        item.price = (await need(desk, 'price', wish.price)) as Price;
        // The new price counts from the next renewal; a longer period starts when the running one ends.
        if (subscription.status === 'active' && item.current_period_end <= now) {
          item.current_period_end = periodEnd(now, subscription._anchor, item.price.recurring.interval);
        }
      }
      return create(desk, 'subscription', subscription, 'customer.subscription.updated');
    },
  },
  {
    method: 'DELETE',
    pattern: at('subscriptions/(sub_\\w+)'),
    allows: ['invoice_now', 'prorate', 'cancellation_details'],
    run: async ({ desk, ids }) => {
      const subscription = await need<Subscription>(desk, 'subscription', ids[0]);
      return endSubscription(desk, subscription, await timeOf(desk, subscription.customer));
    },
  },
  {
    method: 'GET',
    pattern: at('invoices'),
    allows: [...LIST, 'customer', 'subscription', 'status'],
    run: ({ desk, params }) =>
      listOf(
        desk,
        'invoice',
        params,
        (one) => !text(params['customer']) || one['customer'] === params['customer'],
      ),
  },
  {
    method: 'GET',
    pattern: at('invoices/(in_\\w+)'),
    allows: [],
    run: ({ desk, ids }) => need(desk, 'invoice', ids[0]),
  },
  {
    method: 'GET',
    pattern: at('events'),
    allows: [...LIST, 'type', 'types'],
    run: ({ desk, params }) => listOf(desk, 'event', params),
  },
  {
    method: 'GET',
    pattern: at('events/(evt_\\w+)'),
    allows: [],
    run: ({ desk, ids }) => need(desk, 'event', ids[0]),
  },
  {
    method: 'POST',
    pattern: at('refunds'),
    allows: ['payment_intent', 'charge', 'amount', 'reason', 'metadata'],
    run: async ({ desk, params }) =>
      create(
        desk,
        'refund',
        {
          id: desk.newId('re_'),
          object: 'refund',
          status: 'succeeded',
          created: desk.now(),
          amount: params['amount'] === undefined ? null : whole(params['amount'], 'amount'),
          metadata: strings(params['metadata']),
        },
        'refund.created',
      ),
  },
  {
    method: 'POST',
    pattern: at('test_helpers/test_clocks'),
    allows: ['frozen_time', 'name'],
    run: async ({ desk, params }) =>
      create(desk, 'test_helpers.test_clock', {
        id: desk.newId('clock_'),
        object: 'test_helpers.test_clock',
        created: desk.now(),
        frozen_time: whole(params['frozen_time'], 'frozen_time'),
        name: text(params['name']) ?? null,
        status: 'ready',
      }),
  },
  {
    method: 'GET',
    pattern: at('test_helpers/test_clocks/(clock_\\w+)'),
    allows: [],
    run: ({ desk, ids }) => need(desk, 'test_helpers.test_clock', ids[0]),
  },
  {
    method: 'POST',
    pattern: at('test_helpers/test_clocks/(clock_\\w+)/advance'),
    allows: ['frozen_time'],
    run: async ({ desk, params, ids }) => {
      const clock = await need<Doc & { id: string; frozen_time: number }>(
        desk,
        'test_helpers.test_clock',
        ids[0],
      );
      const until = whole(params['frozen_time'], 'frozen_time');
      if (until < clock.frozen_time)
        throw new ApiError(400, 'A test clock only moves forward.', { param: 'frozen_time' });
      const customers = await desk.store.list<Doc & { id: string; test_clock: string | null }>('customer');
      const mine = new Set(customers.filter(({ test_clock }) => test_clock === clock.id).map(({ id }) => id));
      for (const { id, customer } of (await desk.store.list<Subscription>('subscription')).reverse()) {
        if (mine.has(customer)) await liveUntil(desk, id, until);
      }
      return create(desk, 'test_helpers.test_clock', { ...clock, frozen_time: until, status: 'ready' });
    },
  },
];

const reply = (status: number, body: unknown): Response =>
  Response.json(body, { status, headers: { 'request-id': 'req_standin' } });

function refused(error: unknown): Response {
  if (!(error instanceof ApiError)) throw error;
  return reply(error.status, {
    error: { type: 'invalid_request_error', message: error.message, ...error.body },
  });
}

async function answer(desk: Desk, request: Request, body: string): Promise<Response> {
  const url = new URL(request.url);
  const route = ROUTES.find(({ method, pattern }) => method === request.method && pattern.test(url.pathname));
  if (!route)
    return reply(404, {
      error: {
        type: 'invalid_request_error',
        message: `Unrecognized request URL (${request.method}: ${url.pathname}).`,
      },
    });
  const raw = request.method === 'POST' ? body : url.search.slice(1);
  const { expand: wanted = [], ...params } = qs.parse(raw, {
    depth: 10,
    arrayLimit: 1000,
    parameterLimit: 5000,
  }) as Params & { expand?: string[] };
  for (const name of Object.keys(params)) {
    if (!route.allows.includes(name))
      throw new ApiError(400, `Received unknown parameter: ${name}`, {
        code: 'parameter_unknown',
        param: name,
      });
  }
  const ids = (route.pattern.exec(url.pathname) ?? []).slice(1);
  return reply(200, await expand(desk, shown(await route.run({ desk, params, ids })), wanted));
}

/** The HTTP API: key, idempotency, then the route. A repeated key gets the first reply; with other parameters an error. */
export async function answerApi(desk: Desk, request: Request): Promise<Response> {
  if (!/^Bearer sk_test_\w+/.test(request.headers.get('authorization') ?? '')) {
    return reply(401, {
      error: { type: 'invalid_request_error', message: 'No API key, or not one for tests.' },
    });
  }
  const body = request.method === 'POST' ? await request.text() : '';
  const key = request.method === 'POST' ? request.headers.get('idempotency-key') : null;
  const hash = createHash('sha256')
    .update(`${new URL(request.url).pathname}\n${body}`)
    .digest('hex');
  const before = key
    ? await desk.store.get<Doc & { hash: string; status: number; body: unknown }>('idempotency', key)
    : null;
  if (before && before.hash !== hash) {
    return reply(400, {
      error: {
        type: 'idempotency_error',
        message:
          'Keys for idempotent requests can only be used with the same parameters they were first used with.',
      },
    });
  }
  if (before) return reply(before.status, before.body);
  const made = await answer(desk, request, body).catch(refused);
  if (key)
    await desk.store.put('idempotency', key, { hash, status: made.status, body: await made.clone().json() });
  return made;
}
