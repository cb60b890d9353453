import { jambBoard, jambGradients, type Frame } from './jamb-board.ts';
import { drawDifference, drawSmear, drawStroke, signed } from './jamb-marks.ts';
import {
  color,
  drawing,
  escapeText,
  px,
  scale,
  seedOf,
  spread,
  text,
  wobble,
  type ChartTable,
} from './svg.ts';

export interface JambMark {
  value: number;
  /** The day as it is pencilled: `7 Nov`. */
  day: string;
}

export interface Jamb {
  /** Unique on the page; also the seed of the hand. */
  id: string;
  /** The finding in one sentence, said instead of the drawing. */
  finding: string;
  /** What is counted: `push-ups`. */
  unit: string;
  /** Oldest first. The last is now; `beforeIndex` is what it is judged against (the one before, unless said). */
  marks: readonly JambMark[];
  beforeIndex?: number | undefined;
  /** Smallest real change on this person, in the unit; half the height of the smear. */
  error?: number | undefined;
  /** Published bands: where each begins and its word. */
  bands?: readonly { value: number; word: string }[];
  aim?: number | undefined;
  /** Times: the fewer the better. Turns the scale and says so. */
  lowerIsBetter?: boolean;
  /** How a value is written; plain by default. */
  format?: (value: number) => string;
  /** Scale to share between jambs; by default zero to somewhat above all values. */
  range?: { from: number; to: number } | undefined;
  size?: 'wall' | 'desk';
}

const LABEL_GAP_PX = 25;
const RIGHT_GAP_PX = 17;
const FRAMES: Record<'wall' | 'desk', Frame> = {
  wall: { width: 348, height: 440, boardX: 134, boardWidth: 92, top: 14, foot: 400 },
  desk: { width: 322, height: 300, boardX: 128, boardWidth: 66, top: 14, foot: 268 },
};

const plain = (value: number) => String(Math.round(value * 10) / 10);

/** From zero to the next round number above everything that is drawn. */
export function jambRange(jamb: Jamb): { from: number; to: number } {
  if (jamb.range) return jamb.range;
  const bands = (jamb.bands ?? []).map((band) => band.value);
  const marks = jamb.marks.map((mark) => mark.value);
  const highest = Math.max(0, ...marks.map((value) => value + (jamb.error ?? 0)), ...bands, jamb.aim ?? 0);
  return { from: 0, to: highest > 0 ? highest * 1.15 : 10 };
}

/** The marks that carry words: now, before and first always, then the newest, as many as find room. */
function labelled(count: number, before: number, room: number): number[] {
  const wanted = [count - 1, before, 0, ...Array.from({ length: count }, (_, index) => count - 1 - index)];
  return [...new Set(wanted)].filter((index) => index >= 0 && index < count).slice(0, Math.max(1, room));
}

/** The jamb: pencil marks on a door post, the test's own error as the thickness of the smear. */
export function drawJamb(jamb: Jamb): string {
  const { width, height, boardX, boardWidth, top, foot } = FRAMES[jamb.size ?? 'wall'];
  const frame = FRAMES[jamb.size ?? 'wall'];
  const format = jamb.format ?? plain;
  const { from, to } = jambRange(jamb);
  const y = jamb.lowerIsBetter ? scale(from, to, top + 18, foot) : scale(from, to, foot, top + 18);
  const random = wobble(seedOf(jamb.id));
  const right = boardX + boardWidth;
  const now = jamb.marks.at(-1);
  const nowIndex = jamb.marks.length - 1;
  const beforeIndex = jamb.beforeIndex ?? nowIndex - 1;
  const before = jamb.marks[beforeIndex];
  const parts = [jambBoard(frame, jamb.id)];

  if (before && jamb.error) parts.push(drawSmear(frame, jamb.id, y, before.value, jamb.error, random));
  for (const band of jamb.bands ?? []) {
    parts.push(
      `<path d="M${right - 26} ${px(y(band.value))}H${right}" stroke="${color('post-g')}" stroke-width="1.4"/>`,
    );
  }

  const words = [
    ...(jamb.bands ?? []).map((band) => ({
      at: y(band.value),
      kind: 'band' as const,
      value: band.value,
      word: band.word,
    })),
    ...(jamb.aim === undefined ? [] : [{ at: y(jamb.aim), kind: 'aim' as const, value: jamb.aim, word: '' }]),
    ...(before && jamb.error
      ? [{ at: y(before.value), kind: 'smear' as const, value: jamb.error, word: '' }]
      : []),
  ].sort((a, b) => a.at - b.at);
  const rightPlaces = spread(
    words.map((word) => word.at),
    RIGHT_GAP_PX,
    top,
    foot,
  );
  words.forEach((word, index) => {
    const place = rightPlaces[index] ?? word.at;
    const x = right + 18;
    if (Math.abs(place - word.at) > 3) {
      parts.push(
        `<path d="M${right + 9} ${px(word.at)}L${x - 3} ${px(place)}" stroke="${color('graphite-2')}" stroke-width=".9"/>`,
      );
    }
    if (word.kind === 'smear') {
      parts.push(
        text(x, place + 4.5, `smear ±${format(word.value)}`, { size: 13.5, fill: 'graphite', italic: true }),
      );
    } else if (word.kind === 'aim') {
      parts.push(
        `<path class="draw" pathLength="1" d="M${right - 40} ${px(word.at + 7)}l7-15 7 15" fill="none" stroke="${color('post-red')}" stroke-width="3" stroke-linecap="round"/>`,
        text(x, place + 4.5, `aim ${format(word.value)}`, { size: 13.5, fill: 'red', weight: 600 }),
      );
    } else {
      parts.push(
        `<text x="${x}" y="${px(place + 4.5)}" font-size="13.5" fill="${color('graphite')}"><tspan font-weight="600">${escapeText(format(word.value))}</tspan> ${escapeText(word.word)}</text>`,
      );
    }
  });

  const room = Math.floor((foot - top) / LABEL_GAP_PX);
  const named = labelled(jamb.marks.length, beforeIndex, Math.min(room, 9))
    .map((index) => ({ index, mark: jamb.marks[index], at: y(jamb.marks[index]?.value ?? from) }))
    .sort((a, b) => a.at - b.at);
  const places = spread(
    named.map((label) => label.at),
    LABEL_GAP_PX,
    top + 10,
    foot - 2,
  );
  jamb.marks.forEach((mark, index) => {
    parts.push(
      drawStroke(
        frame,
        y(mark.value),
        index === nowIndex ? 'now' : index === beforeIndex ? 'before' : 'old',
        index,
        random,
      ),
    );
  });
  named.forEach((label, order) => {
    if (!label.mark) return;
    const place = places[order] ?? label.at;
    const isNow = label.index === nowIndex;
    const strong = isNow || label.index === beforeIndex;
    if (Math.abs(place - label.at) > 3) {
      parts.push(
        `<path d="M${boardX - 11} ${px(label.at)}L${boardX - 17} ${px(place)}" stroke="${color('graphite-2')}"/>`,
      );
    }
    parts.push(
      `<g class="fade" style="--i:${Math.min(label.index, 8) * 3}"><text class="label" x="${boardX - 20}" y="${px(place + (isNow ? 8 : 5.5))}" text-anchor="end">` +
        `<tspan style="font-family:var(--font-hand)" font-size="${isNow ? 17 : 16}" fill="${color('blue')}">${escapeText(label.mark.day)}</tspan>` +
        `<tspan dx="7" font-size="${isNow ? 27 : 16.5}" font-weight="${strong ? 700 : 500}" fill="${color(isNow ? 'ink' : 'graphite')}">${escapeText(format(label.mark.value))}</tspan></text></g>`,
    );
  });

  if (before && now && now.value !== before.value)
    parts.push(drawDifference(frame, y, before.value, now.value, format));
  if (jamb.lowerIsBetter)
    parts.push(text(right + 18, foot - 4, 'up is faster', { size: 13, fill: 'graphite' }));
  if (from !== 0)
    parts.push(
      text(boardX - 20, foot + 4, `foot: ${format(from)}`, { size: 13, fill: 'graphite', anchor: 'end' }),
    );
  return drawing(width, height, jamb.finding, jambGradients(jamb.id) + parts.join(''), 'class="jamb"');
}

/** The marks as a table, newest first, with the change from each to the next. */
export function jambTable(jamb: Jamb): ChartTable {
  const format = jamb.format ?? plain;
  const rows = jamb.marks.map((mark, index) => {
    const earlier = jamb.marks[index - 1];
    return [mark.day, format(mark.value), earlier ? signed(mark.value - earlier.value, format) : '–'];
  });
  return { caption: `Marks, ${jamb.unit}`, head: ['Day', jamb.unit, 'Change'], rows: rows.reverse() };
}
