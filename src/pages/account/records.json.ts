import type { APIRoute } from 'astro';
import { exportRecords } from '#server/services/export';
import { requireRole } from '#server/services/viewer';

/** All that is kept about the person who asks, as one download. */
export const GET: APIRoute = async ({ locals }) => {
  const viewer = requireRole(locals.viewer, 'member', 'visitor');
  return new Response(JSON.stringify(await exportRecords(locals.app, viewer), null, 2), {
    headers: {
      'content-type': 'application/json; charset=utf-8',
      'content-disposition': 'attachment; filename="newel-records.json"',
    },
  });
};
