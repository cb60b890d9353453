import { z } from 'zod';
import { call, pageOf, type Call } from '../call.ts';
import type { PriceDoc, ProductDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { listParams, mergeMetadata, metadata, params, text, unsettable, whole, yesNo } from '../params.ts';

async function createProduct(
  ledger: Ledger,
  asked: {
    id?: string;
    name: string;
    description?: string | null;
    active?: boolean;
    metadata?: Record<string, string>;
  },
): Promise<ProductDoc> {
  const at = await ledger.time(null);
  if (asked.id && (await ledger.find('product', asked.id))) {
    throw badRequest('Product already exists.', { code: 'resource_already_exists', param: 'id' });
  }
  const product: ProductDoc = {
    id: asked.id ?? ledger.id('prod'),
    object: 'product',
    active: asked.active ?? true,
    created: at,
    default_price: null,
    description: asked.description ?? null,
    images: [],
    livemode: false,
    marketing_features: [],
    metadata: asked.metadata ?? {},
    name: asked.name,
    package_dimensions: null,
    shippable: null,
    tax_details: null,
    type: 'service',
    updated: at,
    url: null,
  };
  await ledger.save('product', product);
  ledger.emit('product.created', product, at);
  return product;
}

const recurring = z.strictObject({
  interval: z.enum(['day', 'week', 'month', 'year']),
  interval_count: whole.refine((count) => count >= 1, 'at least 1').optional(),
});

const createPrice = call(
  'POST',
  '/v1/prices',
  params({
    currency: z.string().regex(/^[a-zA-Z]{3}$/),
    unit_amount: whole.refine((amount) => amount >= 0, 'not below 0'),
    recurring: recurring.optional(),
    product: text.optional(),
    product_data: z.strictObject({ name: text, metadata: metadata.optional() }).optional(),
    nickname: text.optional(),
    lookup_key: text.optional(),
    active: yesNo.optional(),
    tax_behavior: z.enum(['inclusive', 'exclusive', 'unspecified']).optional(),
    metadata: metadata.optional(),
  }),
  async (ledger, asked) => {
    if (Boolean(asked.product) === Boolean(asked.product_data)) {
      throw badRequest('A price needs product or product_data.', {
        code: 'parameter_missing',
        param: 'product',
      });
    }
    const product = asked.product_data
      ? await createProduct(ledger, {
          name: asked.product_data.name,
          metadata: mergeMetadata({}, asked.product_data.metadata),
        })
      : await ledger.need('product', asked.product ?? '', 'product');
    const price: PriceDoc = {
      id: ledger.id('price'),
      object: 'price',
      active: asked.active ?? true,
      billing_scheme: 'per_unit',
      created: await ledger.time(null),
      currency: asked.currency.toLowerCase(),
      custom_unit_amount: null,
      livemode: false,
      lookup_key: asked.lookup_key ?? null,
      metadata: mergeMetadata({}, asked.metadata),
      nickname: asked.nickname ?? null,
      product: product.id,
      recurring: asked.recurring
        ? {
            interval: asked.recurring.interval,
            interval_count: asked.recurring.interval_count ?? 1,
            meter: null,
            trial_period_days: null,
            usage_type: 'licensed',
          }
        : null,
      tax_behavior: asked.tax_behavior ?? 'unspecified',
      tiers_mode: null,
      transform_quantity: null,
      type: asked.recurring ? 'recurring' : 'one_time',
      unit_amount: asked.unit_amount,
      unit_amount_decimal: String(asked.unit_amount),
    };
    await ledger.save('price', price);
    ledger.emit('price.created', price, price.created);
    return price;
  },
);

const updatePrice = call(
  'POST',
  '/v1/prices/:id',
  params({
    active: yesNo.optional(),
    nickname: unsettable.optional(),
    lookup_key: unsettable.optional(),
    metadata: metadata.optional(),
  }),
  async (ledger, asked, id) => {
    const before = await ledger.need('price', id);
    const after: PriceDoc = {
      ...before,
      active: asked.active ?? before.active,
      nickname: asked.nickname === undefined ? before.nickname : asked.nickname,
      lookup_key: asked.lookup_key === undefined ? before.lookup_key : asked.lookup_key,
      metadata: mergeMetadata(before.metadata, asked.metadata),
    };
    await ledger.save('price', after);
    ledger.emit('price.updated', after, await ledger.time(null));
    return after;
  },
);

const updateProduct = call(
  'POST',
  '/v1/products/:id',
  params({
    name: text.optional(),
    description: unsettable.optional(),
    active: yesNo.optional(),
    default_price: text.optional(),
    metadata: metadata.optional(),
  }),
  async (ledger, asked, id) => {
    const before = await ledger.need('product', id);
    const at = await ledger.time(null);
    const after: ProductDoc = {
      ...before,
      name: asked.name ?? before.name,
      description: asked.description === undefined ? before.description : asked.description,
      active: asked.active ?? before.active,
      default_price: asked.default_price ?? before.default_price ?? null,
      metadata: mergeMetadata(before.metadata, asked.metadata),
      updated: at,
    };
    await ledger.save('product', after);
    ledger.emit('product.updated', after, at);
    return after;
  },
);

export const catalogueCalls: Call[] = [
  call(
    'POST',
    '/v1/products',
    params({
      id: text.optional(),
      name: text,
      description: text.optional(),
      active: yesNo.optional(),
      metadata: metadata.optional(),
    }),
    (ledger, { id, description, active, ...asked }) =>
      createProduct(ledger, {
        name: asked.name,
        ...(id && { id }),
        ...(description && { description }),
        ...(active !== undefined && { active }),
        metadata: mergeMetadata({}, asked.metadata),
      }),
  ),
  updateProduct,
  call('GET', '/v1/products', listParams({ active: yesNo.optional() }), async (ledger, asked) => {
    const where = asked.active === undefined ? {} : { active: asked.active };
    return pageOf('/v1/products', await ledger.all('product', where), asked);
  }),
  call('GET', '/v1/products/:id', params({}), (ledger, _asked, id) => ledger.need('product', id)),
  createPrice,
  updatePrice,
  call(
    'GET',
    '/v1/prices',
    listParams({
      active: yesNo.optional(),
      product: text.optional(),
      type: z.enum(['recurring', 'one_time']).optional(),
      lookup_keys: z.array(text).optional(),
    }),
    async (ledger, { active, product, type, lookup_keys: keys, ...paging }) => {
      const where = {
        ...(active !== undefined && { active }),
        ...(product && { product }),
        ...(type && { type }),
      };
      const all = await ledger.all('price', where);
      return pageOf(
        '/v1/prices',
        keys ? all.filter((price) => keys.includes(price.lookup_key ?? '')) : all,
        paging,
      );
    },
  ),
  call('GET', '/v1/prices/:id', params({}), (ledger, _asked, id) => ledger.need('price', id)),
];
