import { z } from 'zod';
import { passTime } from '../billing/time.ts';
import { call, pageOf, type Call } from '../call.ts';
import type { ClockDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import { listParams, moment, params, text, whole } from '../params.ts';

const CLOCK_LIFE_SECONDS = 30 * 86_400;

const createClock = call(
  'POST',
  '/v1/test_helpers/test_clocks',
  params({ frozen_time: moment, name: text.optional() }),
  async (ledger, asked) => {
    const at = await ledger.time(null);
    const clock: ClockDoc = {
      id: ledger.id('clock'),
      object: 'test_helpers.test_clock',
      created: at,
      deletes_after: at + CLOCK_LIFE_SECONDS,
      frozen_time: asked.frozen_time,
      livemode: false,
      name: asked.name ?? null,
      status: 'ready',
      status_details: {},
    };
    await ledger.save('test_helpers.test_clock', clock);
    ledger.emit('test_helpers.test_clock.created', clock, at);
    return clock;
  },
);

const advance = call(
  'POST',
  '/v1/test_helpers/test_clocks/:id/advance',
  params({ frozen_time: moment }),
  async (ledger, { frozen_time: until }, id) => {
    const clock = await ledger.need('test_helpers.test_clock', id);
    if (until < clock.frozen_time) {
      throw badRequest('Test clocks can only be moved forward.', { param: 'frozen_time' });
    }
    const setTime = (at: number) => ledger.save('test_helpers.test_clock', { ...clock, frozen_time: at });
    await passTime(ledger, id, { since: clock.frozen_time, until, setTime });
    const moved = { ...clock, frozen_time: until };
    ledger.emit('test_helpers.test_clock.ready', moved, until);
    return moved;
  },
);

const created = z
  .strictObject({
    gt: whole.optional(),
    gte: whole.optional(),
    lt: whole.optional(),
    lte: whole.optional(),
  })
  .optional();

/** Whether a moment lies in `created[gte]=…&created[lt]=…`. */
export const isWithin = (at: number, range: z.output<typeof created>) =>
  at > (range?.gt ?? -Infinity) &&
  at >= (range?.gte ?? -Infinity) &&
  at < (range?.lt ?? Infinity) &&
  at <= (range?.lte ?? Infinity);

export const createdRange = created;

/** `customer.subscription.*` and the like. */
const fits = (type: string, wanted: string) =>
  wanted === '*' || (wanted.endsWith('.*') ? type.startsWith(wanted.slice(0, -1)) : type === wanted);

export const timeCalls: Call[] = [
  createClock,
  advance,
  call('GET', '/v1/test_helpers/test_clocks', listParams({}), async (ledger, asked) =>
    pageOf('/v1/test_helpers/test_clocks', await ledger.all('test_helpers.test_clock'), asked),
  ),
  call('GET', '/v1/test_helpers/test_clocks/:id', params({}), (ledger, _asked, id) =>
    ledger.need('test_helpers.test_clock', id),
  ),
  call(
    'GET',
    '/v1/events',
    listParams({ type: text.optional(), types: z.array(text).max(20).optional(), created }),
    async (ledger, { type, types, created: range, ...paging }) => {
      const all = await ledger.all('event', type && !type.includes('*') ? { type } : {});
      const wanted = types ?? (type ? [type] : ['*']);
      const found = all.filter(
        (event) => wanted.some((one) => fits(event.type, one)) && isWithin(event.created, range),
      );
      return pageOf('/v1/events', found, paging);
    },
  ),
  call('GET', '/v1/events/:id', params({}), (ledger, _asked, id) => ledger.need('event', id)),
];
