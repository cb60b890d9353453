import { drawGate } from './fittings.ts';
import { countPosts, postHeight, type Post } from './posts.ts';
import { color, drawing, px, rect, type ChartTable } from './svg.ts';

export interface BalustradeWeek {
  /** Place on the axis, first = 0. */
  index: number;
  label: string;
  posts: readonly Post[];
  /** Weekly load done, in effort times minutes. */
  load: number;
  held?: boolean;
}

export interface Balustrade {
  finding: string;
  weeks: readonly BalustradeWeek[];
  /** How many weeks the axis holds. */
  span?: number;
  /** The same for all rows, so that they can be compared. */
  mostLoad: number;
  /** Before which weeks the coach changed the plan. */
  turns?: readonly number[];
}

const [WIDTH, HEIGHT] = [640, 64];
const FLOOR = HEIGHT - 6;

/** A member's weeks as one balustrade; the upper edge of the dado is the weekly load. No words inside: it stretches. */
export function drawBalustrade(strip: Balustrade): string {
  const cell = WIDTH / (strip.span ?? 12);
  const most = Math.max(strip.mostLoad, 1);
  const rail = (week: BalustradeWeek) =>
    FLOOR - 14 - (Math.min(Math.max(week.load, 0), most) / most) * (HEIGHT - 30);
  const dado = strip.weeks.map((week) =>
    rect(week.index * cell, rail(week) + 2, cell + 0.4, FLOOR - rail(week) - 2, `fill="${color('dado')}"`),
  );
  const posts = strip.weeks.map((week) => {
    const full = FLOOR - rail(week) - 3;
    const left = week.index * cell;
    if (week.held) return drawGate(left + 3, FLOOR, cell - 6, full - 2);
    return week.posts
      .map((post, place) => {
        const x = left + (cell * (place + 0.5)) / week.posts.length;
        if (post === 'to-come') return '';
        if (post === 'missed')
          return `<path d="M${px(x)} ${FLOOR - 1}v${px(3 - full)}" stroke="${color('on-dado')}" stroke-width="1.3" stroke-dasharray="2 4"/>`;
        return rect(
          x - 2.4,
          FLOOR - full * postHeight(post),
          4.8,
          full * postHeight(post),
          `fill="${color('post')}"`,
        );
      })
      .join('');
  });
  // A week without data stays a gap in the rail.
  const course = strip.weeks
    .map((week, place) => {
      const joined = strip.weeks[place - 1]?.index === week.index - 1;
      return `${joined ? 'L' : 'M'}${px(week.index * cell)} ${px(rail(week))}L${px((week.index + 1) * cell)} ${px(rail(week))}`;
    })
    .join('');
  const wood = course
    ? `<path d="${course}" fill="none" stroke="${color('rail-mark')}" stroke-width="4.5" stroke-linejoin="round"/>`
    : '';
  const turns = (strip.turns ?? []).map(
    (index) =>
      `<path d="M${px(index * cell - 6.5)} ${FLOOR + 3}l6.5-13 6.5 13Z" fill="${color('wall')}" stroke="${color('red')}" stroke-width="3" stroke-linejoin="round"/>`,
  );
  const content =
    dado.join('') +
    posts.join('') +
    wood +
    `<path d="M0 ${FLOOR}H${WIDTH}" stroke="${color('line')}"/>` +
    turns.join('');
  return drawing(WIDTH, HEIGHT + 2, strip.finding, content, 'class="stretch" preserveAspectRatio="none"');
}

/** Week by week: sessions, load, and what the coach changed. */
export function balustradeTable(strip: Balustrade): ChartTable {
  return {
    caption: 'Sessions and load',
    head: ['Week', 'Sessions', 'Load', 'Plan'],
    rows: strip.weeks.map((week) => [
      week.label,
      countPosts(week.posts),
      String(week.load),
      week.held ? 'held' : strip.turns?.includes(week.index) ? 'changed' : '–',
    ]),
  };
}
