import type { z } from 'zod';
import type { ListOf } from './docs.ts';
import { badRequest, type Fault } from './fault.ts';
import type { Ledger } from './ledger.ts';
import { readParams } from './params.ts';

/** A reply that is an error and still keeps what was written: a declined card leaves its attempt in the books. */
interface Refused {
  refused: Fault;
}

export interface Call {
  method: 'GET' | 'POST' | 'DELETE';
  path: string;
  run(ledger: Ledger, raw: unknown, id: string): Promise<{ answer: object; expand: string[] } | Refused>;
}

/** One call of the API: its parameters are checked before it runs. */
export function call<P extends { expand?: string[] | undefined }>(
  method: Call['method'],
  path: string,
  schema: z.ZodType<P>,
  run: (ledger: Ledger, given: P, id: string) => Promise<object | Refused>,
): Call {
  return {
    method,
    path,
    run: async (ledger, raw, id) => {
      const given = readParams(schema, raw);
      const answer = await run(ledger, given, id);
      return 'refused' in answer ? answer : { answer, expand: given.expand ?? [] };
    },
  };
}

interface Paging {
  limit?: number | undefined;
  starting_after?: string | undefined;
  ending_before?: string | undefined;
}

const DEFAULT_LIMIT = 10;

/** One page of objects that come newest first. @throws Fault for a cursor that is not among them */
export function pageOf<T extends { id: string }>(url: string, all: T[], paging: Paging): ListOf<T> {
  const limit = paging.limit ?? DEFAULT_LIMIT;
  const placeOf = (id: string, param: string) => {
    const at = all.findIndex((one) => one.id === id);
    if (at < 0) throw badRequest(`No such object: '${id}'`, { code: 'resource_missing', param });
    return at;
  };
  if (paging.ending_before) {
    const end = placeOf(paging.ending_before, 'ending_before');
    const start = Math.max(0, end - limit);
    return { object: 'list', data: all.slice(start, end), has_more: start > 0, url };
  }
  const start = paging.starting_after ? placeOf(paging.starting_after, 'starting_after') + 1 : 0;
  return { object: 'list', data: all.slice(start, start + limit), has_more: start + limit < all.length, url };
}

/** A list that comes whole inside another object. */
export const listOf = <T>(url: string, data: T[]): ListOf<T> => ({
  object: 'list',
  data,
  has_more: false,
  url,
});
