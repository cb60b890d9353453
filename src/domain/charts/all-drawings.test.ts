import { describe, expect, it } from 'vitest';
import { drawBalustrade } from './balustrade.ts';
import { drawFlightRows } from './flight-rows.ts';
import { drawFlight } from './flight.ts';
import { drawJamb } from './jamb.ts';
import { drawLogo } from './logo.ts';
import { drawPace } from './pace.ts';
import { drawPegs } from './pegs.ts';
import type { Post } from './posts.ts';
import { drawScene, HALL_PHONE, HALL_WIDE } from './scene.ts';
import { expectSound, flightOf, jambOf } from './test-kit.ts';
import { drawTrend } from './trend.ts';

const HOSTILE = `"><script>alert(1)</script>&'`;

describe('all drawings', () => {
  it('escape every word they are given', () => {
    const posts: Post[] = [100, 'missed', 'to-come'];
    const flight = flightOf({ finding: HOSTILE, hereWords: HOSTILE });
    const weeks = flight.weeks.map((week) => ({
      ...week,
      title: HOSTILE,
      landing: { day: HOSTILE },
      note: HOSTILE,
      href: HOSTILE,
    }));
    const marks = [
      { value: 4, day: HOSTILE },
      { value: 5, day: HOSTILE },
    ];
    const point = { at: 0, value: 1, day: HOSTILE };
    for (const drawn of [
      drawJamb(
        jambOf({
          id: HOSTILE,
          finding: HOSTILE,
          marks,
          bands: [{ value: 1, word: HOSTILE }],
          format: () => HOSTILE,
        }),
      ),
      drawFlight({ ...flight, weeks }),
      drawFlightRows({ ...flight, weeks }),
      drawTrend({
        finding: HOSTILE,
        unit: HOSTILE,
        points: [point],
        bands: [],
        ticks: [{ at: 0, label: HOSTILE }],
        turns: [{ at: 0, word: HOSTILE, day: '' }],
      }),
      drawPace({ finding: HOSTILE, counts: [1] }),
      drawBalustrade({
        finding: HOSTILE,
        weeks: [{ index: 0, label: HOSTILE, posts, load: 1 }],
        mostLoad: 1,
      }),
      drawPegs({ finding: HOSTILE, columns: [['coach']], months: 1 }, 'middle'),
      drawScene({ ...HALL_WIDE, jamb: { x: 0, marks: [{ y: 1, day: HOSTILE }] } }),
      drawLogo(HOSTILE),
    ]) {
      expectSound(drawn);
    }
  });

  it('carry their finding as the one name of one tab stop', () => {
    for (const drawn of [
      drawJamb(jambOf({ finding: 'Real.' })),
      drawFlight(flightOf({ finding: 'Real.' })),
    ]) {
      expect(drawn.match(/tabindex="0"/g)).toHaveLength(1);
      expect(drawn).toMatch(/^<svg [^>]*role="img"[^>]*aria-label="Real\."/);
    }
  });

  it('leave the scene out of the reading order', () => {
    for (const scene of [HALL_WIDE, HALL_PHONE]) {
      const drawn = drawScene(scene);
      expectSound(drawn);
      expect(drawn).toContain('aria-hidden="true"');
    }
  });
});
