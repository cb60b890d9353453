import { z } from 'astro/zod';
import { movementOf, rungsOf } from './domain/figure/movements.ts';
import { MUSCLE_NAMES } from './domain/figure/muscles.ts';

/* Astro's own zod checks what authors write. Strict: a wrong name, a missing caution or a fault without a mend stops the build. */

const sentence = z.string().trim().min(8).max(600);
const sentences = z.array(sentence).min(1);

/** How far a claim may be trusted, as on the methods pages. */
const flag = z.enum(['published', 'derived', 'memory', 'common practice, no source']);

/** A fault of a movement that is drawn. */
const faultFigure = z
  .object({ movement: z.string(), fault: z.string() })
  .strict()
  .refine(
    ({ movement, fault }) => movementOf(movement).faults.some(({ name }) => name === fault),
    'the movement has no fault of this name',
  );

const lessonFault = z
  .object({ see: sentence, feel: sentence, mend: sentence, figure: faultFigure.optional() })
  .strict();

const question = z
  .object({
    question: sentence,
    options: z.array(z.string().min(1).max(200)).min(2).max(4),
    /** Which option is right, from 0. */
    answer: z.number().int().min(0),
    why: sentence,
  })
  .strict()
  .refine(({ options, answer }) => answer < options.length, 'the answer is none of the options');

const movementId = z.string().transform((id) => movementOf(id).id);

/** A lesson's own facts; the text stands below them. */
export const lessonSchema = z
  .object({
    title: z.string().min(4).max(60),
    slug: z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/),
    order: z.number().int().min(1),
    /** The week of the flight that unlocks it; 0 is open to members from the first day. */
    week: z.number().int().min(0).max(12),
    free: z.boolean(),
    topic: z.enum(['movement', 'test', 'house', 'body', 'life']),
    /** The movement drawn in its three phases at the head. */
    movement: movementId.optional(),
    /** The ladder shown beside the text. */
    ladder: z
      .string()
      .refine((ladder) => rungsOf(ladder).length > 0, 'no such ladder')
      .optional(),
    summary: sentence,
    purpose: sentence,
    cautions: sentences,
    notFor: sentences,
    setUp: sentences,
    breathing: sentence,
    tempo: sentence,
    feel: sentences,
    faults: z.array(lessonFault).min(2),
    easier: sentence,
    harder: sentence,
    howMuch: sentence,
    muscles: z.array(z.enum(MUSCLE_NAMES as [string, ...string[]])),
    sources: z.array(z.object({ text: sentence, flag }).strict()).min(1),
    selfCheck: z.array(question).length(3),
  })
  .strict()
  .refine(({ topic, muscles }) => topic !== 'movement' || muscles.length > 0, 'a movement names its muscles')
  .refine(({ topic, movement }) => topic !== 'movement' || movement, 'a movement is drawn');

/** Privacy, terms and cautions in plain words. */
export const pageSchema = z
  .object({
    title: z.string().min(4).max(60),
    slug: z.enum(['privacy', 'terms', 'cautions']),
    summary: sentence,
    /** Said at the head until the owner's lawyer has read it. */
    draft: z.literal('Draft for the owner’s lawyer'),
  })
  .strict();

export type LessonFacts = z.infer<typeof lessonSchema>;
