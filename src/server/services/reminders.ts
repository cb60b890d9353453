import { and, eq, gte, inArray, isNull, lt, lte, sql } from 'drizzle-orm';
import type { App } from '#server/app';
import {
  checkIns,
  flights,
  holds,
  members,
  plans,
  readinessScreens,
  reminders,
  subscriptions,
  testDays,
  users,
} from '#server/db/schema/index';
import type { LetterName } from '#server/email/templates';

/** One mail that has become due. `about` names the occasion, so that it is sent once however often we look. */
interface Due {
  userId: string;
  about: string;
  letter: LetterName;
  data?: Record<string, string>;
}

const LIVE = ['trialing', 'active', 'past_due'] as const;
const TRIAL_NOTICE_DAYS = 3;
const LANDINGS = [4, 8, 12];

const dayMonth = (date: Date, timeZone: string) =>
  new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', timeZone }).format(date);

const money = (minor: number, currency: string) =>
  new Intl.NumberFormat('en-GB', { style: 'currency', currency: currency.toUpperCase() }).format(minor / 100);

/** Members in a running flight whose plan is paid and not held, with the local day of their flight (1 to 84). */
async function dueInFlight(app: App, now: Date): Promise<Due[]> {
  const localToday = sql<string>`(${now.toISOString()}::timestamptz at time zone ${users.timeZone})::date`;
  const day = sql<number>`(${localToday} - ${flights.startsOn} + 1)::int`;
  const rows = await app.db
    .select({
      userId: members.userId,
      flightId: flights.id,
      day,
      checkedIn: sql<boolean>`exists (select 1 from ${checkIns} where ${checkIns.memberId} = ${members.userId}
        and ${checkIns.weekStart} = ${flights.startsOn} + 7 * ((${day} - 1) / 7))`,
      testedWeeks: sql<number[]>`coalesce((select array_agg(${testDays.week}) from ${testDays}
        where ${testDays.flightId} = ${flights.id} and ${testDays.finishedAt} is not null), '{}')`,
    })
    .from(members)
    .innerJoin(users, eq(users.id, members.userId))
    .innerJoin(flights, eq(flights.memberId, members.userId))
    .innerJoin(
      subscriptions,
      and(eq(subscriptions.memberId, members.userId), inArray(subscriptions.status, [...LIVE])),
    )
    .leftJoin(holds, and(eq(holds.memberId, members.userId), isNull(holds.endedAt)))
    .where(and(eq(members.wantsReminders, true), isNull(holds.id), sql`${day} between 1 and 84`));
  return rows.flatMap((row): Due[] => {
    const week = Math.floor((row.day - 1) / 7) + 1;
    const dayOfWeek = ((row.day - 1) % 7) + 1;
    const about = `${row.flightId}:${week}`;
    const mails: Due[] = [];
    if (dayOfWeek >= 6 && !row.checkedIn) {
      mails.push({ userId: row.userId, about: `check-in:${about}`, letter: 'check-in-due' });
    }
    if (LANDINGS.includes(week) && !row.testedWeeks.includes(week)) {
      mails.push({
        userId: row.userId,
        about: `test-day:${about}`,
        letter: 'test-day',
        data: { when: 'this week' },
      });
    }
    return mails;
  });
}

/** Trials that end within three days, told with the date and the amount. */
async function dueTrials(app: App, now: Date): Promise<Due[]> {
  const rows = await app.db
    .select({
      userId: subscriptions.memberId,
      id: subscriptions.id,
      trialEnd: subscriptions.trialEnd,
      amountMinor: plans.amountMinor,
      currency: plans.currency,
      timeZone: users.timeZone,
    })
    .from(subscriptions)
    .innerJoin(plans, eq(plans.id, subscriptions.planId))
    .innerJoin(users, eq(users.id, subscriptions.memberId))
    .where(
      and(
        eq(subscriptions.status, 'trialing'),
        eq(subscriptions.cancelAtPeriodEnd, false),
        gte(subscriptions.trialEnd, now),
        lt(subscriptions.trialEnd, new Date(now.getTime() + TRIAL_NOTICE_DAYS * 86_400_000)),
      ),
    );
  return rows.flatMap((row): Due[] =>
    row.trialEnd
      ? [
          {
            userId: row.userId,
            about: `trial-ends:${row.id}`,
            letter: 'trial-ends',
            data: {
              when: dayMonth(row.trialEnd, row.timeZone),
              amount: money(row.amountMinor, row.currency),
            },
          },
        ]
      : [],
  );
}

/** Members whose newest readiness answers run out within two weeks. */
async function dueQuestions(app: App, now: Date): Promise<Due[]> {
  const soon = new Date(now.getTime() + 14 * 86_400_000).toISOString().slice(0, 10);
  const newest = app.db
    .selectDistinctOn([readinessScreens.memberId], {
      memberId: readinessScreens.memberId,
      validUntil: readinessScreens.validUntil,
    })
    .from(readinessScreens)
    .orderBy(readinessScreens.memberId, sql`${readinessScreens.answeredAt} desc`)
    .as('newest');
  const rows = await app.db
    .select({ userId: newest.memberId, validUntil: newest.validUntil })
    .from(newest)
    .innerJoin(
      subscriptions,
      and(eq(subscriptions.memberId, newest.memberId), inArray(subscriptions.status, [...LIVE])),
    )
    .where(lte(newest.validUntil, soon));
  return rows.map((row) => ({
    userId: row.userId,
    about: `questions:${row.validUntil}`,
    letter: 'questions-due',
  }));
}

/** Finds what is due and sends each mail once: the note that it was sent and the job commit together. */
export async function sendReminders(app: App): Promise<number> {
  const now = app.clock.now();
  const due = (
    await Promise.all([dueInFlight(app, now), dueTrials(app, now), dueQuestions(app, now)])
  ).flat();
  if (due.length === 0) return 0;
  return app.transaction(async (tx, enqueue) => {
    const fresh = await tx
      .insert(reminders)
      .values(due.map(({ userId, about }) => ({ userId, about, sentAt: now })))
      .onConflictDoNothing()
      .returning({ userId: reminders.userId, about: reminders.about });
    const isFresh = new Set(fresh.map(({ userId, about }) => `${userId} ${about}`));
    for (const { userId, about, letter, data } of due) {
      if (isFresh.has(`${userId} ${about}`)) await enqueue('mail', { letter, userId, ...(data && { data }) });
    }
    return fresh.length;
  });
}
