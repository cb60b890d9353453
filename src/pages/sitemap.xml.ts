import type { APIRoute } from 'astro';
import { METHODS } from '#domain/methods/index';
import { lessonTitles } from '#server/services/lesson-titles';

const PAGES = ['/', '/plans', '/tests', '/lessons', '/methods', '/cautions', '/privacy', '/terms'];

/** Public pages only: what needs a sign-in is not among them. */
export const GET: APIRoute = async ({ locals }) => {
  const { all } = await lessonTitles();
  const lessons = all.filter(({ free }) => free).map(({ slug }) => `/lessons/${slug}`);
  const paths = [...PAGES, ...METHODS.map(({ slug }) => `/methods/${slug}`), ...lessons];
  const urls = paths.map((path) => `<url><loc>${locals.app.env.publicOrigin}${path}</loc></url>`).join('');
  return new Response(
    `<?xml version="1.0" encoding="UTF-8"?><urlset xmlns="http://www.sitemaps.org/schemas/sitemap/0.9">${urls}</urlset>`,
    {
      headers: { 'content-type': 'application/xml; charset=utf-8' },
    },
  );
};
