import { z } from 'zod';
import { call, pageOf, type Call } from '../call.ts';
import type { CouponDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import { listParams, mergeMetadata, metadata, params, share, text, whole } from '../params.ts';

const create = call(
  'POST',
  '/v1/coupons',
  params({
    id: text.optional(),
    name: text.optional(),
    duration: z.enum(['once', 'repeating', 'forever']).optional(),
    duration_in_months: whole.optional(),
    percent_off: share.refine((percent) => percent > 0 && percent <= 100, 'above 0, up to 100').optional(),
    amount_off: whole.refine((amount) => amount > 0, 'above 0').optional(),
    currency: text.optional(),
    max_redemptions: whole.optional(),
    metadata: metadata.optional(),
  }),
  async (ledger, asked) => {
    const duration = asked.duration ?? 'once';
    if ((asked.percent_off === undefined) === (asked.amount_off === undefined)) {
      throw badRequest('A coupon needs percent_off or amount_off.', {
        code: 'parameter_missing',
        param: 'percent_off',
      });
    }
    if ((duration === 'repeating') !== (asked.duration_in_months !== undefined)) {
      throw badRequest('duration_in_months goes with a repeating coupon and with no other.', {
        param: 'duration_in_months',
      });
    }
    const coupon: CouponDoc = {
      id: asked.id ?? ledger.id('coupon').slice(7, 15),
      object: 'coupon',
      amount_off: asked.amount_off ?? null,
      created: await ledger.time(null),
      currency: asked.amount_off === undefined ? null : (asked.currency ?? 'eur'),
      duration,
      duration_in_months: asked.duration_in_months ?? null,
      livemode: false,
      max_redemptions: asked.max_redemptions ?? null,
      metadata: mergeMetadata({}, asked.metadata),
      name: asked.name ?? null,
      percent_off: asked.percent_off ?? null,
      redeem_by: null,
      times_redeemed: 0,
      valid: true,
    };
    if (await ledger.find('coupon', coupon.id)) {
      throw badRequest('Coupon already exists.', { code: 'resource_already_exists', param: 'id' });
    }
    await ledger.save('coupon', coupon);
    return coupon;
  },
);

export const couponCalls: Call[] = [
  create,
  call('GET', '/v1/coupons', listParams({}), async (ledger, asked) =>
    pageOf('/v1/coupons', await ledger.all('coupon'), asked),
  ),
  call('GET', '/v1/coupons/:id', params({}), (ledger, _asked, id) => ledger.need('coupon', id)),
];
