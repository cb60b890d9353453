import { glob } from 'astro/loaders';
import { defineCollection } from 'astro:content';
import { lessonSchema, pageSchema } from './content-schema.ts';

/** Lessons and texts live outside `src`, so that an author needs to know nothing of the code. */
export const collections = {
  lessons: defineCollection({
    loader: glob({ base: './content/lessons', pattern: '**/*.mdx' }),
    schema: lessonSchema,
  }),
  pages: defineCollection({
    loader: glob({ base: './content/pages', pattern: '*.md' }),
    schema: pageSchema,
  }),
};
