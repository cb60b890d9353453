import { http, type HttpHandler } from 'msw';
import type { Handler } from './router.ts';

/** The msw door: the same handler answers every request to `origin` inside the test's own process. */
export function mswHandlers(handler: Handler, origin: string): HttpHandler[] {
  return [http.all(`${origin}/*`, ({ request }) => handler(request))];
}
