import { read, refuse, tidy, type Parsed } from './result.ts';

export { parseDate } from './parse-date.ts';
export { parseDuration } from './parse-duration.ts';
export type { Parsed } from './result.ts';

const EMPTY = 'A number is missing.';
const WORDS = 'Only the number, without words or units.';
const UNCLEAR = 'This number can be read in two ways. Write it like 12.5 or 12,5.';
const TOO_LONG = 'This number is too long. Check it.';
const MAX_DIGITS = 9;

/** Thousands set apart by a space, an apostrophe, a comma or a point: the same mark each time, three digits after it. */
const GROUPED = /^\d{1,3}(?:([ '’,.])\d{3})(?:\1\d{3})*$/u;

/**
 * A whole count as people type it: '40', ' 40 ', '1 000', '1,000', '1.000', '40.0'. Groups of three behind a comma or a
 * point are thousands, because a count has no decimals. Never negative.
 */
export function parseCount(text: string): Parsed<number> {
  const typed = tidy(text).replace(/^\+ ?/u, '');
  if (typed === '') return refuse(EMPTY);
  if (/^- ?[\d.,]/u.test(typed)) return refuse('A count cannot be below zero.');
  const plain = GROUPED.test(typed) ? typed.replace(/[ '’,.]/gu, '') : typed.replace(/[.,]0{0,2}$/u, '');
  if (!/^\d+$/u.test(plain)) return refuse(/^[\d ]+[.,]\d+$/u.test(typed) ? 'Whole numbers only.' : WORDS);
  return plain.length > MAX_DIGITS ? refuse(TOO_LONG) : read(Number(plain));
}

/**
 * A number as people type it: '12,5', '12.5', '.5', '1 000,5', '1,000.5', '1.000.000', '−3'. One comma or one point is
 * always the decimal mark ('1,000' is one), two different marks are thousands and then decimals.
 */
export function parseDecimal(text: string): Parsed<number> {
  const typed = tidy(text).replace(/^\+ ?/u, '');
  if (typed === '') return refuse(EMPTY);
  const negative = typed.startsWith('-');
  const body = negative ? typed.slice(1).trimStart() : typed;
  if (!/^[\d.,'’ ]+$/u.test(body) || !/\d/u.test(body)) return refuse(WORDS);

  const mark = /^(.*?)([.,])(\d*)$/u.exec(body);
  const [whole, fraction] = mark ? [mark[1] ?? '', mark[3] ?? ''] : [body, ''];
  const hasOneMark = mark !== null && !/[.,]/u.test(whole);
  const isGroupedThroughout = GROUPED.test(body) && !hasOneMark;
  if (!isGroupedThroughout && mark && whole.includes(mark[2] ?? '')) return refuse(UNCLEAR);
  const wholePlain = isGroupedThroughout ? body : whole;
  if (wholePlain !== '' && !/^\d+$/u.test(wholePlain) && !GROUPED.test(wholePlain)) return refuse(UNCLEAR);

  const digits = wholePlain.replace(/\D/gu, '');
  if (digits.length > MAX_DIGITS || fraction.length > MAX_DIGITS) return refuse(TOO_LONG);
  const value = Number(`${digits || '0'}.${isGroupedThroughout ? '0' : fraction || '0'}`);
  return read(negative && value !== 0 ? -value : value);
}
