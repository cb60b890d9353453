import type { APIRoute } from 'astro';
import { AppError } from '#server/errors';
import { PHOTO_MAX_BYTES, receivePhoto } from '#server/services/photos';
import { requireRole } from '#server/services/viewer';

/** Takes one picture as the raw body. The reply's id goes into the check-in. */
export const POST: APIRoute = async ({ request, locals }) => {
  const viewer = requireRole(locals.viewer, 'member');
  const bytes = Buffer.from(await request.arrayBuffer());
  if (bytes.length === 0) throw new AppError('bad-request', 'No picture arrived. Choose it again.');
  if (bytes.length > PHOTO_MAX_BYTES) throw new AppError('too-large', 'That picture is larger than 12 MB.');
  return Response.json(await receivePhoto(locals.app, viewer, bytes), { status: 201 });
};
