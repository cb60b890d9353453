import { SessionInput } from '#contracts/session';
import { writeEndpoint } from '#server/endpoint';
import { notFound } from '#server/errors';
import { requireTraining } from '#server/services/members';
import { logSession } from '#server/services/training';

const UUID = /^[0-9a-f-]{36}$/;

/** Writes down a session of the member who asks, and plans the next. */
export const POST = writeEndpoint(['member'], SessionInput, async ({ app, viewer, tx, input, params }) => {
  const id = params['id'] ?? '';
  if (!UUID.test(id)) throw notFound();
  const state = await requireTraining(app, viewer);
  const { next } = await logSession(tx, state, id, input, app.clock.now());
  return { id, next: next?.session.id ?? null };
});
