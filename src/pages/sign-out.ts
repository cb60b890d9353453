import type { APIRoute } from 'astro';
import { signOut } from '#server/auth/sign-in';

/** Ends this session and empties what the browser kept. */
export const POST: APIRoute = async ({ locals, cookies, redirect }) => {
  await signOut(locals.app, cookies);
  const reply = redirect('/', 303);
  reply.headers.set('clear-site-data', '"cache"');
  return reply;
};
