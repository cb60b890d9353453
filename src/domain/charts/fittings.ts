import { color, px, rect } from './svg.ts';

/** The newel: the two-ended pencil with its brass collar, standing with its foot at x, y. */
export function drawNewel(x: number, y: number, height: number, width = 26): string {
  const top = y - (height - width * 1.5);
  const collar = y - (y - top) * 0.46;
  const left = x - width / 2;
  return (
    `<g>${rect(left, collar, width, y - collar, `fill="${color('red-lacquer')}"`)}` +
    rect(left, top, width, collar - top, `fill="${color('blue-lacquer')}"`) +
    rect(left, top, width * 0.3, y - top, 'fill="#fff" opacity=".2"') +
    rect(x + width * 0.22, top, width * 0.28, y - top, 'fill="#000" opacity=".22"') +
    rect(left, collar - 7, width, 14, `fill="${color('brass')}"`) +
    `<path d="M${px(left)} ${px(collar - 3)}h${width}m0 6h${-width}" stroke="${color('dusk')}"/>` +
    `<path d="M${px(left)} ${px(top)}L${px(x)} ${px(y - height)}L${px(x + width / 2)} ${px(top)}` +
    `q${px(-width / 4)} ${px(width * 0.24)} ${px(-width / 2)} 0q${px(-width / 4)} ${px(width * 0.24)} ${px(-width / 2)} 0Z" fill="${color('bare')}"/>` +
    `<path d="M${px(x - width * 0.19)} ${px(y - height + width * 0.57)}L${px(x)} ${px(y - height)}l${px(width * 0.19)} ${px(width * 0.57)}Z" fill="${color('blue-lacquer')}"/></g>`
  );
}

/** The post of a landing: brown, with a ball on top. */
export function drawLandingPost(x: number, y: number, height: number): string {
  return (
    rect(x - 7, y - height, 14, height, `fill="${color('rail')}"`) +
    rect(x - 7, y - height, 4, height, `fill="${color('rail-hi')}"`) +
    rect(x - 10, y - height - 4, 20, 6, `rx="2" fill="${color('rail-hi')}"`) +
    `<circle cx="${px(x)}" cy="${px(y - height - 10)}" r="7.5" fill="${color('rail')}"/>`
  );
}

interface GateLook {
  stroke?: string;
  width?: number;
  bars?: number;
}

/** The stair gate of a held plan, standing on x, y. */
export function drawGate(x: number, y: number, width: number, height: number, look: GateLook = {}): string {
  const { stroke = 'nosing', width: thick = 1.8, bars = 4 } = look;
  const upright = Array.from(
    { length: bars + 1 },
    (_, bar) => `M${px(x + (width * bar) / bars)} ${px(y)}v${px(-height)}`,
  ).join('');
  return (
    `<path d="${upright}M${px(x)} ${px(y - height * 0.9)}h${px(width)}M${px(x)} ${px(y - height * 0.12)}h${px(width)}" ` +
    `fill="none" stroke="${color(stroke)}" stroke-width="${thick}"/>`
  );
}
