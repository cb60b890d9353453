import { drawJamb } from '../charts/jamb.ts';
import { parseCount } from '../numbers/parse.ts';
import { standingOf } from './standing-of.ts';
import type { Sex } from './types.ts';

/** The age bands of the published push-up table, each by an age inside it. */
export const PUSH_UP_AGES = [
  { value: '20', label: '20 to 29' },
  { value: '30', label: '30 to 39' },
  { value: '40', label: '40 to 49' },
  { value: '50', label: '50 to 59' },
  { value: '60', label: '60 to 69' },
] as const;

/**
 * One push-up test of a visitor: words and the drawing of the jamb. What is typed wrongly gets its sentence and a bare
 * jamb. The table is the one for the form: women on the knees, men on the toes.
 */
export function tryPushUps(typed: { age: string; sex: Sex; count: string }): {
  words: string;
  drawing: string;
} {
  const count = parseCount(typed.count);
  if (!count.ok) return { words: count.reason, drawing: '' };
  const form = typed.sex === 'female' ? 'knees' : 'floor';
  const standing = standingOf({
    test: 'push-ups',
    form,
    value: count.value,
    ageYears: Number(typed.age),
    sex: typed.sex,
  });
  if (standing.kind !== 'placed') return { words: standing.sentence, drawing: '' };
  const words = `${standing.sentence} One test on one day: the first mark on the wood, nothing more.`;
  const drawing = drawJamb({
    id: 'try',
    finding: words,
    unit: 'push-ups',
    marks: [{ value: count.value, day: 'today' }],
    bands: standing.bands,
  });
  return { words, drawing };
}
