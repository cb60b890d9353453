import type { APIContext } from 'astro';
import { defineMiddleware } from 'astro:middleware';
import type { ErrorReply } from '#contracts/errors';
import { sessionCookieName } from '#server/auth/config';
import { readViewer } from '#server/auth/session';
import { isAppError, isDatabaseDown } from '#server/errors';

/** In `astro dev` there is no front server: one App is made for the process and kept through reloads. */
async function fillDevLocals(context: APIContext): Promise<void> {
  const { devApp } = await import('#server/dev');
  context.locals.app = await devApp();
  context.locals.requestId = crypto.randomUUID();
  context.locals.clientIp = '127.0.0.1';
}

/** Reads who is signed in, and turns what a page or endpoint throws into the right reply. Never the only guard. */
export const onRequest = defineMiddleware(async (context, next) => {
  if (context.isPrerendered) return next();
  const { locals } = context;
  if (import.meta.env.DEV) await fillDevLocals(context);
  try {
    locals.viewer = await readViewer(
      locals.app,
      context.cookies.get(sessionCookieName(locals.app.env.secure))?.value,
    );
    return await next();
  } catch (error) {
    return reply(context, error);
  }
});

/** Where a page leads that may not be opened for these reasons: it says what to do. */
const INSTEAD = { held: '/held', 'payment-needed': '/account/membership' } as const;

function reply(context: APIContext, error: unknown): Response {
  const { locals, url } = context;
  const expected = isAppError(error);
  const status = expected ? error.status : isDatabaseDown(error) ? 503 : 500;
  if (!expected) {
    locals.app.log.error(
      { requestId: locals.requestId, fault: error instanceof Error ? error.stack : 'unknown' },
      'fault',
    );
  }
  const message = expected
    ? error.message
    : 'Something broke on our side. Nothing you typed was sent; try again.';
  if (url.pathname.startsWith('/api/')) {
    const body: ErrorReply = {
      error: {
        code: expected ? error.code : status === 503 ? 'unavailable' : 'fault',
        message,
        fields: expected ? error.fields : {},
        requestId: locals.requestId,
      },
    };
    return Response.json(body, { status });
  }
  if (expected && error.code === 'forbidden' && locals.viewer?.role === 'visitor')
    return context.redirect('/join', 303);
  if (expected && error.code === 'signed-out') {
    return context.redirect(`/sign-in?next=${encodeURIComponent(url.pathname + url.search)}`, 303);
  }
  if (expected && context.request.method === 'GET' && error.code in INSTEAD) {
    return context.redirect(INSTEAD[error.code as keyof typeof INSTEAD], 303);
  }
  const html = locals.errorPage?.(status) ?? locals.errorPage?.(status < 500 ? 400 : 500);
  return new Response(html ?? message, {
    status,
    headers: { 'content-type': html ? 'text/html; charset=utf-8' : 'text/plain; charset=utf-8' },
  });
}
