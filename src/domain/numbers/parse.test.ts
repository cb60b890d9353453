import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatDuration, formatIsoDay, formatNumber } from './format.ts';
import { parseCount, parseDate, parseDecimal, parseDuration } from './parse.ts';

describe('parseCount', () => {
  it.each([
    ['40', 40],
    [' 40 ', 40],
    ['0', 0],
    ['007', 7],
    ['1 000', 1000],
    ['1\u00a0000', 1000],
    ['1\u202f000', 1000],
    ['1,000', 1000],
    ['1.000', 1000],
    ['1’000', 1000],
    ["1'000", 1000],
    ['2,400', 2400],
    ['1 000 000', 1_000_000],
    ['40.0', 40],
    ['40,', 40],
    ['+5', 5],
    ['４０', 40],
    ['\t12\n', 12],
  ])('reads %j as %d', (typed, value) => {
    expect(parseCount(typed)).toEqual({ ok: true, value });
  });

  it.each([
    ['', /missing/],
    ['   ', /missing/],
    ['-3', /below zero/],
    ['−3', /below zero/],
    ['12,5', /Whole numbers/],
    ['12.5', /Whole numbers/],
    ['forty', /without words/],
    ['40 reps', /without words/],
    ['4e3', /without words/],
    ['1 00', /without words/],
    ['1,000.000', /without words/],
    ['NaN', /without words/],
    ['Infinity', /without words/],
    ['0x10', /without words/],
    ['1234567890', /too long/],
  ])('refuses %j', (typed, reason) => {
    expect(parseCount(typed)).toEqual({ ok: false, reason: expect.stringMatching(reason) });
  });

  it('reads back every count it could have printed', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 999_999_999 }), (n) => {
        expect(parseCount(formatNumber(n))).toEqual({ ok: true, value: n });
        expect(parseCount(String(n))).toEqual({ ok: true, value: n });
      }),
    );
  });
});

describe('parseDecimal', () => {
  it.each([
    ['12,5', 12.5],
    ['12.5', 12.5],
    [' 40 ', 40],
    ['1 000', 1000],
    ['1 000,5', 1000.5],
    ['1,000.5', 1000.5],
    ['1.000,5', 1000.5],
    ['1.000.000', 1_000_000],
    ['1,000,000.25', 1_000_000.25],
    ['1,000', 1],
    ['80,500', 80.5],
    ['.5', 0.5],
    [',5', 0.5],
    ['5.', 5],
    ['-3,5', -3.5],
    ['−3', -3],
    ['+2.25', 2.25],
    ['-0', 0],
    ['0', 0],
    ['７２，５'.replace('，', ','), 72.5],
  ])('reads %j as %d', (typed, value) => {
    expect(parseDecimal(typed)).toEqual({ ok: true, value });
  });

  it.each([
    ['', /missing/],
    ['12.5 kg', /without words/],
    ['-', /without words/],
    ['.', /without words/],
    ['1.2.3', /two ways/],
    ['1,2,3', /two ways/],
    ['12 5', /two ways/],
    ['1.00,5', /two ways/],
    ['1,000,5', /two ways/],
    ['NaN', /without words/],
    ['1e3', /without words/],
    ['1234567890', /too long/],
    ['0.1234567890', /too long/],
  ])('refuses %j', (typed, reason) => {
    expect(parseDecimal(typed)).toEqual({ ok: false, reason: expect.stringMatching(reason) });
  });

  it('reads a number with up to three decimals from either mark', () => {
    fc.assert(
      fc.property(fc.integer({ min: -9_999_999, max: 9_999_999 }), (thousandths) => {
        const value = thousandths / 1000;
        const typed = value.toFixed(3);
        const expected = { ok: true, value: value === 0 ? 0 : value };
        expect(parseDecimal(typed)).toEqual(expected);
        expect(parseDecimal(typed.replace('.', ','))).toEqual(expected);
      }),
    );
  });
});

describe('parseDuration', () => {
  it.each([
    ['3:05', 185],
    ['03:05', 185],
    ['3 : 05', 185],
    ['3:05 min', 185],
    ['0:45', 45],
    ['90:00', 5400],
    ['999:59', 59_999],
    ['1:02:03', 3723],
    ['3:05.4', 185],
    ['3:05,6', 186],
    ['3 min 5', 185],
    ['3 min 5 s', 185],
    ['3 min, 5 sec', 185],
    ['3min5s', 185],
    ['3m5s', 185],
    ['3 minutes and 5 seconds', 185],
    ['3 mins 5 secs', 185],
    ['3′05″', 185],
    ['3\'05"', 185],
    ['185 s', 185],
    ['185s', 185],
    ['185', 185],
    ['185 seconds', 185],
    ['3.5 min', 210],
    ['3,5 min', 210],
    ['3 min', 180],
    ['1 h 2 min 3 s', 3723],
    ['1h', 3600],
    ['1.5 h', 5400],
    ['12.5 s', 13],
  ])('reads %j as %d seconds', (typed, value) => {
    expect(parseDuration(typed)).toEqual({ ok: true, value });
  });

  it.each([
    ['', /missing/],
    ['-5', /below zero/],
    ['3:5', /3:05 or 3:50/],
    ['3:75', /00 to 59/],
    ['1:75:00', /Minutes run/],
    ['12.30', /12:30/],
    ['3 min 75', /0 to 59/],
    ['3.5 min 10', /like 3:05/],
    ['soon', /like 3:05/],
    ['min', /like 3:05/],
    ['3:05:', /like 3:05/],
    ['1000:00', /like 3:05/],
    ['500 h', /four days/],
  ])('refuses %j', (typed, reason) => {
    expect(parseDuration(typed)).toEqual({ ok: false, reason: expect.stringMatching(reason) });
  });

  it('reads back every duration it could have printed', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 359_999 }), (seconds) => {
        expect(parseDuration(formatDuration(seconds))).toEqual({ ok: true, value: seconds });
      }),
    );
  });
});

describe('parseDate', () => {
  it.each([
    ['1990-11-07', '1990-11-07'],
    ['1990/11/07', '1990-11-07'],
    ['1990.11.7', '1990-11-07'],
    ['19901107', '1990-11-07'],
    ['7 Nov 1990', '1990-11-07'],
    ['07 nov 1990', '1990-11-07'],
    ['7 November 1990', '1990-11-07'],
    ['7. Nov. 1990', '1990-11-07'],
    ['7-Nov-1990', '1990-11-07'],
    ['7th November 1990', '1990-11-07'],
    ['1st of May 2001', '2001-05-01'],
    ['Nov 7, 1990', '1990-11-07'],
    ['November 7 1990', '1990-11-07'],
    ['3 Sept 1975', '1975-09-03'],
    ['29 Feb 2000', '2000-02-29'],
    ['25/11/1990', '1990-11-25'],
    ['25.11.1990', '1990-11-25'],
    ['25 11 1990', '1990-11-25'],
    ['7/7/1990', '1990-07-07'],
  ])('reads %j as %s', (typed, value) => {
    expect(parseDate(typed)).toEqual({ ok: true, value });
  });

  it.each([
    ['07/11/1990', '1990-11-07', 'Read as 7 Nov 1990, day first.'],
    ['7.11.1990', '1990-11-07', 'Read as 7 Nov 1990, day first.'],
    ['11/25/1990', '1990-11-25', 'Read as 25 Nov 1990, month first.'],
  ])('reads %j as %s and says how', (typed, value, note) => {
    expect(parseDate(typed)).toEqual({ ok: true, value, note });
  });

  it.each([
    ['', /missing/],
    ['29 Feb 1990', /Feb 1990 has 28 days/],
    ['29 Feb 1900', /Feb 1900 has 28 days/],
    ['31/04/1990', /Apr 1990 has 30 days/],
    ['0 Nov 1990', /Check the day/],
    ['13/13/1990', /no month 13/],
    ['1990-13-01', /no month 13/],
    ['7/11/90', /four digits/],
    ['7 Nov 90', /four digits/],
    ['7 Nov', /like 7 Nov 1990/],
    ['7 Nev 1990', /like 7 Nov 1990/],
    ['7 ma 1990', /like 7 Nov 1990/],
    ['yesterday', /like 7 Nov 1990/],
    ['1990', /like 7 Nov 1990/],
  ])('refuses %j', (typed, reason) => {
    expect(parseDate(typed)).toEqual({ ok: false, reason: expect.stringMatching(reason) });
  });

  it('reads back every day it could have printed', () => {
    const days = fc.date({ min: new Date('1900-01-01'), max: new Date('2099-12-31'), noInvalidDate: true });
    fc.assert(
      fc.property(days, (day) => {
        const iso = day.toISOString().slice(0, 10);
        expect(parseDate(formatIsoDay(iso, true))).toEqual({ ok: true, value: iso });
        expect(parseDate(iso)).toEqual({ ok: true, value: iso });
      }),
    );
  });
});

it('answers any text at all', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'grapheme' }), (text) => {
      for (const parse of [parseCount, parseDecimal, parseDuration, parseDate]) {
        const answer = parse(text);
        if (answer.ok) expect(answer.value).not.toBeNaN();
        else expect(answer.reason).toMatch(/\.$/);
      }
    }),
  );
});
