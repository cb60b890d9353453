import { asc, eq, sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { BENCHMARKS } from '#domain/benchmark/tests';
import type { App } from '#server/app';
import * as schema from '#server/db/schema/index';
import { fillDemo } from '#server/demo/fill';
import { listMarks } from '#server/services/marks';
import { queueFor } from '#server/services/desk';
import type { Viewer } from '#server/services/viewer';
import { useApp } from '#support/test-app';

const NOW = '2026-11-10T09:00:00Z';
const { marks, checkIns, messages, trainingSessions, users, members } = schema;

/** Everything of a life that must come out alike: marks, sessions and words, in one order. */
async function livesOf({ db }: App) {
  const person = { email: users.email };
  return {
    marks: await db
      .select({ ...person, test: marks.test, value: marks.value, takenAt: marks.takenAt, form: marks.form })
      .from(marks)
      .innerJoin(users, eq(users.id, marks.memberId))
      .orderBy(asc(users.email), asc(marks.takenAt), asc(marks.test), asc(marks.value)),
    sessions: await db
      .select({ ...person, doneAt: trainingSessions.doneAt, share: trainingSessions.shareDone })
      .from(trainingSessions)
      .innerJoin(users, eq(users.id, trainingSessions.memberId))
      .orderBy(asc(users.email), asc(trainingSessions.doneAt)),
    words: await db
      .select({ ...person, sentAt: checkIns.sentAt, words: checkIns.words })
      .from(checkIns)
      .innerJoin(users, eq(users.id, checkIns.memberId))
      .orderBy(asc(users.email), asc(checkIns.sentAt)),
  };
}
type Lives = Awaited<ReturnType<typeof livesOf>>;
let first: Lives;

/** Fills the practice of this app before its tests and prints how long it took. */
function useFilled() {
  const world = useApp(NOW);
  beforeAll(async () => {
    const began = performance.now();
    const said = await fillDemo(world.app);
    console.log(`demo fill: ${said}, ${((performance.now() - began) / 1000).toFixed(1)} s`);
  }, 90_000);
  return world;
}

/** The series of each person and test with at least five marks. */
const seriesOf = (lives: Lives): [string, number[]][] => {
  const all = new Map<string, number[]>();
  for (const { email, test, value } of lives.marks) {
    const key = `${email} ${test}`;
    all.set(key, [...(all.get(key) ?? []), value]);
  }
  return [...all].filter(([, values]) => values.length >= 5);
};
const variance = (values: readonly number[]): number => {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length;
};

describe('the demo practice', () => {
  const world = useFilled();
  beforeAll(async () => void (first = await livesOf(world.app)));

  it('has two coaches, an owner and at least forty members, up to nine months back', async () => {
    const rows = await world.app.db
      .select({ role: users.role, people: sql<number>`count(*)::int` })
      .from(users)
      .groupBy(users.role);
    const people = Object.fromEntries(rows.map((row) => [row.role, row.people]));
    expect(people).toMatchObject({ coach: 2, owner: 1 });
    expect(people['member']).toBeGreaterThanOrEqual(40);
    const oldest = Math.min(...first.sessions.flatMap(({ doneAt }) => (doneAt ? [doneAt.getTime()] : [])));
    const days = (new Date(NOW).getTime() - oldest) / 86_400_000;
    expect(days).toBeGreaterThan(180);
    expect(days).toBeLessThan(290);
  });

  it('has nothing in the future and no result that a form would refuse', () => {
    const latest = [...first.marks.map(({ takenAt }) => takenAt), ...first.words.map(({ sentAt }) => sentAt)];
    expect(Math.max(...latest.map((moment) => moment.getTime()))).toBeLessThanOrEqual(
      new Date(NOW).getTime(),
    );
    const outside = first.marks.filter(({ test, value }) => {
      const { min, max } = BENCHMARKS[test as keyof typeof BENCHMARKS].limits;
      return !(value >= min && value <= max);
    });
    expect(outside).toEqual([]);
  });

  it('draws no straight line: the steps of every series differ among themselves, down as well as up', () => {
    const series = seriesOf(first);
    expect(series.length).toBeGreaterThan(40);
    const steps = series.map(([name, values]) => ({
      name,
      steps: values.slice(1).map((value, index) => value - (values[index] ?? 0)),
    }));
    expect(steps.filter((one) => variance(one.steps) < 0.2).map(({ name }) => name)).toEqual([]);
    const falls = steps.filter((one) => one.steps.some((step) => step < 0)).length;
    expect(falls / steps.length).toBeGreaterThan(0.7);
  });

  it('has every kind of life: in trial, past due, cancelled, held, hurt, and a queue at each desk', async () => {
    const { app } = world;
    const rows = await app.db
      .selectDistinct({ status: schema.subscriptions.status })
      .from(schema.subscriptions);
    const statuses = rows.map(({ status }) => status);
    expect(statuses).toEqual(expect.arrayContaining(['active', 'trialing', 'past_due', 'canceled']));
    const openHolds = sql`${schema.holds.endedAt} is null`;
    expect(await app.db.$count(schema.holds, openHolds)).toBeGreaterThan(0);
    expect(await app.db.$count(schema.alerts)).toBeGreaterThan(0);
    expect(await app.db.$count(trainingSessions, sql`${trainingSessions.pain} <> 'none'`)).toBeGreaterThan(0);
    for (const coach of await app.db.select().from(users).where(eq(users.role, 'coach'))) {
      expect((await queueFor(app, coach as unknown as Viewer)).length).toBeGreaterThan(2);
    }
  });

  it('keeps the books of the mirror and of the provider alike', async () => {
    const { app } = world;
    for (const { customerId, memberId } of await app.db.select().from(schema.stripeCustomers)) {
      const { data } = await app.stripe.subscriptions.list({ customer: customerId, status: 'all' });
      const mirror = await app.db
        .select()
        .from(schema.subscriptions)
        .where(eq(schema.subscriptions.memberId, memberId));
      expect(mirror.map(({ id, status }) => [id, status])).toEqual(
        data.map(({ id, status }) => [id, status]),
      );
    }
  });

  it('reads like people: words differ, none is a filler, each answer belongs to a check-in of the same member', async () => {
    const distinct = new Set(first.words.map(({ words }) => words));
    expect(first.words.length).toBeGreaterThan(300);
    for (const email of new Set(first.words.map((one) => one.email))) {
      const lines = first.words.filter((one) => one.email === email).map(({ words }) => words);
      expect([email, new Set(lines).size / lines.length > 0.6]).toEqual([email, true]);
      expect([email, lines.filter((line, index) => line === lines[index - 1])]).toEqual([email, []]);
    }
    expect([...distinct].filter((words) => /lorem|\{|undefined|NaN|TODO/i.test(words))).toEqual([]);
    const strangers = await world.app.db
      .select({ id: messages.id })
      .from(messages)
      .innerJoin(checkIns, eq(checkIns.id, messages.checkInId))
      .where(sql`${checkIns.memberId} <> ${messages.memberId}`);
    expect(strangers).toEqual([]);
  });

  it('is filled once: a second start adds nothing', async () => {
    expect(await fillDemo(world.app)).toBe('filled before');
    expect(await livesOf(world.app)).toEqual(first);
  });

  it('plans a session for everybody who trains', async () => {
    const [person] = await world.app.db
      .select({ id: members.userId })
      .from(members)
      .innerJoin(users, eq(users.id, members.userId))
      .where(eq(users.name, 'Edda Rooke'));
    expect((await listMarks(world.app.db, person?.id ?? '')).length).toBeGreaterThan(5);
    const planned = sql`${trainingSessions.doneAt} is null and ${trainingSessions.memberId} = ${person?.id}`;
    expect(await world.app.db.$count(trainingSessions, planned)).toBe(1);
  });
});

describe('a second fill at the same moment, on another database', () => {
  const world = useFilled();

  it('tells the same lives, to the last mark and word', async () => {
    expect(await livesOf(world.app)).toEqual(first);
  });
});
