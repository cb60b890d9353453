import { color, escapeText, px } from './svg.ts';

/** Where a jamb stands in its drawing, in pixels. */
export interface Frame {
  width: number;
  height: number;
  boardX: number;
  boardWidth: number;
  top: number;
  foot: number;
}

/** The painted board with its moulding and shadow, on floor and skirting. */
export function jambBoard(frame: Frame, id: string): string {
  const { width, height, boardX: x, boardWidth, foot } = frame;
  const right = x + boardWidth;
  const floor = foot + 8;
  return (
    `<path d="M0 ${floor}H${width}" stroke="${color('line')}"/><rect x="0" y="${floor}" width="${width}" height="${px(height - floor)}" fill="${color('post')}"/>` +
    `<path d="M0 ${floor + 5.5}H${width}M0 ${floor + 9}H${width}" stroke="${color('post-line')}" stroke-width="1.2"/>` +
    `<rect x="${right}" y="0" width="13" height="${floor}" fill="${color('shade')}" opacity=".55"/>` +
    `<rect x="${x}" y="0" width="${boardWidth}" height="${height}" fill="${color('post')}"/>` +
    `<rect x="${x}" y="0" width="${boardWidth}" height="${height}" fill="url(#${escapeText(id)}-gloss)"/>` +
    `<path d="M${x + 0.5} 0V${height}M${right - 0.5} 0V${height}" stroke="${color('line')}"/>` +
    `<path d="M${x + 4.5} 0V${height}M${right - 12} 0V${height}M${right - 8} 0V${height}" stroke="${color('post-line')}" stroke-width="1.3"/>`
  );
}

/** The light on the board and the graphite of the smear. */
export function jambGradients(id: string): string {
  const name = escapeText(id);
  const stop = (at: number, token: string, opacity: number) =>
    `<stop offset="${at}" stop-color="${token}" stop-opacity="${opacity}"/>`;
  const graphite = color('post-g');
  const smear = [
    [0, 0.04],
    [0.22, 0.3],
    [0.5, 0.38],
    [0.78, 0.3],
    [1, 0.04],
  ] as const;
  return (
    `<defs><linearGradient id="${name}-gloss">${stop(0, '#fff', 0.5)}${stop(0.35, '#fff', 0)}${stop(1, '#000', 0.1)}</linearGradient>` +
    `<linearGradient id="${name}-smear" x2="0" y2="1">${smear.map(([at, opacity]) => stop(at, graphite, opacity)).join('')}</linearGradient></defs>`
  );
}
