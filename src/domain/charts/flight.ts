import { drawGate, drawLandingPost, drawNewel } from './fittings.ts';
import { countPosts, postHeight, type Post } from './posts.ts';
import { color, drawing, escapeText, px, rect, text, wrapWords, type ChartTable } from './svg.ts';

export interface FlightWeek {
  /** 1 to 12. */
  week: number;
  title: string;
  /** Weekly load asked, in effort times minutes; the height of the rise. */
  load: number;
  sessions: readonly Post[];
  /** Weeks 4, 8 and 12: a test day, with its date. */
  landing?: { day: string } | undefined;
  href?: string | undefined;
  /** What is said of a week to come instead of `to come`. */
  note?: string | undefined;
}

export interface Flight {
  finding: string;
  weeks: readonly FlightWeek[];
  /** The present week; 0 before the first. */
  here: number;
  /** The words beside the tick; left out when empty. */
  hereWords?: string;
  /** Held: the gate stands across this week. */
  gateAt?: number | undefined;
}

/** A week with its place in the drawing: left edge, height of the tread board, width. */
interface Tread extends FlightWeek {
  x: number;
  y: number;
  width: number;
}

const WIDTH = 1200;
const LEFT = 74;
const RIGHT = 26;
const BASE = 104;
const RAIL_HEIGHT = 74;
const RISE_PER_LOAD = 0.07;
const LANDING_WIDTH = 1.28;

const railY = (tread: Tread) => tread.y - RAIL_HEIGHT;
const profile = (treads: readonly Tread[]) =>
  treads
    .map((tread) => `L${px(tread.x)} ${px(tread.y)}L${px(tread.x + tread.width)} ${px(tread.y)}`)
    .join('');

/** Places the treads; the height of the drawing follows from the sum of the loads. */
function layOut(weeks: readonly FlightWeek[]): { treads: Tread[]; height: number } {
  const rise = (week: FlightWeek) => Math.max(0, week.load) * RISE_PER_LOAD;
  const share = (week: FlightWeek) => (week.landing ? LANDING_WIDTH : 1);
  const unit =
    (WIDTH - LEFT - RIGHT) /
    Math.max(
      1,
      weeks.reduce((sum, week) => sum + share(week), 0),
    );
  const height = RAIL_HEIGHT + 44 + weeks.reduce((sum, week) => sum + rise(week), 0) + BASE;
  let [x, y] = [LEFT, height - BASE];
  const treads = weeks.map((week) => {
    const tread = { ...week, x, y: (y -= rise(week)), width: unit * share(week) };
    x += tread.width;
    return tread;
  });
  return { treads, height };
}

/** The flight from the side: what was done is painted wood, what is to come a dashed pencil drawing. */
export function drawFlight(flight: Flight): string {
  const { treads, height } = layOut(flight.weeks);
  const floor = height - 14;
  const built = treads.filter((tread) => tread.week <= flight.here);
  const toCome = treads.filter((tread) => tread.week > flight.here);
  const last = built.at(-1);
  const first = treads[0];
  const parts: string[] = [];
  if (last) {
    const upper = built
      .map(
        (tread) =>
          `L${px(tread.x)} ${px(railY(tread) + 8)}L${px(tread.x + tread.width)} ${px(railY(tread) + 8)}`,
      )
      .join('');
    const end = px(last.x + last.width);
    parts.push(
      `<path d="M${LEFT} ${px(height - BASE)}${upper}L${end} ${px(height - BASE)}Z" fill="${color('dado')}"/>`,
      `<path d="M${LEFT} ${px(floor)}${profile(built)}L${end} ${px(floor)}Z" fill="${color('post')}" stroke="${color('line')}"/>`,
    );
  }
  parts.push(drawToCome(toCome, last?.y ?? height - BASE, floor));
  parts.push(
    rect(0, floor, WIDTH, 14, `fill="${color('post')}"`),
    `<path d="M0 ${px(floor)}H${WIDTH}M0 ${px(floor + 5)}H${WIDTH}" stroke="${color('line')}"/>`,
    ...built.map((tread) => drawBalusters(tread, floor, tread.week === flight.here)),
    ...treads.map((tread) => drawTread(tread, flight.here)),
    drawRails(built, toCome),
  );
  const gated = treads.find((tread) => tread.week === flight.gateAt);
  if (gated) parts.push(drawHeld(gated));
  if (first) {
    const newelHeight = floor - (height - BASE) + first.load * RISE_PER_LOAD + RAIL_HEIGHT + 30;
    parts.push(drawNewel(LEFT - 26, floor, newelHeight));
  }
  if (last && flight.hereWords) parts.push(drawHere(last, flight.hereWords));
  return drawing(WIDTH, height, flight.finding, parts.join(''), 'class="flight"');
}

function drawToCome(toCome: readonly Tread[], from: number, floor: number): string {
  const next = toCome[0];
  if (!next) return '';
  const risers = toCome.map((tread) => `M${px(tread.x)} ${px(tread.y + 6)}V${px(floor - 2)}`).join('');
  return (
    `<path d="M${px(next.x)} ${px(from)}${profile(toCome)}V${px(floor)}" fill="none" stroke="${color('graphite-2')}" stroke-width="1.6" stroke-dasharray="6 5"/>` +
    `<path d="${risers}" stroke="${color('graphite-2')}" stroke-dasharray="2 6" opacity=".6"/>`
  );
}

/** Panel, tread board and the three posts of a built week. */
function drawBalusters(tread: Tread, floor: number, present: boolean): string {
  const full = RAIL_HEIGHT - 8;
  const posts = tread.sessions.map((post, index) => {
    const x = tread.x + (tread.width * (index + 0.5)) / tread.sessions.length;
    if (post === 'to-come')
      return `<path d="M${px(x)} ${px(tread.y)}v${-full}" stroke="${color('on-dado')}" stroke-dasharray="1 5" opacity=".55"/>`;
    if (post === 'missed')
      return `<path d="M${px(x)} ${px(tread.y - 2)}v${4 - full}" stroke="${color('on-dado')}" stroke-width="1.6" stroke-dasharray="4 5"/>`;
    const tall = full * postHeight(post);
    return rect(x - 3.5, tread.y - tall, 7, tall, `rx="1" fill="${color('post')}"`);
  });
  const board = tread.landing
    ? `fill="${color('rail')}" stroke="${color('rail-lo')}"`
    : `fill="${color('post')}" stroke="${color('line')}"`;
  return (
    rect(
      tread.x + 6,
      tread.y + 16,
      tread.width - 12,
      floor - 10 - tread.y - 16,
      `fill="${present ? color('post-2') : 'none'}" stroke="${color('post-line')}"`,
    ) +
    posts.join('') +
    rect(tread.x - 5, tread.y - 2, tread.width + 5, 8, `rx="4" ${board}`)
  );
}

/** Number and title under the tread; a landing's post and date above it. */
function drawTread(tread: Tread, here: number): string {
  const built = tread.week <= here;
  const ink = built ? 'post-ink' : 'ink-2';
  const lines = wrapWords(tread.title, Math.floor((tread.width - 16) / 6.7)).slice(0, 4);
  const words = lines.map((line, row) =>
    text(tread.x + 13, tread.y + 55 + row * 14.5, line, { size: 13, fill: ink }),
  );
  const number = text(tread.x + 13, tread.y + 37, tread.week, {
    size: 19,
    weight: 700,
    fill: tread.week === here ? 'post-blue' : ink,
  });
  if (!tread.landing) return number + words.join('');
  const tall = RAIL_HEIGHT + 22;
  const post = built
    ? drawLandingPost(tread.x + 1, tread.y, tall)
    : `<path d="M${px(tread.x - 5)} ${px(tread.y)}v${-tall}h12v${tall}" fill="none" stroke="${color('graphite-2')}" stroke-width="1.3" stroke-dasharray="4 4"/>`;
  const day = text(tread.x + 14, railY(tread) - 22, tread.landing.day, {
    size: 13,
    weight: 600,
    fill: built ? 'ink' : 'ink-2',
  });
  return number + words.join('') + post + day;
}

/** The handrail: wood where built, a dashed line to come. */
function drawRails(built: readonly Tread[], toCome: readonly Tread[]): string {
  const course = (treads: readonly Tread[]) =>
    treads
      .map((tread, index) => {
        const earlier = treads[index - 1];
        const at = `${px(tread.x + tread.width / 2)} ${px(railY(tread))}`;
        return earlier
          ? `C${px(tread.x)} ${px(railY(earlier))} ${px(tread.x)} ${px(railY(tread))} ${at}`
          : at;
      })
      .join('');
  const [first, last, next] = [built[0], built.at(-1), toCome[0]];
  const wood =
    first && last
      ? `M${LEFT - 20} ${px(railY(first) + 8)}L${course(built)}L${px(last.x + last.width)} ${px(railY(last))}`
      : '';
  const rail = (token: string, thick: number, shift: number, extra = '') =>
    `<path ${extra}d="${wood}" fill="none" stroke="${color(token)}" stroke-width="${thick}" stroke-linecap="round" transform="translate(0 ${shift})"/>`;
  return (
    (wood &&
      rail('rail-lo', 11, 1.5) +
        rail('rail', 9, 0, 'class="draw" pathLength="1" ') +
        rail('rail-hi', 2, -2.5)) +
    (next
      ? `<path d="M${px(next.x)} ${px(railY(last ?? next))}L${course(toCome)}" fill="none" stroke="${color('graphite-2')}" stroke-width="1.6" stroke-dasharray="7 5"/>`
      : '')
  );
}

function drawHeld(tread: Tread): string {
  return (
    drawGate(tread.x + 5, tread.y, tread.width - 8, RAIL_HEIGHT + 18, { stroke: 'ink', width: 6, bars: 5 }) +
    rect(
      tread.x - 6,
      tread.y - RAIL_HEIGHT * 0.62,
      20,
      15,
      `rx="2" fill="${color('brass')}" stroke="${color('ink')}" stroke-width="1.5"`,
    ) +
    text(tread.x + tread.width / 2, railY(tread) - 34, 'held', { size: 16, weight: 700, anchor: 'middle' })
  );
}

function drawHere(last: Tread, words: string): string {
  const x = last.x + last.width / 2;
  const y = railY(last);
  return (
    `<g class="fade"><path d="M${px(x - 9)} ${px(y - 22)}l8 11 5-27" fill="none" stroke="${color('blue')}" stroke-width="4" stroke-linecap="round" stroke-linejoin="round"/>` +
    `<text x="${px(x - 14)}" y="${px(y - 27)}" text-anchor="end" font-size="20" fill="${color('blue')}" style="font-family:var(--font-hand)">${escapeText(words)}</text></g>`
  );
}

/** Every week in words: lesson, sessions, load. */
export function flightTable(flight: Flight): ChartTable {
  return {
    caption: 'The flight, week by week',
    head: ['Week', 'Lesson', 'Sessions', 'Load'],
    rows: flight.weeks.map((week) => [
      String(week.week),
      week.landing ? `${week.title} (landing, ${week.landing.day})` : week.title,
      week.week <= flight.here ? countPosts(week.sessions) : 'to come',
      String(week.load),
    ]),
  };
}
