import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { AstroCookieSetOptions } from 'astro';
import type { App } from '#server/app';
import { AppError } from '#server/errors';
import { invites, sessions, users } from '#server/db/schema/index';
import { takeOrRefuse } from '#server/limits';
import { callAuth, hashToken, SESSION_DAYS, sessionCookieName } from './config.ts';

/** The part of Astro's cookies that signing in needs. */
export interface CookieJar {
  get(name: string): { value: string } | undefined;
  set(name: string, value: string, options: AstroCookieSetOptions): void;
  delete(name: string, options: AstroCookieSetOptions): void;
}

const ASK_COOKIE = 'newel-ask';
const ASK_SECONDS = 600;

/** Only a path of ours is followed after signing in. */
export const safeNext = (next: string | null | undefined): string =>
  next && /^\/(?![/\\])[\w\-./?=&%]*$/.test(next) && next.length <= 300 ? next : '';

const form = (fields: Record<string, string>, cookie = ''): RequestInit => ({
  method: 'POST',
  headers: { 'content-type': 'application/x-www-form-urlencoded', cookie },
  body: new URLSearchParams(fields),
});

/**
 * Asks for a link. Known, unknown and malformed addresses get the same answer; the limits count by address and network.
 * @throws AppError too-many
 */
export async function askForLink(
  app: App,
  cookies: CookieJar,
  input: { address: string; next: string; clientIp: string },
): Promise<void> {
  const address = input.address.trim().toLowerCase();
  await takeOrRefuse(app.limits, 'sign-in-network', input.clientIp);
  await takeOrRefuse(app.limits, 'sign-in-address', address);
  const ask = app.random.token(24);
  cookies.set(ASK_COOKIE, ask, {
    httpOnly: true,
    sameSite: 'lax',
    path: '/sign-in',
    maxAge: ASK_SECONDS,
    secure: app.env.secure,
  });
  await callAuth(app, 'signin/email', form({ email: address, callbackUrl: '/' }), { ask, next: input.next });
}

/**
 * Spends the link's token: only by POST, only in the browser that asked, once, within ten minutes.
 * Auth.js's own clock checks the ten minutes.
 * @throws AppError bad-request when the link cannot be used
 */
export async function spendLink(
  app: App,
  cookies: CookieJar,
  input: { address: string; secret: string; clientIp: string; device: string },
): Promise<{ userId: string }> {
  await takeOrRefuse(app.limits, 'confirm-network', input.clientIp);
  const ask = cookies.get(ASK_COOKIE)?.value;
  const refused = () =>
    new AppError(
      'bad-request',
      'This link does not open here. It works once, for ten minutes, on the device that asked.',
    );
  if (!ask) throw refused();
  const query = new URLSearchParams({
    token: `${input.secret}.${ask}`,
    email: input.address,
    callbackUrl: '/',
  });
  const reply = await callAuth(app, `callback/email?${query.toString()}`, { method: 'GET' }, { ask });
  const token = sessionTokenOf(reply, sessionCookieName(app.env.secure));
  if (!token) throw refused();
  cookies.delete(ASK_COOKIE, { path: '/sign-in' });
  setSessionCookie(app, cookies, token);
  const [session] = await app.db
    .update(sessions)
    .set({
      device: input.device.slice(0, 200),
      createdAt: app.clock.now(),
      seenAt: app.clock.now(),
      expires: expiry(app),
    })
    .where(eq(sessions.sessionToken, hashToken(token)))
    .returning({ userId: sessions.userId });
  if (!session) throw refused();
  await acceptInvite(app, session.userId);
  return session;
}

function sessionTokenOf(reply: Response, cookieName: string): string | null {
  for (const line of reply.headers.getSetCookie()) {
    const [pair = ''] = line.split(';');
    if (pair.startsWith(`${cookieName}=`))
      return decodeURIComponent(pair.slice(cookieName.length + 1)) || null;
  }
  return null;
}

const expiry = (app: App) => new Date(app.clock.now().getTime() + SESSION_DAYS * 86_400_000);

function setSessionCookie(app: App, cookies: CookieJar, token: string): void {
  cookies.set(sessionCookieName(app.env.secure), token, {
    httpOnly: true,
    sameSite: 'lax',
    path: '/',
    secure: app.env.secure,
    maxAge: SESSION_DAYS * 86_400,
  });
}

/** An invited address becomes a coach when it first signs in. */
async function acceptInvite(app: App, userId: string): Promise<void> {
  await app.db.transaction(async (tx) => {
    const [user] = await tx
      .select({ email: users.email, role: users.role })
      .from(users)
      .where(eq(users.id, userId));
    if (user?.role !== 'visitor') return;
    const [invite] = await tx
      .update(invites)
      .set({ acceptedAt: app.clock.now() })
      .where(and(sql`lower(${invites.email}) = ${user.email.toLowerCase()}`, isNull(invites.acceptedAt)))
      .returning({ name: invites.name });
    if (invite) await tx.update(users).set({ role: 'coach', name: invite.name }).where(eq(users.id, userId));
  });
}

/** Demo only: signs one of the practice's people in by choice of name. @throws AppError not-found in production */
export async function signInAsDemo(
  app: App,
  cookies: CookieJar,
  userId: string,
  device: string,
): Promise<void> {
  if (!app.env.demo) throw new AppError('not-found', 'There is nothing here.');
  const token = app.random.token(32);
  const now = app.clock.now();
  await app.db.insert(sessions).values({
    sessionToken: hashToken(token),
    userId,
    createdAt: now,
    seenAt: now,
    expires: expiry(app),
    device: device.slice(0, 200),
  });
  setSessionCookie(app, cookies, token);
}

/** Ends the session that the cookie holds. */
export async function signOut(app: App, cookies: CookieJar): Promise<void> {
  const name = sessionCookieName(app.env.secure);
  const token = cookies.get(name)?.value;
  if (token) await app.db.delete(sessions).where(eq(sessions.sessionToken, hashToken(token)));
  cookies.delete(name, { path: '/', secure: app.env.secure });
}

/** The caller's sessions that still live, newest first. */
export function listSessions(app: App, userId: string) {
  return app.db
    .select({
      id: sessions.id,
      device: sessions.device,
      createdAt: sessions.createdAt,
      seenAt: sessions.seenAt,
    })
    .from(sessions)
    .where(and(eq(sessions.userId, userId), gt(sessions.expires, app.clock.now())))
    .orderBy(sql`${sessions.seenAt} desc nulls last`);
}

/** Ends one of the caller's own sessions; another's is left alone. */
export async function endSession(app: App, userId: string, sessionId: string): Promise<void> {
  await app.db.delete(sessions).where(and(eq(sessions.userId, userId), eq(sessions.id, sessionId)));
}
