import { color, drawing, px, scale } from './svg.ts';

export interface JambRow {
  finding: string;
  before?: number | undefined;
  now?: number | undefined;
  /** Smallest real change, in the same unit. */
  error?: number | undefined;
  /** One scale for all rows, so that they can be compared. */
  from: number;
  to: number;
  lowerIsBetter?: boolean;
}

const [WIDTH, HEIGHT] = [54, 80];
const [BOARD_X, BOARD_WIDTH] = [8, 38];

/** The small jamb of a caseload row: mark before, mark now, the smear, no words (they stand beside it). */
export function drawJambRow(row: JambRow): string {
  const ends: [number, number] = row.lowerIsBetter ? [6, HEIGHT - 6] : [HEIGHT - 6, 6];
  const y = scale(row.from, row.to, ...ends);
  const { before, now, error } = row;
  const smear =
    before !== undefined && error
      ? `<rect class="smear" x="${BOARD_X + 2}" y="${px(Math.min(y(before + error), y(before - error)))}" width="${BOARD_WIDTH - 4}" height="${px(Math.abs(y(before + error) - y(before - error)))}" fill="${color('post-g')}" opacity=".28"/>`
      : '';
  const stroke = (value: number, thick: number, length: number) =>
    `<path class="mark" d="M${BOARD_X} ${px(y(value))}h${length}" stroke="${color('post-g')}" stroke-width="${thick}" stroke-linecap="round"/>`;
  const tick =
    now === undefined
      ? ''
      : `${stroke(now, 3.4, 30)}<path class="mark" d="M${BOARD_X + 6} ${px(y(now) - 9)}l5 6 2.5-14" fill="none" stroke="${color('post-blue')}" stroke-width="2.6" stroke-linecap="round" stroke-linejoin="round"/>`;
  return drawing(
    WIDTH,
    HEIGHT,
    row.finding,
    `<rect x="${BOARD_X}" y="0" width="${BOARD_WIDTH}" height="${HEIGHT}" fill="${color('post')}" stroke="${color('line')}"/>` +
      smear +
      (before === undefined ? '' : stroke(before, 1.8, 22)) +
      tick,
  );
}
