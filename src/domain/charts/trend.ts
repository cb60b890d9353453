import { color, drawing, px, scale, text, type ChartTable } from './svg.ts';

export interface TrendPoint {
  /** Place in time, in any unit that is shared by all of the chart (days, weeks). */
  at: number;
  value: number;
  /** For the table: `7 Nov`. */
  day: string;
}

export interface TrendBand {
  at: number;
  low: number;
  high: number;
}

export interface Trend {
  finding: string;
  unit: string;
  points: readonly TrendPoint[];
  /** Runs of the interval band; a gap in the data is a gap between two runs. */
  bands: readonly (readonly TrendBand[])[];
  /** Words under the axis. */
  ticks: readonly { at: number; label: string }[];
  /** Where the coach changed the plan. */
  turns?: readonly { at: number; word: string; day: string }[];
  format?: (value: number) => string;
}

const [WIDTH, HEIGHT] = [560, 220];
const MARGIN = { left: 38, right: 14, top: 18, bottom: 34 };

const plain = (value: number) => String(Math.round(value * 10) / 10);

/** Steps of 1, 2 or 5 times a power of ten that cover a range in at most five lines. */
export function niceSteps(low: number, high: number): number[] {
  const span = Math.max(high - low, Number.EPSILON * Math.max(1, Math.abs(high)), 1e-6);
  const power = 10 ** Math.floor(Math.log10(span / 4));
  const step = [1, 2, 5, 10].map((factor) => factor * power).find((size) => span / size <= 4) ?? power * 10;
  const first = Math.floor(low / step);
  const last = Math.ceil(high / step);
  return Array.from({ length: last - first + 1 }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  );
}

/** A level that is only known within a band: line through its middle, marks as ticks, changes of plan as wedges. */
export function drawTrend(trend: Trend): string {
  const format = trend.format ?? plain;
  const edges = trend.bands.flat();
  const values = [
    ...trend.points.map((point) => point.value),
    ...edges.flatMap((edge) => [edge.low, edge.high]),
  ];
  const times = [...trend.points, ...edges, ...trend.ticks, ...(trend.turns ?? [])].map((thing) => thing.at);
  const steps = niceSteps(values.length ? Math.min(...values) : 0, values.length ? Math.max(...values) : 1);
  const [start, end] = times.length ? [Math.min(...times), Math.max(...times)] : [0, 1];
  const floor = HEIGHT - MARGIN.bottom;
  const x = scale(start, end, MARGIN.left + 8, WIDTH - MARGIN.right - 8);
  const y = scale(steps[0] ?? 0, steps.at(-1) ?? 1, floor, MARGIN.top);

  const grid = steps.map(
    (step) =>
      `<path d="M${MARGIN.left} ${px(y(step))}H${WIDTH - MARGIN.right}" stroke="${color('hair')}"/>` +
      text(MARGIN.left - 8, y(step) + 4.5, format(step), { size: 13, anchor: 'end', fill: 'graphite' }),
  );
  const ticks = trend.ticks.map(
    (tick) =>
      `<path d="M${px(x(tick.at))} ${floor}v5" stroke="${color('line')}"/>` +
      text(x(tick.at), HEIGHT - 10, tick.label, { size: 13, anchor: 'middle', fill: 'graphite' }),
  );
  const runs = trend.bands
    .filter((run) => run.length > 0)
    .map((run) => {
      const upper = run.map((edge) => `${px(x(edge.at))} ${px(y(edge.high))}`).join('L');
      const lower = [...run]
        .reverse()
        .map((edge) => `${px(x(edge.at))} ${px(y(edge.low))}`)
        .join('L');
      const middle = run.map((edge) => `${px(x(edge.at))} ${px(y((edge.low + edge.high) / 2))}`).join('L');
      return (
        `<path class="fade" d="M${upper}L${lower}Z" fill="${color('graphite')}" opacity=".17"/>` +
        `<path class="draw" pathLength="1" d="M${middle}" fill="none" stroke="${color('graphite')}" stroke-width="2.6"/>`
      );
    });
  const marks = trend.points.map(
    (point) =>
      `<path class="mark" d="M${px(x(point.at) - 5)} ${px(y(point.value) - 5)}l5 5 2.5-12" fill="none" stroke="${color('blue')}" stroke-width="2.2" stroke-linecap="round" stroke-linejoin="round"/>`,
  );
  const turns = (trend.turns ?? []).map((turn) => {
    const at = x(turn.at);
    const late = at > WIDTH * 0.7;
    return (
      `<path d="M${px(at)} ${floor - 12}V${MARGIN.top + 8}" stroke="${color('red')}" stroke-width="1.2" stroke-dasharray="2 4"/>` +
      `<path d="M${px(at - 6)} ${floor - 1}l6-12 6 12" fill="none" stroke="${color('red')}" stroke-width="2.6" stroke-linecap="round"/>` +
      text(at + (late ? -6 : 6), MARGIN.top + 8, turn.word, {
        size: 13,
        fill: 'red',
        weight: 600,
        anchor: late ? 'end' : 'start',
      })
    );
  });
  const axis = `<path d="M${MARGIN.left} ${floor}H${WIDTH - MARGIN.right}" stroke="${color('line')}"/>`;
  const content = [...grid, ...ticks, axis, ...runs, ...marks, ...turns].join('');
  return drawing(WIDTH, HEIGHT, trend.finding, content, 'class="trend"');
}

/** The marks, and the changes of plan between them, in the order they came. */
export function trendTable(trend: Trend): ChartTable {
  const format = trend.format ?? plain;
  const marks = trend.points.map((point) => ({ at: point.at, row: [point.day, format(point.value)] }));
  const turns = (trend.turns ?? []).map((turn) => ({
    at: turn.at,
    row: [turn.day, `changed: ${turn.word}`],
  }));
  const rows = [...marks, ...turns].sort((a, b) => a.at - b.at).map((entry) => entry.row);
  return { caption: `Marks over time, ${trend.unit}`, head: ['Day', trend.unit], rows };
}
