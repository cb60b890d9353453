import { getCollection } from 'astro:content';

export interface LessonTitle {
  slug: string;
  title: string;
  week: number;
  free: boolean;
  minutes: number;
}

const WORDS_A_MINUTE = 200;

/** Every text in a lesson's own facts, which are read as much as its body is. */
const wordsOf = (value: unknown): string =>
  typeof value === 'string'
    ? value
    : value && typeof value === 'object'
      ? Object.values(value).map(wordsOf).join(' ')
      : '';

/** Titles, weeks and reading minutes of all lessons, in order; nothing of their text. */
export async function lessonTitles(): Promise<{ all: LessonTitle[]; byWeek: Map<number, string> }> {
  const lessons = await getCollection('lessons');
  const all = lessons
    .sort((a, b) => a.data.order - b.data.order)
    .map(({ data, body = '' }) => ({
      slug: data.slug,
      title: data.title,
      week: data.week,
      free: data.free,
      minutes: Math.max(1, Math.round(`${body} ${wordsOf(data)}`.split(/\s+/).length / WORDS_A_MINUTE)),
    }));
  return {
    all,
    byWeek: new Map(
      all
        .filter(({ week }) => week > 0)
        .reverse()
        .map(({ week, title }) => [week, title]),
    ),
  };
}
