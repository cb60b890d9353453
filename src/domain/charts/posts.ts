import { color, px, rect } from './svg.ts';

/** One session of a week: the share done of what was asked in percent, `missed`, or still `to-come`. */
export type Post = number | 'missed' | 'to-come';

/** How high a post stands, 0 to 1; more than asked is a whole post. */
export function postHeight(post: number): number {
  return Math.min(100, Math.max(0, post)) / 100;
}

/** Sessions of a week in words: `2 of 3 sessions`. */
export function countPosts(posts: readonly Post[]): string {
  const done = posts.filter((post) => typeof post === 'number').length;
  return `${done} of ${posts.length} sessions`;
}

/** The small balustrade of one tread, decoration beside words: 44 by 22. */
export function drawPosts(posts: readonly Post[]): string {
  const [width, height] = [44, 22];
  const inside = posts.map((post, index) => {
    const x = (width * (index + 0.5)) / posts.length;
    if (post === 'to-come') return '';
    if (post === 'missed') {
      return `<path d="M${px(x)} 4V${height}" stroke="${color('post')}" stroke-width="1.4" stroke-dasharray="2 3" opacity=".8"/>`;
    }
    const tall = (height - 5) * postHeight(post);
    return rect(x - 2.5, height - tall, 5, tall, `fill="${color('post')}"`);
  });
  return (
    `<svg class="posts" viewBox="0 0 ${width} ${height}" width="${width}" height="${height}" aria-hidden="true">` +
    `<rect width="${width}" height="${height}" fill="${color('dado')}"/>${inside.join('')}` +
    `<path d="M0 1.8H${width}" stroke="${color('rail-mark')}" stroke-width="3.6"/></svg>`
  );
}
