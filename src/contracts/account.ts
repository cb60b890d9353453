import { z } from './zod.ts';
import { optional, typedCount, typedDate } from './typed-number.ts';

const WANTS = ['reminders', 'letter', 'body'] as const;

/** Ticked boxes of one name: none, one or many. */
const ticked = z
  .union([z.array(z.enum(WANTS)), z.enum(WANTS).transform((one) => [one]), z.undefined().transform(() => [])])
  .transform((list) => new Set<(typeof WANTS)[number]>(list));

const timeZones = new Set(Intl.supportedValuesOf('timeZone'));

/** The profile. Birth date and sex serve the published tables only, and may stay empty. */
export const ProfileInput = z.strictObject({
  name: z
    .string()
    .trim()
    .min(1, 'Say what your coach may call you.')
    .max(80, 'Keep the name under 80 characters.'),
  birthDate: optional(typedDate('Give a date like 7 Nov 1990.')),
  sex: z
    .enum(['female', 'male', ''], { error: 'Choose one, or leave it out.' })
    .default('')
    .transform((sex) => sex || null),
  statureCm: optional(
    typedCount('Give your height in centimetres.', {
      min: 100,
      max: 250,
      outside: 'Height in centimetres, from 100 to 250.',
    }),
  ),
  units: z.enum(['metric', 'imperial'], { error: 'Choose the units.' }),
  timeZone: z
    .string()
    .refine((zone) => timeZones.has(zone) || zone === 'UTC', 'Choose a time zone from the list.'),
  wants: ticked,
});
export type ProfileInput = z.output<typeof ProfileInput>;

export const EndSessionInput = z.strictObject({ session: z.uuid('Choose a session from the list.') });

/** Deleting asks for the address once more, typed by hand. */
export const DeleteAccountInput = z.strictObject({ address: z.string().trim().toLowerCase() });
