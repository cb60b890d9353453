import type { Flight, FlightWeek } from './flight.ts';
import { countPosts, drawPosts } from './posts.ts';
import { escapeText } from './svg.ts';

/** What is said of a week under its title. */
function state(week: FlightWeek, flight: Flight): string {
  if (week.week === flight.gateAt) return 'held';
  if (week.week === flight.here) return 'you are here';
  if (week.landing) return `landing, ${week.landing.day}`;
  return week.week < flight.here ? countPosts(week.sessions) : (week.note ?? 'to come');
}

/** The flight on a phone: an ordered list, the last week on top, each row one tread further in. */
export function drawFlightRows(flight: Flight): string {
  const rows = [...flight.weeks].reverse().map((week) => {
    const built = week.week <= flight.here;
    const here = week.week === flight.here;
    const looks = [
      built ? 'built' : 'next',
      here && 'here',
      week.landing && 'land',
      week.week === flight.gateAt && 'gated',
    ].filter(Boolean);
    const inside =
      `<span class="week">${week.week}</span>` +
      `<span class="title">${escapeText(week.title)}<small>${escapeText(state(week, flight))}</small></span>` +
      (built ? drawPosts(week.sessions) : '');
    const row = week.href ? `<a href="${escapeText(week.href)}">${inside}</a>` : `<div>${inside}</div>`;
    return `<li style="--w:${week.week};--load:${Math.max(0, Math.round(week.load))}" class="${looks.join(' ')}"${here ? ' aria-current="step"' : ''}>${row}</li>`;
  });
  return `<ol class="flight-rows" reversed aria-label="${escapeText(flight.finding)}">${rows.join('')}</ol>`;
}
