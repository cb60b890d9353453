import type * as schema from '#server/db/schema/index';
import type { Person } from './cast.ts';
import type { Chance } from './chance.ts';

export type Insert<T extends { $inferInsert: unknown }> = T['$inferInsert'];

/** Every row of one life, ready to be written. */
export interface Life {
  flights: Insert<typeof schema.flights>[];
  testDays: Insert<typeof schema.testDays>[];
  marks: Insert<typeof schema.marks>[];
  sessions: Insert<typeof schema.trainingSessions>[];
  items: Insert<typeof schema.sessionItems>[];
  checkIns: Insert<typeof schema.checkIns>[];
  messages: Insert<typeof schema.messages>[];
}

/** Whose life it is, since when, until when. */
export interface Frame {
  memberId: string;
  coachId: string;
  person: Person;
  /** First local day of the baseline. */
  startsOn: string;
  now: Date;
  chance: Chance;
}

/** The hours at which people of the practice train. */
export const HOURS = [6, 7, 12, 18, 19, 20];
/** The moment of a day and time. */
export const at = (day: string, hour: number, minute: number) =>
  new Date(`${day}T${String(hour).padStart(2, '0')}:${String(minute).padStart(2, '0')}:00Z`);

/** Where a first name may stand, and the place that hurts. */
