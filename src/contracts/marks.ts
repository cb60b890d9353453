import { z } from './zod.ts';
import { BENCHMARKS, isFormOf, limitProblem, TEST_IDS, type TestId } from '#domain/benchmark/tests';
import { parseCount, parseDecimal, parseDuration } from '#domain/numbers/parse';
import { pain, scale } from './words.ts';

const PARSERS = { count: parseCount, decimal: parseDecimal, duration: parseDuration } as const;

/** The result as a person types it for this test: a count, a number with decimals, or minutes and seconds. */
function typedResult(test: TestId, typed: string, ctx: z.RefinementCtx): number {
  const { entry, name } = BENCHMARKS[test];
  const fail = (message: string) => {
    ctx.addIssue({ code: 'custom', path: ['value'], message });
    return z.NEVER;
  };
  if (typed.trim() === '') return fail(`Give the result of ${name.toLowerCase()}.`);
  const read = PARSERS[entry](typed);
  if (!read.ok) return fail(read.reason);
  const problem = limitProblem(test, read.value);
  return problem ? fail(problem) : read.value;
}

/** One benchmark result from its form: what was done, how, how hard, and whether it hurt. */
export const MarkInput = z
  .strictObject({
    once: z.uuid('Reload the page and try again.'),
    test: z.enum(TEST_IDS, { error: 'Choose a test.' }),
    form: z.string().max(40).default(''),
    value: z.string({ error: 'Give the result.' }).max(40, 'Give one number.'),
    effort: scale(1, 10, 'Say how hard it was, 1 to 10.'),
    pain,
    conditions: z.string().trim().max(300, 'Keep the conditions under 300 characters.').default(''),
  })
  .transform((input, ctx) => {
    if (!isFormOf(input.test, input.form)) {
      ctx.addIssue({ code: 'custom', path: ['form'], message: 'Say how it was done.' });
    }
    return { ...input, value: typedResult(input.test, input.value, ctx) };
  });
export type MarkInput = z.output<typeof MarkInput>;

/** The end of a test day: nothing but its key. */
export const FinishTestDayInput = z.strictObject({ once: z.uuid('Reload the page and try again.') });
