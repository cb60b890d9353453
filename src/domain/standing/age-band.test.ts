import { describe, expect, it } from 'vitest';
import { bandFor, bandLimits, peopleOf } from './age-band.ts';
import { ordinal } from './speech.ts';

describe('age bands', () => {
  it.each([
    ['30-39', [30, 39]],
    ['60+', [60, Infinity]],
    ['<20', [18, 19]],
  ])('%s is %j', (band, limits) => {
    expect(bandLimits(band)).toEqual(limits);
  });

  it('takes the first band that holds the whole years lived', () => {
    expect(bandFor(39.99, ['30-39', '40-49'])).toBe('30-39');
    expect(bandFor(65, ['56-65', '65+'])).toBe('56-65');
    expect(bandFor(66, ['56-65', '65+'])).toBe('65+');
    expect(bandFor(29, ['30-39'])).toBeNull();
    expect(bandFor(NaN, ['<20', '60+'])).toBeNull();
  });

  it('names the people, from the age that Newel serves', () => {
    expect(peopleOf('male', '15-19')).toBe('men of 18 to 19');
    expect(peopleOf('female', '60+')).toBe('women of 60 and over');
  });
});

it.each([
  [1, '1st'],
  [2, '2nd'],
  [3, '3rd'],
  [4, '4th'],
  [11, '11th'],
  [12, '12th'],
  [13, '13th'],
  [22, '22nd'],
  [95, '95th'],
])('%d is the %s', (n, word) => {
  expect(ordinal(n)).toBe(word);
});
