import { z } from './zod.ts';

const NOT_AN_ADDRESS =
  'That does not look like an e-mail address. It needs an @ and an ending, like ines@skerrow.example.';

/** An e-mail address as typed: trimmed, lower case. */
export const address = z
  .string({ error: NOT_AN_ADDRESS })
  .trim()
  .toLowerCase()
  .max(254, NOT_AN_ADDRESS)
  .pipe(z.email(NOT_AN_ADDRESS));

export const SignInInput = z.strictObject({
  address,
  next: z.string().max(300).default(''),
});

export const ConfirmInput = z.strictObject({
  address: z.string().max(254),
  secret: z.string().max(200),
  next: z.string().max(300).default(''),
});

export const DemoSignInInput = z.strictObject({ person: z.uuid('Choose somebody from the list.') });
