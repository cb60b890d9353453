import type { APIRoute } from 'astro';
import { syncMember } from '#server/billing/checkout';
import { joinFacts } from '#server/services/join';
import { requireRole } from '#server/services/viewer';

/** Reads the person's own payment anew and says whether it stands. Does nothing that the webhook would not do. */
export const POST: APIRoute = async ({ locals }) => {
  const viewer = requireRole(locals.viewer, 'visitor', 'member');
  await syncMember(locals.app, viewer.id);
  const { paid } = await joinFacts(locals.app, viewer);
  return Response.json({ paid });
};
