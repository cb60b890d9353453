import rss from '@astrojs/rss';
import type { APIRoute } from 'astro';
import { getCollection } from 'astro:content';

/** The free lessons as a feed; locked ones are not in it. */
export const GET: APIRoute = async ({ locals }) => {
  const free = await getCollection('lessons', ({ data }) => data.free);
  return rss({
    title: 'Newel: free lessons',
    description: 'Lessons for training at home, with drawn figures.',
    site: locals.app.env.publicOrigin,
    trailingSlash: false,
    items: free
      .toSorted((a, b) => a.data.order - b.data.order)
      .map(({ id, data }) => ({ title: data.title, link: `/lessons/${id}`, description: data.summary })),
  });
};
