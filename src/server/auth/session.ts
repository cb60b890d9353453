import { and, eq, gt, isNull } from 'drizzle-orm';
import type { App } from '#server/app';
import { sessions, users } from '#server/db/schema/index';
import type { Viewer } from '#server/services/viewer';
import { hashToken, SESSION_DAYS } from './config.ts';

const REFRESH_AFTER_MS = 86_400_000;

/**
 * Who the cookie belongs to, by one query. A database fault throws (and is answered 503): it never reads as 'signed out'.
 * Once a day the session's end moves on.
 */
export async function readViewer(app: App, token: string | undefined): Promise<Viewer | null> {
  if (!token) return null;
  const now = app.clock.now();
  const hashed = hashToken(token);
  const [row] = await app.db
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      role: users.role,
      timeZone: users.timeZone,
      units: users.units,
      sessionId: sessions.id,
      seenAt: sessions.seenAt,
    })
    .from(sessions)
    .innerJoin(users, eq(users.id, sessions.userId))
    .where(and(eq(sessions.sessionToken, hashed), gt(sessions.expires, now), isNull(users.disabledAt)));
  if (!row) return null;
  const { seenAt, ...viewer } = row;
  if (!seenAt || now.getTime() - seenAt.getTime() > REFRESH_AFTER_MS) {
    await app.db
      .update(sessions)
      .set({ seenAt: now, expires: new Date(now.getTime() + SESSION_DAYS * 86_400_000) })
      .where(eq(sessions.sessionToken, hashed));
  }
  return viewer;
}
