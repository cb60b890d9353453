import { z } from './zod.ts';
import { pain, scale, words, type Pain } from './words.ts';

/** The weekly check-in: scales from 1 to 5, effort from 1 to 10. */
export const CheckInInput = z
  .strictObject({
    words: words('Write a few words. One sentence is enough.'),
    went: scale(1, 5, 'Say how the week went.'),
    sleep: scale(1, 5, 'Say how you slept.'),
    soreness: scale(1, 5, 'Say how sore you were.'),
    effort: scale(1, 10, 'Give the week’s effort, 1 to 10.'),
    pain: pain.default('none'),
    painWhere: z.string().trim().max(200, 'Keep the place short.').default(''),
    photoId: z.uuid('That picture did not arrive. Choose it again.').nullish(),
  })
  .refine((input) => input.pain === 'none' || input.painWhere !== '', {
    path: ['painWhere'],
    message: 'Say where it hurts, so that your coach can act on it.',
  });
export type CheckInInput = z.output<typeof CheckInInput>;

/** A line to the coach outside a check-in. */
export const MessageInput = z.strictObject({ words: words('Write something first.') });

/** Unsent form contents, by the form's key. */
export const DraftInput = z.strictObject({
  body: z.record(z.string().max(40), z.union([z.string().max(4000), z.number(), z.null()])),
});

/** One entry of the thread, as the island and the page show it. */
export interface ThreadEntry {
  id: string;
  kind: 'check-in' | 'message';
  byCoach: boolean;
  author: string;
  sentAt: string;
  words: string;
  scales?: { went: number; sleep: number; soreness: number; effort: number };
  pain?: { level: Pain; where: string | null };
  photoId?: string | null;
  lesson?: { slug: string; place: string | null };
  unread: boolean;
}
