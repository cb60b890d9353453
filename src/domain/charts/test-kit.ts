import { expect } from 'vitest';
import type { Flight } from './flight.ts';
import type { Jamb } from './jamb.ts';
import type { Post } from './posts.ts';

/** Three marks of push-ups, or what the test needs instead. */
export const jambOf = (over: Partial<Jamb> = {}): Jamb => ({
  id: 'push-ups',
  finding: 'Seventeen, twelve before: real.',
  unit: 'push-ups',
  marks: [
    { value: 9, day: '12 Sep' },
    { value: 12, day: '10 Oct' },
    { value: 17, day: '7 Nov' },
  ],
  error: 3.4,
  bands: [
    { value: 8, word: 'fair' },
    { value: 13, word: 'good' },
  ],
  aim: 19,
  ...over,
});

/** Twelve weeks with the ninth as the present one, or what the test needs instead. */
export const flightOf = (over: Partial<Flight> = {}): Flight => ({
  finding: 'Week nine of twelve.',
  here: 9,
  weeks: Array.from({ length: 12 }, (_, index) => ({
    week: index + 1,
    title: `Lesson ${index + 1}`,
    load: 300 + index * 10,
    sessions: [100, 'missed', 80] as Post[],
    landing: (index + 1) % 4 === 0 ? { day: '7 Nov' } : undefined,
    href: `/flight#w${index + 1}`,
  })),
  ...over,
});

/** Every attribute value and every text of a drawing is well formed, without an element that was not meant. */
export function expectSound(markup: string): void {
  expect(markup).not.toMatch(/NaN|Infinity|undefined|<script/);
  const opened = [...markup.matchAll(/<([a-zA-Z]+)(?:\s[^<>]*)?(?<!\/)>/g)].map((tag) => tag[1]);
  const closed = [...markup.matchAll(/<\/([a-zA-Z]+)>/g)].map((tag) => tag[1]);
  expect([...opened].sort()).toEqual([...closed].sort());
}
