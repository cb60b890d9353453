import type { APIRoute } from 'astro';
import { notFound } from '#server/errors';
import { openPhoto } from '#server/services/photos';
import { requireRole } from '#server/services/viewer';

const UUID = /^[0-9a-f-]{36}$/;

/** A picture, to its member and their coach. */
export const GET: APIRoute = async ({ params, locals }) => {
  const viewer = requireRole(locals.viewer, 'member', 'coach');
  const id = params['id'] ?? '';
  if (!UUID.test(id)) throw notFound();
  const bytes = await openPhoto(locals.app, viewer, id);
  return new Response(new Uint8Array(bytes), { headers: { 'content-type': 'image/webp' } });
};
