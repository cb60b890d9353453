import { z } from './zod.ts';
import { NONE, QUESTIONS, type ReadinessAnswers } from '#domain/readiness/questions';

/** The sentence that the person agrees to; kept with the consent. */
export const HEALTH_CONSENT =
  'Newel may keep these answers and what I write and measure, so that my coach can work with it. I can take it back at any time; then my records are deleted.';

const many = (values: readonly string[], missing: string) =>
  z
    .union(
      [
        z.array(z.enum(values as [string, ...string[]])),
        z.enum(values as [string, ...string[]]).transform((one) => [one]),
      ],
      {
        error: missing,
      },
    )
    .refine(
      (list) => list.length === 1 || !list.includes(NONE),
      'Choose ‘None of these’ alone, or the ones that fit.',
    );

const fields = Object.fromEntries(
  QUESTIONS.map(({ id, kind, options }) => {
    const values = options.map(({ value }) => value) as [string, ...string[]];
    const missing = kind === 'many' ? 'Tick at least one, or ‘None of these’.' : 'Choose one answer.';
    return [id, kind === 'many' ? many(values, missing) : z.enum(values, { error: missing })];
  }),
);

/** The whole sheet of readiness questions and the consent, as the form sends it. */
export const ReadinessInput = z
  .strictObject({
    ...fields,
    once: z.uuid('Reload the page and try again.'),
    consent: z.literal('yes', {
      error: 'Without your consent we may not keep the answers, and cannot go on.',
    }),
  })
  .transform(({ once, consent, ...answers }) => ({
    once,
    consent,
    answers: answers as unknown as ReadinessAnswers,
  }));
