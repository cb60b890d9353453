/** Words a minute of a calm reader who looks at the drawings (common practice, no source). */
const WORDS_A_MINUTE = 180;

/** Words of a text as a reader counts them; markup and component tags are left out. */
export function countWords(text: string): number {
  const plain = text.replace(/<[^>]*>/g, ' ').replace(/[#*_`>|-]+/g, ' ');
  return plain.split(/\s+/).filter((word) => /[\p{L}\p{N}]/u.test(word)).length;
}

/** All words of a lesson: its body and the strings of its facts, however deep they stand. */
export function lessonWords(facts: unknown, body: string): number {
  if (typeof facts === 'string') return countWords(facts) + countWords(body);
  if (typeof facts !== 'object' || facts === null) return countWords(body);
  return Object.values(facts).reduce<number>((sum, part) => sum + lessonWords(part, ''), countWords(body));
}

/** Whole minutes, at least one. */
export const readingMinutes = (words: number): number => Math.max(1, Math.round(words / WORDS_A_MINUTE));
