import type { Frame } from './jamb-board.ts';
import { color, escapeText, px, text } from './svg.ts';

/** A change with its sign: `+5`, `−2`, `±0`. */
export function signed(value: number, format: (value: number) => string): string {
  return `${value > 0 ? '+' : value < 0 ? '−' : '±'}${format(Math.abs(value))}`;
}

/** The band of no real change around the mark before: graphite, rubbed. */
export function drawSmear(
  frame: Frame,
  id: string,
  y: (value: number) => number,
  value: number,
  error: number,
  random: () => number,
): string {
  const { boardX, boardWidth } = frame;
  const high = Math.min(y(value + error), y(value - error));
  const low = Math.max(y(value + error), y(value - error));
  const strokes = Array.from({ length: 16 }, () => {
    const at = high + (low - high) * (0.06 + 0.88 * random());
    const start = boardX + 7 + random() * 16;
    const end = Math.min(start + 28 + random() * 22, boardX + boardWidth - 14);
    return `<path d="M${px(start)} ${px(at + 3)}L${px(end)} ${px(at - 3)}" stroke-width="${px(1 + random() * 2)}"/>`;
  }).join('');
  return (
    `<rect class="fade smear" x="${boardX + 5}" y="${px(high)}" width="${boardWidth - 17}" height="${px(low - high)}" fill="url(#${escapeText(id)}-smear)"/>` +
    `<g class="fade" stroke="${color('post-g')}" opacity=".13" stroke-linecap="round">${strokes}</g>` +
    `<path d="M${boardX + boardWidth + 3} ${px(high)}h5V${px(low)}h-5" fill="none" stroke="${color('graphite-2')}" stroke-width="1.2"/>`
  );
}

/** One pencil mark on the board; the present one carries the member's tick. */
export function drawStroke(
  frame: Frame,
  at: number,
  kind: 'now' | 'before' | 'old',
  index: number,
  random: () => number,
): string {
  const { boardX, boardWidth } = frame;
  const thick = { now: 4, before: 2.6, old: 1.8 }[kind];
  const length = kind === 'now' ? boardWidth - 22 : boardWidth - 34;
  const shake = () => (random() - 0.5) * 2.4;
  const order = Math.min(index, 8) * 3;
  const tick =
    kind === 'now'
      ? `<path class="draw mark" style="--i:${order + 4}" pathLength="1" d="M${boardX + 11} ${px(at - 18)}l8 10 4-25" fill="none" stroke="${color('post-blue')}" stroke-width="3.6" stroke-linecap="round" stroke-linejoin="round"/>`
      : '';
  return (
    `<path class="draw mark" style="--i:${order}" pathLength="1" d="M${boardX + 1} ${px(at + shake() * 0.4)}C${px(boardX + length * 0.3)} ${px(at + shake())} ${px(boardX + length * 0.6)} ${px(at + shake())} ${px(boardX + length)} ${px(at + shake() * 0.4)}" fill="none" stroke="${color('post-g')}" stroke-width="${thick}" stroke-linecap="round"/>` +
    `<path d="M${boardX - 11} ${px(at)}H${boardX - 1}" stroke="${color('graphite')}" stroke-width="${thick}" stroke-linecap="round"/>${tick}`
  );
}

/** From the mark before to the mark now, signed; the arrow only where there is room. */
export function drawDifference(
  frame: Frame,
  y: (value: number) => number,
  before: number,
  now: number,
  format: (value: number) => string,
): string {
  const { boardX, boardWidth } = frame;
  const [from, to] = [y(before), y(now)];
  const up = to < from ? 1 : -1;
  const wide = Math.abs(from - to) > 40;
  const x = boardX + boardWidth - (boardWidth < 70 ? 20 : 40);
  const arrow = wide
    ? `<path d="M${x} ${px(from - 3 * up)}V${px(to + 7 * up)}m-4 ${7 * up} 4 ${-7 * up} 4 ${7 * up}" fill="none" stroke="${color('post-g')}" stroke-width="1.8"/>`
    : '';
  const words = wide
    ? text(x - 6, (from + to) / 2 + 7, signed(now - before, format), {
        size: 15,
        weight: 700,
        fill: 'post-ink',
        anchor: 'end',
      })
    : text(boardX + boardWidth / 2 - 6, Math.max(from, to) + 18, signed(now - before, format), {
        size: 15,
        weight: 700,
        fill: 'post-ink',
        anchor: 'middle',
      });
  return `<g class="fade" style="--i:9">${arrow}${words}</g>`;
}
