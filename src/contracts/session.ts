import { z } from './zod.ts';
import { typedCount } from './typed-number.ts';
import { pain, scale } from './words.ts';

/** A logged session: totals over all sets for each movement, and the whole session's effort, minutes and pain. */
export const SessionInput = z
  .strictObject({
    items: z
      .array(
        z.strictObject({
          id: z.uuid(),
          doneTotal: typedCount('Give the number done.', {
            min: 0,
            max: 6000,
            outside: 'That is more than a session holds. Check the number.',
          }),
          pain: pain.default('none'),
        }),
      )
      .min(1)
      .max(6),
    effort: scale(1, 10, 'Say how hard the session was, 1 to 10.'),
    minutes: typedCount('Give the minutes, from 1 to 240.', {
      min: 1,
      max: 240,
      outside: 'Give the minutes, from 1 to 240.',
    }),
    pain,
    painWhere: z.string().trim().max(200, 'Keep the place short.').default(''),
    note: z.string().trim().max(500, 'Keep the note under 500 characters.').default(''),
  })
  .refine((input) => input.pain === 'none' || input.painWhere !== '', {
    path: ['painWhere'],
    message: 'Say where it hurt, so that the plan and your coach can act on it.',
  });
export type SessionInput = z.output<typeof SessionInput>;
