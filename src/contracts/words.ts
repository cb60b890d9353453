import { z } from './zod.ts';

export const WORDS_MAX = 4000;

/** Free text a person writes: trimmed, not empty, at most 4,000 characters. */
export const words = (empty: string, max = WORDS_MAX) =>
  z
    .string({ error: empty })
    .trim()
    .min(1, empty)
    .max(
      max,
      `That is longer than ${max.toLocaleString('en-GB')} characters. Shorten it a little; nothing is lost.`,
    );

/** A choice on a scale, as a form's text or an island's number. */
export const scale = (from: number, to: number, missing: string) =>
  z.coerce.number({ error: missing }).int(missing).min(from, missing).max(to, missing);

export const PAIN = ['none', 'mild', 'strong'] as const;
export type Pain = (typeof PAIN)[number];

export const pain = z.enum(PAIN, { error: 'Say whether anything hurt.' });
