import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { balustradeTable, drawBalustrade } from './balustrade.ts';
import { drawFlightRows } from './flight-rows.ts';
import { drawFlight, flightTable } from './flight.ts';
import { drawJambRow } from './jamb-row.ts';
import { drawJamb, jambTable } from './jamb.ts';
import { drawPace, paceTable } from './pace.ts';
import { countPegs, drawPegs, type Peg } from './pegs.ts';
import { countPosts, type Post } from './posts.ts';
import { expectSound, flightOf, jambOf } from './test-kit.ts';
import { drawTrend, niceSteps, trendTable } from './trend.ts';

const post = fc.oneof(
  fc.double({ min: -50, max: 400, noNaN: true }),
  fc.constantFrom<Post>('missed', 'to-come'),
);
const value = fc.double({ min: 0, max: 1000, noNaN: true });

describe('jamb', () => {
  it('draws no impossible number and stays well formed, whatever was marked', () => {
    fc.assert(
      fc.property(
        fc.array(value, { maxLength: 60 }),
        fc.option(value, { nil: undefined }),
        fc.boolean(),
        fc.constantFrom('wall' as const, 'desk' as const),
        (values, error, lowerIsBetter, size) => {
          const marks = values.map((each, index) => ({ value: each, day: `${index + 1} Nov` }));
          expectSound(drawJamb(jambOf({ marks, error, lowerIsBetter, size })));
        },
      ),
    );
  });

  it('keeps the labels at the left at least 25 px apart, with 36 marks of nearly the same height', () => {
    const marks = Array.from({ length: 36 }, (_, index) => ({
      value: 20 + (index % 3),
      day: `${index + 1} Nov`,
    }));
    const drawn = drawJamb(jambOf({ marks }));
    const places = [...drawn.matchAll(/<text class="label" x="[\d.]+" y="([\d.]+)"/g)].map((hit) =>
      Number(hit[1]),
    );
    expect(places.length).toBeGreaterThan(5);
    const rising = [...places].sort((a, b) => a - b);
    // The number of today is larger and hangs 2.5 px lower than the others from the same place.
    for (let index = 1; index < rising.length; index += 1) {
      expect((rising[index] ?? 0) - (rising[index - 1] ?? 0)).toBeGreaterThanOrEqual(25 - 2.6);
    }
  });

  it('always names the first mark, the one before and the one now', () => {
    const marks = Array.from({ length: 40 }, (_, index) => ({ value: index, day: `day ${index}.` }));
    const drawn = drawJamb(jambOf({ marks, beforeIndex: 20 }));
    for (const day of ['day 0.', 'day 20.', 'day 39.']) expect(drawn).toContain(day);
  });

  it('turns the scale when lower is better, and says so', () => {
    const height = (lowerIsBetter: boolean, mark: number) => {
      const drawn = drawJamb(
        jambOf({ marks: [{ value: mark, day: 'x' }], lowerIsBetter, range: { from: 0, to: 40 }, bands: [] }),
      );
      return Number(/M123 ([\d.]+)H133/.exec(drawn)?.[1]);
    };
    expect(height(false, 30)).toBeLessThan(height(false, 10));
    expect(height(true, 30)).toBeGreaterThan(height(true, 10));
    expect(drawJamb(jambOf({ lowerIsBetter: true }))).toContain('up is faster');
  });

  it('marks its foot when the scale does not begin at zero', () => {
    expect(drawJamb(jambOf({ range: { from: 5, to: 40 } }))).toContain('foot: 5');
    expect(drawJamb(jambOf())).not.toContain('foot:');
  });

  it('reads as a table of the plotted marks, newest first', () => {
    const jamb = jambOf();
    expect(jambTable(jamb).rows).toEqual([
      ['7 Nov', '17', '+5'],
      ['10 Oct', '12', '+3'],
      ['12 Sep', '9', '–'],
    ]);
    for (const [day, amount] of jambTable(jamb).rows) {
      expect(drawJamb(jamb)).toContain(day);
      expect(drawJamb(jamb)).toContain(`>${amount}</tspan>`);
    }
  });

  it('draws the small form of a row from any two marks', () => {
    fc.assert(
      fc.property(value, value, value, (before, now, error) =>
        expectSound(drawJambRow({ finding: 'x', before, now, error, from: 0, to: 1000 })),
      ),
    );
    expectSound(drawJambRow({ finding: 'no mark yet', from: 0, to: 0 }));
  });
});

describe('flight', () => {
  it('draws any week of any load, built or to come, without an impossible number', () => {
    fc.assert(
      fc.property(
        fc.array(fc.record({ load: value, sessions: fc.array(post, { maxLength: 4 }) }), { maxLength: 12 }),
        fc.integer({ min: 0, max: 12 }),
        (weeks, here) => {
          const flight = flightOf({
            here,
            hereWords: 'you, this week',
            gateAt: here + 1,
            weeks: weeks.map((week, index) => ({
              ...week,
              week: index + 1,
              title: 'A push-up that fits you',
            })),
          });
          expectSound(drawFlight(flight));
          expectSound(drawFlightRows(flight));
        },
      ),
    );
  });

  it('lists the weeks with the last on top and marks the present one', () => {
    const rows = drawFlightRows(flightOf());
    expect([...rows.matchAll(/class="week">(\d+)</g)].map((hit) => Number(hit[1]))).toEqual([
      12, 11, 10, 9, 8, 7, 6, 5, 4, 3, 2, 1,
    ]);
    expect(rows.match(/aria-current="step"/g)).toHaveLength(1);
    expect(rows).toContain('you are here');
    expect(rows).toContain('landing, 7 Nov');
  });

  it('says the held week in words', () => {
    expect(drawFlight(flightOf({ gateAt: 10 }))).toContain('>held<');
    expect(drawFlightRows(flightOf({ gateAt: 10 }))).toContain('<small>held</small>');
  });

  it('reads as a table of what is drawn', () => {
    const { rows } = flightTable(flightOf());
    expect(rows[2]).toEqual(['3', 'Lesson 3', '2 of 3 sessions', '320']);
    expect(rows[11]?.[2]).toBe('to come');
  });

  it('counts done sessions only', () => {
    expect(countPosts([0, 'missed', 'to-come'])).toBe('1 of 3 sessions');
  });
});

describe('trend, pace, balustrade, pegs', () => {
  it('draw no impossible number, whatever they are given', () => {
    fc.assert(
      fc.property(fc.array(value, { maxLength: 20 }), fc.array(post, { maxLength: 3 }), (values, posts) => {
        const points = values.map((each, at) => ({ at, value: each, day: `${at}` }));
        const band = points.map((point) => ({ at: point.at, low: point.value - 2, high: point.value + 2 }));
        const turns = [{ at: 1, word: 'second stair', day: '1' }];
        expectSound(drawTrend({ finding: 'x', unit: 'x', points, bands: [band, []], ticks: [], turns }));
        expectSound(drawPace({ finding: 'x', counts: values.map(Math.round), lastTotal: 40 }));
        const weeks = values.map((load, index) => ({
          index,
          label: `${index}`,
          posts,
          load,
          held: index === 3,
        }));
        expectSound(drawBalustrade({ finding: 'x', weeks, mostLoad: 480, turns: [2] }));
      }),
    );
  });

  it('leaves a gap in the band where the data have one', () => {
    const run = (start: number) => [start, start + 1].map((at) => ({ at, low: 1, high: 2 }));
    const drawn = drawTrend({ finding: 'x', unit: 'x', points: [], bands: [run(0), run(9)], ticks: [] });
    expect(drawn.match(/class="draw"/g)).toHaveLength(2);
  });

  it('chooses round lines that cover the values', () => {
    expect(niceSteps(7.2, 19.5)).toEqual([5, 10, 15, 20]);
    fc.assert(
      fc.property(value, value, (a, b) => {
        const [low, high] = [Math.min(a, b), Math.max(a, b)];
        const steps = niceSteps(low, high);
        expect(steps.length).toBeLessThanOrEqual(7);
        expect(steps[0]).toBeLessThanOrEqual(low);
        expect(steps.at(-1)).toBeGreaterThanOrEqual(high);
      }),
    );
  });

  it('reads the trend, the pace and the balustrade as tables of the same values', () => {
    const points = [{ at: 1, value: 9, day: '1 Nov' }];
    const turns = [{ at: 0, word: 'fourth stair', day: '31 Oct' }];
    expect(trendTable({ finding: '', unit: 'reps', points, bands: [], ticks: [], turns }).rows).toEqual([
      ['31 Oct', 'changed: fourth stair'],
      ['1 Nov', '9'],
    ]);
    expect(paceTable({ finding: '', counts: [7, 5] }).rows).toEqual([
      ['0 to 10', '7', '7'],
      ['10 to 20', '5', '12'],
    ]);
    const weeks = [{ index: 0, label: '1', posts: [100, 'missed'] as Post[], load: 280 }];
    expect(balustradeTable({ finding: '', weeks, mostLoad: 480, turns: [0] }).rows).toEqual([
      ['1', '1 of 2 sessions', '280', 'changed'],
    ]);
  });

  it('stops the rail where a week is missing', () => {
    const weeks = [0, 1, 5].map((index) => ({ index, label: '', posts: [], load: 100 }));
    const rail = /<path d="([^"]+)" fill="none" stroke="var\(--color-rail-mark\)"/.exec(
      drawBalustrade({ finding: '', weeks, mostLoad: 400 }),
    );
    expect(rail?.[1]?.match(/M/g)).toHaveLength(2);
  });

  it('draws every peg it counts', () => {
    const columns: Peg[][] = [
      ['coach', 'coach'],
      ['lessons', 'left'],
      [null, 'pair'],
      [null, 'failed'],
      ['free', 'trial'],
    ];
    const pegs = { finding: 'x', columns, months: 2 };
    expect(countPegs(pegs, 1)).toEqual({
      coach: 1,
      lessons: 0,
      pair: 1,
      free: 0,
      trial: 1,
      failed: 1,
      left: 1,
    });
    const drawn = drawPegs(pegs, 'large');
    expectSound(drawn);
    expect(drawn.match(/<circle/g)).toHaveLength(7);
    expect(drawn.match(/<rect/g)).toHaveLength(1);
    expectSound(drawPegs({ finding: '', columns: [], months: 0 }, 'small'));
  });
});
