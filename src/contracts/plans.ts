import { z } from './zod.ts';
import { typedCount, typedDecimal } from './typed-number.ts';

/** The choice of a plan on the way to the checkout. */
export const ChoosePlanInput = z.strictObject({
  plan: z.uuid('Choose a plan.'),
  terms: z.literal('yes', { error: 'Say that you have read the terms.' }),
});

/** The owner's form for one plan. The price is typed in whole units of money (`29` or `29,50`). */
export const PlanInput = z
  .strictObject({
    id: z.union([z.uuid(), z.literal('')]).default(''),
    name: z.string().trim().min(2, 'Give the plan a name.').max(60, 'Keep the name under 60 characters.'),
    summary: z
      .string()
      .trim()
      .min(2, 'Say in a sentence what it holds.')
      .max(200, 'Keep it under 200 characters.'),
    interval: z.enum(['month', 'year'], { error: 'Month or year.' }),
    price: typedDecimal('Give the price.', { min: 1, max: 5000, outside: 'From 1 to 5,000.' }),
    trialDays: typedCount('Give the days of the trial; 0 for none.', {
      min: 0,
      max: 60,
      outside: 'From 0 to 60 days.',
    }),
    onSale: z.union([z.literal('yes').transform(() => true), z.undefined().transform(() => false)]),
  })
  .transform(({ price, ...plan }) => ({ ...plan, amountMinor: Math.round(price * 100) }));
export type PlanInput = z.output<typeof PlanInput>;
