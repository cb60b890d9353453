import { getCollection } from 'astro:content';
import { lessonWords, readingMinutes } from '#domain/lessons/reading-time';

export interface LessonTitle {
  slug: string;
  title: string;
  week: number;
  free: boolean;
  minutes: number;
}

/** Titles, weeks and reading minutes of all lessons, in order; nothing of their text. */
export async function lessonTitles(): Promise<{ all: LessonTitle[]; byWeek: Map<number, string> }> {
  const lessons = await getCollection('lessons');
  const all = lessons
    .sort((a, b) => a.data.order - b.data.order)
    .map(({ id, data, body = '' }) => ({
      slug: id,
      title: data.title,
      week: data.week,
      free: data.free,
      minutes: readingMinutes(lessonWords(data, body)),
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
