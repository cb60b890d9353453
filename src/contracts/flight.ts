import { z } from './zod.ts';

export const EMPHASES = ['breath', 'balanced', 'muscle'] as const;

export const StartFlightInput = z.strictObject({
  once: z.uuid('Reload the page and try again.'),
  emphasis: z.enum(EMPHASES, { error: 'Choose what the flight leans to.' }),
});
