import type { APIRoute } from 'astro';
import { DraftInput } from '#contracts/check-in';
import { parseInput } from '#server/endpoint';
import { AppError } from '#server/errors';
import { saveDraft } from '#server/services/drafts';
import { requireRole } from '#server/services/viewer';

const KEY = /^[a-z-]+:[\w-]{1,60}$/;

/** Keeps unsent words. Saving twice is the same as saving once, so this write needs no key of its own. */
export const PUT: APIRoute = async ({ request, params, locals }) => {
  const viewer = requireRole(locals.viewer, 'member', 'coach');
  const key = params['key'] ?? '';
  if (!KEY.test(key)) throw new AppError('not-found', 'There is no such draft.');
  const { body } = parseInput(DraftInput, await request.json().catch(() => null));
  const savedAt = locals.app.clock.now();
  await saveDraft(locals.app.db, viewer.id, key, body, savedAt);
  return Response.json({ savedAt: savedAt.toISOString() });
};
