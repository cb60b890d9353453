import { parseFrontmatter } from '@astrojs/markdown-remark';
import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { lessonSchema, pageSchema, type LessonFacts } from '../../src/content-schema.ts';
import { movementOf, rungsOf } from '../../src/domain/figure/movements.ts';
import { lessonWords, readingMinutes } from '../../src/domain/lessons/reading-time.ts';

interface Lesson {
  file: string;
  facts: LessonFacts;
  body: string;
}

function readContent(folder: string, ending: string) {
  return readdirSync(`content/${folder}`)
    .filter((file) => file.endsWith(ending))
    .map((file) => ({ file, ...parseFrontmatter(readFileSync(`content/${folder}/${file}`, 'utf8')) }));
}

const read = readContent('lessons', '.mdx').map(({ file, frontmatter, content }) => ({
  file,
  parsed: lessonSchema.safeParse(frontmatter),
  body: content,
}));
const lessons = read.flatMap(({ file, parsed, body }): Lesson[] =>
  parsed.success ? [{ file, facts: parsed.data, body }] : [],
);
const every = <T>(of: (lesson: Lesson) => readonly T[]) => lessons.flatMap(of);

test('every lesson keeps the strict schema: cautions, faults with mends, sources, three checks', () => {
  const bad = read.flatMap(({ file, parsed }) =>
    (parsed.error?.issues ?? []).map(({ path, message }) => `${file} ${path.join('.')}: ${message}`),
  );
  expect(bad).toEqual([]);
  expect(lessons.length).toBeGreaterThanOrEqual(28);
});

test('the schema refuses a lesson without a caution, with a fault that is not drawn, or with two checks', () => {
  const sound = lessons.find(({ facts }) => facts.slug === 'a-push-up-that-fits-you')?.facts;
  expect(lessonSchema.safeParse(sound).success).toBe(true);
  const spoilt = [
    { ...sound, cautions: [] },
    { ...sound, selfCheck: sound?.selfCheck.slice(1) },
    { ...sound, faults: sound?.faults.map((fault) => ({ ...fault, mend: '' })) },
    {
      ...sound,
      faults: sound?.faults.map((fault) => ({ ...fault, figure: { movement: 'march', fault: 'flying' } })),
    },
    { ...sound, unknown: 'field' },
  ];
  expect(spoilt.filter((facts) => lessonSchema.safeParse(facts).success)).toEqual([]);
});

test('exactly three lessons are free: the house, the push-up, the tests', () => {
  expect(lessons.filter(({ facts }) => facts.free).map(({ facts }) => facts.slug)).toEqual([
    'the-house-and-its-stairs',
    'a-push-up-that-fits-you',
    'first-test-day',
  ]);
});

test('slugs and order are unique, and every week of a flight opens a lesson', () => {
  const slugs = lessons.map(({ facts }) => facts.slug);
  expect(new Set(slugs).size).toBe(slugs.length);
  expect(lessons.map(({ facts }) => facts.order)).toEqual(lessons.map((_, index) => index + 1));
  const weeks = new Set(lessons.map(({ facts }) => facts.week));
  expect(Array.from({ length: 12 }, (_, index) => index + 1).filter((week) => !weeks.has(week))).toEqual([]);
});

/** Attributes of the components that a lesson's text places. */
function placed({ file, body }: Lesson) {
  return [...body.matchAll(/<(\w+)([^>]*)\/>/g)].map(([, name = '', attributes = '']) => ({
    file,
    name,
    movement: /movement="([^"]*)"/.exec(attributes)?.[1] ?? '',
    phase: Number(/phase=\{(\d)\}/.exec(attributes)?.[1] ?? 0),
    fault: /fault="([^"]*)"/.exec(attributes)?.[1],
  }));
}

test('texts place only drawings that exist, and nearly every lesson shows one', () => {
  const drawings = every(placed);
  const bad = drawings.filter(({ name, movement, phase, fault }) => {
    const { phases, faults } = movementOf(movement);
    const isKnown = ['Figure', 'Phases', 'Fault'].includes(name) && phase < phases.length;
    return !isKnown || (name === 'Fault' && !faults.some((known) => known.name === fault));
  });
  expect(bad).toEqual([]);
  const drawn = lessons.filter((lesson) => lesson.facts.movement || placed(lesson).length > 0);
  expect(drawn.length).toBeGreaterThanOrEqual(lessons.length - 2);
});

test('the movement at the head is not drawn again in the text', () => {
  const bad = lessons.filter((lesson) =>
    placed(lesson).some(({ name, movement }) => name === 'Phases' && movement === lesson.facts.movement),
  );
  expect(bad.map(({ file }) => file)).toEqual([]);
});

test('a lesson of a ladder draws a rung of that ladder', () => {
  const bad = lessons.filter(
    ({ facts: { ladder, movement } }) => ladder && !rungsOf(ladder).some(({ id }) => id === movement),
  );
  expect(bad.map(({ file }) => file)).toEqual([]);
});

test('lessons take two to ten minutes', () => {
  const minutes = lessons.map(({ facts, body }) => readingMinutes(lessonWords(facts, body)));
  expect(minutes.filter((each) => each < 2 || each > 10)).toEqual([]);
});

test('the tone holds: no exclamation marks, no talk of films or of other people’s products', () => {
  const bad = lessons.filter(({ facts, body }) =>
    /!|\b(video|youtube|app store|congratulations|awesome|calorie burn)\b/i.test(
      JSON.stringify(facts) + body,
    ),
  );
  expect(bad.map(({ file }) => file)).toEqual([]);
});

test('privacy, terms and cautions are there, each marked as a draft', () => {
  const pages = readContent('pages', '.md').map(({ frontmatter }) => pageSchema.parse(frontmatter));
  expect(pages.map(({ slug }) => slug).sort()).toEqual(['cautions', 'privacy', 'terms']);
});
