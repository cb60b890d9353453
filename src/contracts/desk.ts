import { z } from './zod.ts';
import { scale, words } from './words.ts';

/** The coach's answer: to a check-in when one waits, else a line in the thread. */
export const AnswerInput = z.strictObject({
  memberId: z.uuid(),
  words: words('Write the answer first.'),
});

export const HoldInput = z.strictObject({
  do: z.literal('hold'),
  reason: words('Say why, in a sentence that the member reads.', 500),
});

export const ClearInput = z.strictObject({
  do: z.literal('clear'),
  clearance: words('Say who cleared the member, and when.', 500),
});

export const SettleInput = z.strictObject({ do: z.literal('settle') });

/** A target changed in red, with why. */
export const TargetInput = z.strictObject({
  do: z.literal('target'),
  movement: z.string().max(20),
  rung: z.string().max(60),
  sets: scale(1, 10, 'From 1 to 10 sets.'),
  amount: scale(1, 600, 'From 1 to 600 a set.'),
  effort: scale(1, 10, 'Effort from 1 to 10.'),
  why: words('Say why; the member reads it in red.', 300),
});
export type TargetInput = z.output<typeof TargetInput>;

/** Every form of the member's desk page, told apart by `do`. */
export const DeskForm = z.discriminatedUnion('do', [HoldInput, ClearInput, SettleInput, TargetInput], {
  error: 'Reload the page and try again.',
});

/** One letter in the rack, as the island gets it. */
export interface RackLetter {
  memberId: string;
  name: string;
  kind: 'stop' | 'caret' | 'stair' | 'rule' | 'caution';
  reason: string;
  due: string;
  why: string;
}

const NUMBERS = ['Nobody', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine'];

/** `Seven wait`, `One waits`, `Nobody waits`. */
export function waitWords(letters: number): string {
  return `${NUMBERS[letters] ?? letters} ${letters <= 1 ? 'waits' : 'wait'}`;
}

/** The letter that comes after this member's: the one below it in the rack, else the first of the others. */
export function letterAfter(letters: readonly RackLetter[], memberId: string): RackLetter | undefined {
  const here = letters.findIndex((letter) => letter.memberId === memberId);
  return letters[here + 1] ?? letters.find((letter) => letter.memberId !== memberId);
}
