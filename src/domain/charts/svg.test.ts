import fc from 'fast-check';
import { expect, it } from 'vitest';
import { escapeText, px, scale, spread, wrapWords } from './svg.ts';

it('escapes the five signs that could end a text or an attribute', () => {
  expect(escapeText(`<a href="x">'&`)).toBe('&lt;a href=&quot;x&quot;&gt;&#39;&amp;');
});

it('refuses a length that is no number', () => {
  expect(px(1.04)).toBe('1');
  expect(() => px(Number.NaN)).toThrow(RangeError);
  expect(() => px(1 / 0)).toThrow(RangeError);
});

it('draws a range without width in its middle', () => {
  expect(scale(5, 5, 0, 100)(5)).toBe(50);
  expect(scale(0, 10, 100, 0)(2)).toBe(80);
});

it('keeps labels apart and inside, in their order, whenever there is room', () => {
  const wanted = fc.array(fc.double({ min: 0, max: 400, noNaN: true }), { maxLength: 14 });
  fc.assert(
    fc.property(wanted, (places) => {
      const sorted = [...places].sort((a, b) => a - b);
      const put = spread(sorted, 25, 10, 400);
      put.forEach((place, index) => {
        expect(place).toBeGreaterThanOrEqual(10 - 1e-9);
        expect(place).toBeLessThanOrEqual(400 + 1e-9);
        if (index > 0) expect(place - (put[index - 1] ?? 0)).toBeGreaterThanOrEqual(25 - 1e-9);
      });
    }),
  );
});

it('leaves labels where they want to be when they are far apart', () => {
  expect(spread([10, 100, 200], 25, 0, 400)).toEqual([10, 100, 200]);
});

it('breaks titles between words only', () => {
  expect(wrapWords('When a week goes wrong', 8)).toEqual(['When a', 'week', 'goes', 'wrong']);
  expect(wrapWords('', 8)).toEqual([]);
});
