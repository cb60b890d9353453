import { sql } from 'drizzle-orm';
import { timestamp, uuid } from 'drizzle-orm/pg-core';

/** An id that cannot be guessed; it may stand in an address. */
export const id = () =>
  uuid()
    .primaryKey()
    .default(sql`gen_random_uuid()`);

/** A moment, always with its zone. The application gives the value from its clock. */
export const moment = () => timestamp({ withTimezone: true, mode: 'date' });
