import { CheckInInput } from '#contracts/check-in';
import { writeEndpoint } from '#server/endpoint';
import { sendCheckIn } from '#server/services/check-ins';
import { currentWeekStart } from '#server/services/flights';

/** Sends the week's check-in of the member who asks. */
export const POST = writeEndpoint(['member'], CheckInInput, async ({ app, tx, viewer, input }) => {
  const now = app.clock.now();
  return sendCheckIn(tx, viewer, input, { weekStart: await currentWeekStart(tx, viewer, now), now });
});
