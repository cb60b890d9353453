import { read, refuse, tidy, type Parsed } from './result.ts';

const HINT = 'Write minutes and seconds like 3:05, or 185 s.';
const CLOCK = /^(?:(\d{1,2}):)?(\d{1,3}):(\d{1,2})(?:[.,](\d))?$/u;
const HOUR = '(?:h|hrs?|hours?)';
const MINUTE = `(?:m|mins?|minutes?|['’′])`;
const SECOND = `(?:s|secs?|seconds?|["”″]|'')`;
const NUMBER = String.raw`(\d+(?:[.,]\d+)?)`;
const WORDS = new RegExp(
  `^(?:${NUMBER} ?${HOUR}\\.?)?,? ?(?:${NUMBER} ?${MINUTE}\\.?)?(?:,| and)? ?(?:${NUMBER} ?${SECOND}?\\.?)?$`,
  'iu',
);

const toNumber = (text: string | undefined): number => Number((text ?? '0').replace(',', '.'));
const isFraction = (text: string | undefined): boolean => text !== undefined && /[.,]/u.test(text);

/** Hours, minutes and seconds written with a colon. One digit after the colon is refused: 3:5 may be 3:05 or 3:50. */
function readClock(match: RegExpExecArray): Parsed<number> {
  const [, hours, minutes = '0', seconds = '0', tenths] = match;
  if (seconds.length < 2)
    return refuse(
      `${minutes}:${seconds} may be ${minutes}:0${seconds} or ${minutes}:${seconds}0. Write both digits.`,
    );
  if (Number(seconds) > 59) return refuse('Seconds run from 00 to 59.');
  if (hours !== undefined && Number(minutes) > 59) return refuse('Minutes run from 00 to 59.');
  return read(
    Math.round(Number(hours ?? 0) * 3600 + Number(minutes) * 60 + Number(`${seconds}.${tenths ?? 0}`)),
  );
}

/**
 * A duration in whole seconds as people type it: '3:05', '1:02:03', '3 min 5', '3.5 min', '185 s', '3′05″'. A bare whole
 * number is seconds. '12.30' is refused: it may be 12:30 or 12.3 minutes.
 */
export function parseDuration(text: string): Parsed<number> {
  const typed = tidy(text);
  if (typed === '') return refuse('A time is missing.');
  if (/^- ?\d/u.test(typed)) return refuse('A time cannot be below zero.');
  const clock = CLOCK.exec(typed.replace(/ ?: ?/gu, ':').replace(/ ?(?:min|mins|minutes|h)$/iu, ''));
  if (clock) return readClock(clock);
  if (/^\d+[.,]\d+$/u.test(typed)) {
    const [whole = '', part = ''] = typed.split(/[.,]/u);
    return refuse(
      `${typed} may be ${whole}:${part.padStart(2, '0').slice(0, 2)} or a share of a minute. ${HINT}`,
    );
  }
  const words = WORDS.exec(typed);
  if (!words) return refuse(HINT);
  const [, hours, minutes, seconds] = words;
  if ([hours, minutes, seconds].every((part) => part === undefined)) return refuse(HINT);
  const hasLarger = hours !== undefined || minutes !== undefined;
  // A share of a minute is only clear when nothing smaller follows it.
  if ((isFraction(hours) && (minutes ?? seconds)) || (isFraction(minutes) && seconds)) return refuse(HINT);
  if (hasLarger && toNumber(seconds) > 59.99) return refuse('Seconds run from 0 to 59.');
  const total = toNumber(hours) * 3600 + toNumber(minutes) * 60 + toNumber(seconds);
  return total > 359_999 ? refuse('This is longer than four days. Check the time.') : read(Math.round(total));
}
