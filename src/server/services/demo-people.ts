import { asc, eq, ne, sql } from 'drizzle-orm';
import type { App } from '#server/app';
import { members, users } from '#server/db/schema/index';
import type { Role } from './viewer.ts';

const SHOWN_MEMBERS = 12;

/** Where each role begins after signing in. */
export const HOME_OF: Record<Role, string> = {
  visitor: '/join',
  member: '/week',
  coach: '/desk',
  owner: '/practice',
};

/** Demo only: the practice's people for the sign-in page, staff first. Empty in production. */
export async function demoPeople(
  app: App,
): Promise<{ id: string; name: string; role: Role; about: string }[]> {
  if (!app.env.demo) return [];
  const rows = await app.db
    .select({ id: users.id, name: users.name, role: users.role, about: members.about })
    .from(users)
    .leftJoin(members, eq(members.userId, users.id))
    .where(ne(users.role, 'visitor'))
    .orderBy(
      sql`case ${users.role} when 'owner' then 0 when 'coach' then 1 else 2 end`,
      asc(users.createdAt),
      asc(users.name),
    )
    .limit(SHOWN_MEMBERS + 3);
  return rows.map((row) => ({
    id: row.id,
    name: row.name ?? 'Somebody',
    role: row.role,
    about: row.about ?? '',
  }));
}

/** The role of the person just signed in, to send them to their first page. */
export async function roleOf(app: App, userId: string): Promise<Role> {
  const [row] = await app.db.select({ role: users.role }).from(users).where(eq(users.id, userId));
  return row?.role ?? 'visitor';
}
