import { Auth, skipCSRFCheck, type AuthConfig } from '@auth/core';
import type { Adapter } from '@auth/core/adapters';
import { DrizzleAdapter } from '@auth/drizzle-adapter';
import { createHash } from 'node:crypto';
import type { App } from '#server/app';
import { accounts, sessions, users, verificationTokens } from '#server/db/schema/index';

export const SESSION_DAYS = 90;
const LINK_SECONDS = 600;
const BASE = '/api/auth';

/** Sessions are stored by the hash of what the cookie holds: a read of the table signs nobody in. */
export const hashToken = (token: string) => createHash('sha256').update(token).digest('base64url');

/** `__Host-` where there is TLS; neither name is the beginning of another cookie's name (Auth.js joins by prefix). */
export const sessionCookieName = (secure: boolean) => (secure ? '__Host-newel-session' : 'newel-session');

function hashedAdapter(app: App): Adapter {
  const adapter = DrizzleAdapter(app.db, {
    usersTable: users,
    accountsTable: accounts,
    sessionsTable: sessions,
    verificationTokensTable: verificationTokens,
  }) as Required<Adapter>;
  return {
    ...adapter,
    createUser: async (user) => {
      const [row] = await app.db
        .insert(users)
        .values({
          email: user.email,
          name: user.name,
          emailVerified: user.emailVerified,
          createdAt: app.clock.now(),
        })
        .returning();
      if (!row) throw new Error('the user row was not written');
      return row;
    },
    createSession: async (session) => ({
      ...(await adapter.createSession({ ...session, sessionToken: hashToken(session.sessionToken) })),
      sessionToken: session.sessionToken,
    }),
    getSessionAndUser: async (token) => {
      const found = await adapter.getSessionAndUser(hashToken(token));
      return found && { ...found, session: { ...found.session, sessionToken: token } };
    },
    updateSession: async (session) => {
      const found = await adapter.updateSession({
        ...session,
        sessionToken: hashToken(session.sessionToken),
      });
      return found && { ...found, sessionToken: session.sessionToken };
    },
    deleteSession: (token) => adapter.deleteSession(hashToken(token)),
  };
}

/**
 * The Auth.js configuration for one request. The mailed secret is only half of the token; the other half (`ask`) lies in
 * a cookie of the browser that asked, so a link that leaks opens nothing.
 */
function authConfig(app: App, ask: string, next: string): AuthConfig {
  const { env } = app;
  return {
    adapter: hashedAdapter(app),
    basePath: BASE,
    secret: env.authSecret,
    trustHost: true,
    skipCSRFCheck,
    useSecureCookies: env.secure,
    session: {
      strategy: 'database',
      maxAge: SESSION_DAYS * 86_400,
      generateSessionToken: () => app.random.token(32),
    },
    cookies: {
      sessionToken: {
        name: sessionCookieName(env.secure),
        options: { httpOnly: true, sameSite: 'lax', path: '/', secure: env.secure },
      },
    },
    pages: { signIn: '/sign-in', verifyRequest: '/sign-in/sent', error: '/sign-in/refused' },
    logger: {
      error: (error) => app.log.info({ kind: error.name }, 'sign-in refused'),
      warn: (code) => app.log.debug({ code }, 'sign-in'),
      debug: () => undefined,
    },
    providers: [
      {
        id: 'email',
        type: 'email',
        name: 'Mail',
        from: env.mailFrom,
        maxAge: LINK_SECONDS,
        options: {},
        generateVerificationToken: () => `${app.random.token(24)}.${ask}`,
        sendVerificationRequest: async ({ identifier, token }) => {
          const secret = token.slice(0, token.lastIndexOf('.'));
          const query = new URLSearchParams({ address: identifier, secret, ...(next && { next }) });
          await app.enqueue('mail', {
            letter: 'sign-in',
            address: identifier,
            data: { path: `/sign-in/confirm?${query.toString()}` },
          });
        },
      },
    ],
  };
}

/** Calls one Auth.js action in process; its routes are never exposed. */
export function callAuth(
  app: App,
  path: string,
  init: RequestInit,
  { ask = '', next = '' } = {},
): Promise<Response> {
  const request = new Request(`${app.env.publicOrigin}${BASE}/${path}`, init);
  return Auth(request, authConfig(app, ask, next)) as Promise<Response>;
}
