import { readEndpoint } from '#server/endpoint';
import { queueFor, rackOf } from '#server/services/desk';

/** The rack of the coach who asks. */
export const GET = readEndpoint(['coach'], async ({ app, viewer }) =>
  rackOf(await queueFor(app, viewer), viewer.timeZone),
);
