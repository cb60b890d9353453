import { color, drawing, px, rect, text, type ChartTable } from './svg.ts';

export interface Pace {
  finding: string;
  /** How many in each ten seconds. */
  counts: readonly number[];
  /** The whole count of the last mark: its even pace is pencilled. */
  lastTotal?: number | undefined;
  /** The length of the test in tens of seconds; the treads so far when left out. */
  bins?: number | undefined;
}

const [WIDTH, HEIGHT] = [340, 150];
const [EDGE, FLOOR, HEAD] = [6, 124, 20];

/** The pace of a test: each ten seconds is a tread, its rise the count in them. */
export function drawPace(pace: Pace): string {
  const bins = Math.max(pace.bins ?? 0, pace.counts.length, 1);
  const total = pace.counts.reduce((sum, count) => sum + count, 0);
  const most = Math.max(total, pace.lastTotal ?? 0, 1);
  const x = (bin: number) => EDGE + (bin * (WIDTH - EDGE * 2)) / bins;
  const y = (count: number) => FLOOR - (count / most) * (FLOOR - HEAD);
  let sum = 0;
  let course = `M${px(x(0))} ${px(y(0))}`;
  const treads = pace.counts.map((count, bin) => {
    sum += count;
    course += `V${px(y(sum))}H${px(x(bin + 1))}`;
    return (
      rect(x(bin), y(sum), x(1) - x(0), FLOOR - y(sum), `fill="${color('wood')}"`) +
      text((x(bin) + x(bin + 1)) / 2, y(sum) - 7, `+${count}`, { size: 15, weight: 700, anchor: 'middle' })
    );
  });
  // Seconds stand under every tread as long as they have room, then under every third.
  const every = bins > 9 ? 3 : 1;
  const seconds = Array.from({ length: bins + 1 }, (_, bin) =>
    bin % every === 0 || bin === bins
      ? text(x(bin), HEIGHT - 8, bin * 10, {
          size: 13,
          fill: 'ink-2',
          anchor: bin === 0 ? 'start' : bin === bins ? 'end' : 'middle',
        })
      : '',
  );
  const even = pace.lastTotal
    ? `<path d="M${px(x(0))} ${px(y(0))}L${px(x(bins))} ${px(y(pace.lastTotal))}" stroke="${color('graphite-2')}" stroke-width="1.3" stroke-dasharray="5 5"/>`
    : '';
  const content =
    treads.join('') +
    even +
    `<path class="draw" pathLength="1" d="${course}" fill="none" stroke="${color('ink')}" stroke-width="3"/>` +
    `<path d="M${EDGE} ${FLOOR}H${WIDTH - EDGE}" stroke="${color('line')}" stroke-width="1.5"/>${seconds.join('')}`;
  return drawing(WIDTH, HEIGHT, pace.finding, content, 'class="pace"');
}

/** Ten seconds a row: how many, and how many so far. */
export function paceTable(pace: Pace): ChartTable {
  let sum = 0;
  return {
    caption: 'Count in each ten seconds',
    head: ['Seconds', 'Count', 'So far'],
    rows: pace.counts.map((count, bin) => {
      sum += count;
      return [`${bin * 10} to ${bin * 10 + 10}`, String(count), String(sum)];
    }),
  };
}
