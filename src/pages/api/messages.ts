import { MessageInput } from '#contracts/check-in';
import { writeEndpoint } from '#server/endpoint';
import { writeMessage } from '#server/services/messages';

/** A line from the member to their coach. */
export const POST = writeEndpoint(['member'], MessageInput, async ({ app, tx, viewer, input }) => ({
  id: await writeMessage(tx, {
    memberId: viewer.id,
    authorId: viewer.id,
    byCoach: false,
    words: input.words,
    at: app.clock.now(),
  }),
}));
