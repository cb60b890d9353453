import { z } from './zod.ts';
import { address } from './sign-in.ts';

export const InviteInput = z.strictObject({
  do: z.literal('invite'),
  name: z.string().trim().min(2, 'Give the coach’s name.').max(80, 'Keep the name under 80 characters.'),
  address,
});

export const MoveInput = z.strictObject({
  do: z.literal('move'),
  member: z.uuid('Choose a member.'),
  coach: z.uuid('Choose a coach.'),
});

/** The forms of the people page, told apart by `do`. */
export const PeopleForm = z.discriminatedUnion('do', [InviteInput, MoveInput], {
  error: 'Reload the page and try again.',
});
