import { CreateBucketCommand } from '@aws-sdk/client-s3';
import { eq } from 'drizzle-orm';
import { HEALTH_CONSENT } from '#contracts/readiness';
import { addDays, localDate } from '#domain/flight/calendar';
import { screen, validUntil } from '#domain/readiness/screen';
import type { App } from '#server/app';
import * as schema from '#server/db/schema/index';
import { memberState } from '#server/services/members';
import { planNextSession } from '#server/services/training';
import { CAST, type Person } from './cast.ts';
import { seededChance, type Chance } from './chance.ts';
import type { Life } from './life-frame.ts';
import { liveOn } from './life.ts';
import { DEMO_PLANS, fillMoney, type Payer } from './money.ts';
import { answersOf, openTroubles } from './troubles.ts';

const SEED = 20_261_201;
const ZONE = 'Europe/London';

const addressOf = (name: string) => `${name.toLowerCase().replaceAll(' ', '.')}@skerrow.example`;

/** The bucket that pictures lie in. There already is as good as made. */
async function ensureBucket(app: App): Promise<void> {
  await app.objects.send(new CreateBucketCommand({ Bucket: app.env.s3.bucket })).catch(() => undefined);
}

/** Owner and coaches. */
async function fillStaff(app: App, chance: Chance, since: Date): Promise<Record<Person['coach'], string>> {
  const staff = (name: string, role: 'owner' | 'coach', day: number) => ({
    id: chance.uuid(),
    name,
    email: addressOf(name),
    role,
    emailVerified: since,
    createdAt: new Date(since.getTime() + day * 86_400_000),
  });
  const rows = [
    staff('Ines Tarrant', 'owner', 0),
    staff('Odile Brandt', 'coach', 1),
    staff('Tomasz Wren', 'coach', 2),
  ];
  await app.db.insert(schema.users).values(rows);
  return { Odile: rows[1]?.id ?? '', Tomasz: rows[2]?.id ?? '' };
}

/** Splits rows so that one statement stays under PostgreSQL's limit of parameters. */
async function insertMany<T extends object>(
  rows: T[],
  insert: (part: T[]) => Promise<unknown>,
): Promise<void> {
  const size = 400;
  for (let from = 0; from < rows.length; from += size) await insert(rows.slice(from, from + size));
}

async function writeLives(app: App, lives: Life[]): Promise<void> {
  const { db } = app;
  const { flights, testDays, marks, trainingSessions, sessionItems, checkIns, messages } = schema;
  await insertMany(
    lives.flatMap((life) => life.flights),
    (rows) => db.insert(flights).values(rows),
  );
  await insertMany(
    lives.flatMap((life) => life.testDays),
    (rows) => db.insert(testDays).values(rows),
  );
  await insertMany(
    lives.flatMap((life) => life.marks),
    (rows) => db.insert(marks).values(rows),
  );
  await insertMany(
    lives.flatMap((life) => life.sessions),
    (rows) => db.insert(trainingSessions).values(rows),
  );
  await insertMany(
    lives.flatMap((life) => life.items),
    (rows) => db.insert(sessionItems).values(rows),
  );
  await insertMany(
    lives.flatMap((life) => life.checkIns),
    (rows) => db.insert(checkIns).values(rows),
  );
  await insertMany(
    lives.flatMap((life) => life.messages),
    (rows) => db.insert(messages).values(rows),
  );
}

/** User, member, consent, screen and house of one of the cast; the id and the day they began. */
async function writePerson(app: App, person: Person, coachId: string, chance: Chance, index: number) {
  const now = app.clock.now();
  const today = localDate(now, ZONE);
  const startsOn = addDays(today, -person.weeks * 7 - ((index * 3) % 6));
  const joined = new Date(`${addDays(startsOn, -2)}T09:${10 + (index % 45)}:00Z`);
  const id = chance.uuid();
  const birth =
    person.age === null
      ? null
      : addDays(addDays(today, -Math.round(person.age * 365.25)), -chance.whole(20, 330));
  const answers = answersOf(person);
  const result = screen(answers);
  const staysOut = person.arc === 'held' && person.weeks <= 1;
  await app.db.insert(schema.users).values({
    id,
    name: person.name,
    email: addressOf(person.name),
    role: staysOut ? 'visitor' : 'member',
    emailVerified: joined,
    timeZone: ZONE,
    // In the order of the cast, which is the order of the demo's sign-in page.
    createdAt: new Date(now.getTime() - 299 * 86_400_000 + index * 1000),
  });
  await app.db.insert(schema.members).values({
    userId: id,
    coachId,
    joinedAt: staysOut ? null : joined,
    birthDate: birth,
    sex: person.sex,
    statureCm: person.statureCm,
    about: person.about,
    emphasis: person.emphasis,
    watch: person.watch ?? null,
  });
  await app.db
    .insert(schema.consents)
    .values({ userId: id, kind: 'health-data', wording: HEALTH_CONSENT, givenAt: joined });
  await app.db.insert(schema.readinessScreens).values({
    memberId: id,
    answeredAt: joined,
    answers,
    result: result.result,
    reasons: [...result.reasons],
    validUntil: validUntil(localDate(joined, ZONE)),
  });
  await app.db.insert(schema.houses).values({
    memberId: id,
    stairCount: person.stairs[0],
    stepHeightMm: person.stairs[1],
    rail: chance.pick(['one side', 'one side', 'both sides']),
    matLengthCm: 180,
    matWidthCm: 60,
    marginCm: chance.whole(50, 120),
    chair: true,
    chairHeightCm: chance.whole(43, 47),
    bar: person.bar === true,
    pulseMeter: person.pulseMeter === true,
    updatedAt: joined,
  });
  return { id, startsOn, joined, staysOut };
}

/**
 * Fills an empty demo practice with seeded lives up to the present moment of the practice's clock. Does nothing when it is
 * filled already.
 * @returns a sentence for the start's list
 */
export async function fillDemo(app: App): Promise<string> {
  await ensureBucket(app);
  const [there] = await app.db
    .select({ filledAt: schema.practice.filledAt })
    .from(schema.practice)
    .where(eq(schema.practice.id, 1));
  if (there?.filledAt) return 'filled before';
  const now = app.clock.now();
  const chance = seededChance(SEED);
  await app.db.insert(schema.practice).values({ id: 1, name: 'Newel', timeZone: ZONE }).onConflictDoNothing();
  await app.db
    .insert(schema.plans)
    .values(DEMO_PLANS.map((plan, position) => ({ ...plan, position, createdAt: now })));
  const coaches = await fillStaff(app, chance, new Date(now.getTime() - 300 * 86_400_000));
  const lives: Life[] = [];
  const payers: Payer[] = [];
  for (const [index, person] of CAST.entries()) {
    const coachId = coaches[person.coach];
    const { id, startsOn, joined, staysOut } = await writePerson(app, person, coachId, chance, index);
    if (person.arc !== 'new' && !staysOut)
      lives.push(liveOn({ memberId: id, coachId, person, startsOn, now, chance }));
    if (!staysOut) payers.push({ memberId: id, person, email: addressOf(person.name), joined });
    await openTroubles(app, person, id, coachId);
  }
  await writeLives(app, lives);
  await fillMoney(app, payers);
  for (const { memberId, person } of payers) {
    if (person.arc === 'new' || person.arc === 'cancelled') continue;
    const state = await memberState(app, memberId);
    if (state) await app.db.transaction((tx) => planNextSession(tx, state, now));
  }
  await app.db.update(schema.practice).set({ filledAt: now }).where(eq(schema.practice.id, 1));
  return `${CAST.length} members, ${lives.reduce((sum, life) => sum + life.sessions.length, 0)} sessions`;
}
