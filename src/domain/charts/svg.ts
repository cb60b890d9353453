/** The few words of SVG that every drawing of the house is written with. Pure: values in, text out. */

const ESCAPES: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text made safe for element content and for attributes in double quotes. */
export function escapeText(value: string | number): string {
  return String(value).replace(/[&<>"']/g, (sign) => ESCAPES[sign] ?? sign);
}

/**
 * A length or place, to a tenth of a pixel.
 * @throws RangeError for NaN and infinities, so that none is ever drawn
 */
export function px(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError('a drawing was given a length that is no number');
  return String(Math.round(value * 10) / 10);
}

/** The drawing's token as a CSS colour: `color('post')` is `var(--color-post)`. */
export function color(token: string): string {
  return `var(--color-${token})`;
}

interface TextLook {
  /** Pixels; never under 13 as shown. */
  size?: number;
  fill?: string;
  weight?: number;
  anchor?: 'start' | 'middle' | 'end';
  /** Pencilled: a date, a word or two. */
  hand?: boolean;
  italic?: boolean;
}

/** One line of text, escaped. */
export function text(x: number, y: number, words: string | number, look: TextLook = {}): string {
  const { size = 14, fill = 'ink', weight, anchor, hand, italic } = look;
  const extra =
    (anchor && anchor !== 'start' ? ` text-anchor="${anchor}"` : '') +
    (weight ? ` font-weight="${weight}"` : '') +
    (italic ? ' font-style="italic"' : '') +
    (hand ? ' style="font-family:var(--font-hand)"' : '');
  return `<text x="${px(x)}" y="${px(y)}" font-size="${size}" fill="${color(fill)}"${extra}>${escapeText(words)}</text>`;
}

export function rect(x: number, y: number, width: number, height: number, attributes: string): string {
  return `<rect x="${px(x)}" y="${px(y)}" width="${px(Math.max(0, width))}" height="${px(Math.max(0, height))}" ${attributes}/>`;
}

/** Breaks a title into lines of at most `length` characters; a longer word stays whole. */
export function wrapWords(words: string, length: number): string[] {
  const lines: string[] = [];
  for (const word of words.split(/\s+/).filter(Boolean)) {
    const last = lines.at(-1);
    if (last !== undefined && `${last} ${word}`.length <= length) lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(word);
  }
  return lines;
}

/** A line through a value range; a range without width is drawn in its middle. */
export function scale(from: number, to: number, start: number, end: number): (value: number) => number {
  const span = to - from;
  return (value) => (span === 0 ? (start + end) / 2 : start + ((value - from) / span) * (end - start));
}

/**
 * Places for labels that want to stand at `wanted` (in rising order), at least `gap` apart and within `low` to `high`
 * as long as there is room: first pushed down, then the overflow pushed up.
 */
export function spread(wanted: readonly number[], gap: number, low: number, high: number): number[] {
  const places: number[] = [];
  for (const want of wanted) places.push(Math.max(want, low, (places.at(-1) ?? -Infinity) + gap));
  let ceiling = high;
  for (let index = places.length - 1; index >= 0; index -= 1) {
    const place = Math.min(places[index] ?? high, ceiling);
    places[index] = place;
    ceiling = place - gap;
  }
  return places;
}

/** A repeatable wobble of the hand: the same seed draws the same line. */
export function wobble(seed: number): () => number {
  let state = (Math.abs(Math.trunc(seed)) % 2147483646) + 1;
  return () => {
    state = (state * 16807) % 2147483647;
    return state / 2147483647;
  };
}

/** A seed from a name, so that a chart keeps its hand from one day to the next. */
export function seedOf(name: string): number {
  let seed = 7;
  for (const letter of name) seed = (seed * 31 + (letter.codePointAt(0) ?? 0)) % 2147483647;
  return seed;
}

/** A whole drawing that says its finding to those who do not see it: one tab stop. */
export function drawing(
  width: number,
  height: number,
  finding: string,
  content: string,
  attributes = '',
): string {
  return (
    `<svg viewBox="0 0 ${px(width)} ${px(height)}" width="${px(width)}" height="${px(height)}" role="img" tabindex="0" ` +
    `aria-label="${escapeText(finding)}"${attributes && ` ${attributes}`}>${content}</svg>`
  );
}

/** What **Read as table** shows: the same values that are drawn, as words. */
export interface ChartTable {
  caption: string;
  /** Figures from the second column on stand right. */
  head: readonly string[];
  rows: readonly (readonly string[])[];
}
