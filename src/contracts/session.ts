import { z } from './zod.ts';
import { pain, scale } from './words.ts';

/** A logged session: totals over all sets for each movement, and the whole session's effort, minutes and pain. */
export const SessionInput = z
  .strictObject({
    items: z
      .array(
        z.strictObject({
          id: z.uuid(),
          doneTotal: z.coerce
            .number({ error: 'Give the number done.' })
            .int('Whole numbers only.')
            .min(0, 'Not below 0.')
            .max(6000, 'That is more than a session holds. Check the number.'),
          pain: pain.default('none'),
        }),
      )
      .min(1)
      .max(6),
    effort: scale(1, 10, 'Say how hard the session was, 1 to 10.'),
    minutes: scale(1, 240, 'Give the minutes, from 1 to 240.'),
    pain,
    painWhere: z.string().trim().max(200, 'Keep the place short.').default(''),
    note: z.string().trim().max(500, 'Keep the note under 500 characters.').default(''),
  })
  .refine((input) => input.pain === 'none' || input.painWhere !== '', {
    path: ['painWhere'],
    message: 'Say where it hurt, so that the plan and your coach can act on it.',
  });
export type SessionInput = z.output<typeof SessionInput>;
