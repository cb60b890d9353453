import { z } from './zod.ts';

/** The buttons of the membership page. */
export const MembershipInput = z.strictObject({
  do: z.enum(['portal', 'cancel', 'keep'], { error: 'Choose what to do.' }),
});
