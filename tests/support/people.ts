import type { App } from '#server/app';
import { hashToken } from '#server/auth/config';
import { members, plans, sessions, subscriptions, users } from '#server/db/schema/index';
import type { Role, Viewer } from '#server/services/viewer';

const DAY_MS = 86_400_000;
let made = 0;

/** Adds a person of a role by direct insert and gives them back as the viewer a request of theirs would carry. */
export async function addPerson(
  app: App,
  role: Role,
  given: Partial<typeof users.$inferInsert> = {},
): Promise<Viewer & { cookie: string }> {
  made += 1;
  const now = app.clock.now();
  const [user] = await app.db
    .insert(users)
    .values({
      email: `${role}-${made}@skerrow.example`,
      name: `The ${role} ${made}`,
      role,
      createdAt: now,
      ...given,
    })
    .returning();
  if (!user) throw new Error('the person was not written');
  const cookie = app.random.token(32);
  const [session] = await app.db
    .insert(sessions)
    .values({
      sessionToken: hashToken(cookie),
      userId: user.id,
      createdAt: now,
      seenAt: now,
      expires: new Date(now.getTime() + 90 * DAY_MS),
    })
    .returning();
  if (!session) throw new Error('the session was not written');
  const { id, name, email, timeZone, units } = user;
  return { id, name, email, role: user.role, timeZone, units, sessionId: session.id, cookie };
}

/** A member who joined a month ago with this coach and whose plan is paid until in a month. */
export async function addMember(
  app: App,
  {
    coach,
    plan = true,
    ...member
  }: { coach: Viewer | null; plan?: boolean } & Partial<
    Omit<typeof members.$inferInsert, 'userId' | 'coachId'>
  >,
): Promise<Viewer & { cookie: string }> {
  const person = await addPerson(app, 'member');
  const now = app.clock.now().getTime();
  await app.db.insert(members).values({
    userId: person.id,
    coachId: coach?.id ?? null,
    joinedAt: new Date(now - 30 * DAY_MS),
    birthDate: '1984-05-02',
    sex: 'female',
    ...member,
  });
  if (plan) {
    await app.db.insert(subscriptions).values({
      id: `sub_${person.id}`,
      memberId: person.id,
      planId: await monthlyPlan(app),
      status: 'active',
      startedAt: new Date(now - 30 * DAY_MS),
      currentPeriodStart: new Date(now - 1 * DAY_MS),
      currentPeriodEnd: new Date(now + 30 * DAY_MS),
      syncedAt: new Date(now),
    });
  }
  return person;
}

/** The one monthly plan of the tests, £39.00. */
async function monthlyPlan(app: App): Promise<string> {
  const values = {
    slug: 'month-of-the-tests',
    name: 'By the month',
    summary: 'A month with a coach.',
    interval: 'month' as const,
    amountMinor: 3900,
    createdAt: app.clock.now(),
  };
  const [plan] = await app.db
    .insert(plans)
    .values(values)
    .onConflictDoUpdate({ target: plans.slug, set: { name: values.name } })
    .returning({ id: plans.id });
  if (!plan) throw new Error('the plan was not written');
  return plan.id;
}
