import { color, drawing, px } from './svg.ts';

/** What a member's month looks like in the ledger; `null` before they came and after they left. */
export type Peg = 'coach' | 'lessons' | 'pair' | 'free' | 'trial' | 'failed' | 'left' | null;

export type PegSize = 'large' | 'middle' | 'small';

export interface Pegs {
  finding: string;
  /** One list a member in the order they came, one entry a month, oldest first. */
  columns: readonly (readonly Peg[])[];
  months: number;
}

/** The height of a month's row, in pixels; the sums beside it stand in rows of the same height. */
export const PEG_ROW_PX = 33;

const COLUMN_PX: Record<PegSize, number> = { large: 13, middle: 7, small: 3.6 };

/** The ledger's drawing: a row a month, a column a member, a dot by plan. */
export function drawPegs(pegs: Pegs, size: PegSize): string {
  const column = COLUMN_PX[size];
  const width = Math.max(column * pegs.columns.length, column);
  const height = pegs.months * PEG_ROW_PX;
  const lines = Array.from(
    { length: pegs.months },
    (_, month) => `M0 ${px((month + 1) * PEG_ROW_PX - 0.5)}H${px(width)}`,
  ).join('');
  const dots = pegs.columns.map((months, index) => {
    const x = column * (index + 0.5);
    const here = months.flatMap((peg, month) => (peg && peg !== 'left' ? [month] : []));
    const [first, last] = [here[0], here.at(-1)];
    const string =
      first === undefined || last === undefined
        ? ''
        : `<path d="M${px(x)} ${px(first * PEG_ROW_PX + 9)}V${px((last + 1) * PEG_ROW_PX - 16.5)}" stroke="${color('brass')}" stroke-width="${size === 'small' ? 0.8 : 1.6}" opacity=".7"/>`;
    return string + months.map((peg, month) => drawPeg(peg, x, (month + 0.5) * PEG_ROW_PX, column)).join('');
  });
  return drawing(
    width,
    height,
    pegs.finding,
    `<path d="${lines}" stroke="${color('hair')}"/>${dots.join('')}`,
    `class="pegs-${size}"`,
  );
}

function drawPeg(peg: Peg, x: number, y: number, column: number): string {
  const radius = column * 0.36;
  const solid = (cy: number, r: number) =>
    `<circle cx="${px(x)}" cy="${px(cy)}" r="${px(r)}" fill="${color('peg')}"/>`;
  const ring = (dash: string) =>
    `<circle cx="${px(x)}" cy="${px(y)}" r="${px(radius)}" fill="${color('paper')}" stroke="${color('ink')}" stroke-width="${px(Math.max(1, column * 0.14))}"${dash}/>`;
  if (peg === 'coach') return solid(y, radius);
  if (peg === 'lessons') return solid(y, radius * 0.6);
  if (peg === 'pair') return solid(y - radius * 0.8, radius) + solid(y + radius * 0.8, radius);
  if (peg === 'free') return ring('');
  if (peg === 'trial') return ring(` stroke-dasharray="${px(column * 0.2)}"`);
  if (peg === 'failed')
    return `<rect x="${px(x - radius)}" y="${px(y - radius)}" width="${px(radius * 2)}" height="${px(radius * 2)}" fill="${color('nosing')}" stroke="${color('on-nosing')}"/>`;
  if (peg === 'left')
    return `<path d="M${px(x - radius)} ${px(y - PEG_ROW_PX * 0.4)}h${px(radius * 2)}" stroke="${color('ink')}" stroke-width="2"/>`;
  return '';
}

/** How many of each kind stand in a month, counted from the same columns. */
export function countPegs(pegs: Pegs, month: number): Record<Exclude<Peg, null>, number> {
  const counts = { coach: 0, lessons: 0, pair: 0, free: 0, trial: 0, failed: 0, left: 0 };
  for (const months of pegs.columns) {
    const peg = months[month];
    if (peg) counts[peg] += 1;
  }
  return counts;
}
