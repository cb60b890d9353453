import type { APIRoute } from 'astro';

const PRIVATE = [
  '/account',
  '/api',
  '/check-in',
  '/demo',
  '/desk',
  '/flight',
  '/held',
  '/house',
  '/join',
  '/marks',
  '/photos',
  '/practice',
  '/readiness',
  '/session',
  '/sign-in',
  '/stop',
  '/test-day',
  '/week',
];

export const GET: APIRoute = ({ locals }) =>
  new Response(
    [
      'User-agent: *',
      ...PRIVATE.map((path) => `Disallow: ${path}`),
      '',
      `Sitemap: ${locals.app.env.publicOrigin}/sitemap.xml`,
      '',
    ].join('\n'),
    { headers: { 'content-type': 'text/plain; charset=utf-8' } },
  );
