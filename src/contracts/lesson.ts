import { z } from './zod.ts';
import { words } from './words.ts';

const LONGEST_PLACE = 120;

/** What a lesson's page posts to itself: that it is read, or a line to the coach from a place in it. */
export const LessonForm = z.discriminatedUnion('do', [
  z.strictObject({ do: z.literal('read') }),
  z.strictObject({
    do: z.literal('note'),
    place: z
      .string()
      .trim()
      .min(1, 'Say which part you mean.')
      .max(LONGEST_PLACE, 'Say which part you mean.'),
    words: words('Write a line first.', 2000),
    once: z.uuid('Reload the page and send it again.'),
  }),
]);
export type LessonForm = z.infer<typeof LessonForm>;
