import { z } from './zod.ts';

export const MoveClockInput = z.strictObject({
  days: z.coerce
    .number({ error: 'Say how many days.' })
    .int('Whole days only.')
    .min(1, 'At least a day.')
    .max(84, 'At most twelve weeks at once.'),
});
