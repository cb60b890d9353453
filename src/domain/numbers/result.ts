/** What reading typed text gives: a value, perhaps with a word on how it was read, or the reason for the field. */
export type Parsed<T> =
  | { readonly ok: true; readonly value: T; readonly note?: string }
  | { readonly ok: false; readonly reason: string };

export const read = <T>(value: T, note?: string): Parsed<T> =>
  note === undefined ? { ok: true, value } : { ok: true, value, note };

export const refuse = (reason: string): { readonly ok: false; readonly reason: string } => ({
  ok: false,
  reason,
});

/**
 * Typed text made plain: outer space gone, every kind of space one space, full-width digits narrow, minus signs one
 * sign. Nothing is guessed here.
 */
export function tidy(text: string): string {
  return text
    .replace(/[\s\u00a0\u2000-\u200a\u202f\u205f\u3000]+/gu, ' ')
    .replace(/[\uff10-\uff19]/gu, (digit) => String.fromCharCode(digit.charCodeAt(0) - 0xfee0))
    .replace(/[\u2212\u2013\u2010\u2011]/gu, '-')
    .trim();
}
