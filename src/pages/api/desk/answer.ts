import { AnswerInput } from '#contracts/desk';
import { writeEndpoint } from '#server/endpoint';
import { answerMember } from '#server/services/desk';

/** The coach's answer to one of their members. */
export const POST = writeEndpoint(['coach'], AnswerInput, ({ app, viewer, tx, enqueue, input }) =>
  answerMember(tx, enqueue, viewer, input, app.clock.now()),
);
