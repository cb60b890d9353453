/** The mark as a path list: an N of two pencils and a handrail. Drawn on a field of 56 by 64. */
const BLUE_POINT = 'M8.7 9.5 11 3l2.3 6.5Z';
const RED_POINT = 'M42.7 54.5 45 61l2.3-6.5Z';

/**
 * The mark of the practice as an SVG string. Blue end up at the left, red end down at the right.
 * @param name what a screen reader says; without it the drawing is decoration
 */
export function drawLogo(name?: string): string {
  const role = name ? `role="img" aria-label="${name.replace(/[&<>"]/g, '')}"` : 'aria-hidden="true"';
  const blue = 'var(--color-blue)';
  const red = 'var(--color-red)';
  const bare = 'var(--color-bare)';
  return (
    `<svg viewBox="0 0 56 64" ${role}><path d="M10 14 46 38V51L10 27Z" fill="var(--color-rail-mark)"/>` +
    `<path d="M5 19.5H17V61H5Z" fill="${blue}"/><path d="M5 20 11 3l6 17c-2 2-4 2-6 0-2 2-4 2-6 0Z" fill="${bare}"/>` +
    `<path d="${BLUE_POINT}" fill="${blue}"/><path d="M39 3H51V44.5H39Z" fill="${red}"/>` +
    `<path d="M39 44l6 17 6-17c-2-2-4-2-6 0-2-2-4-2-6 0Z" fill="${bare}"/><path d="${RED_POINT}" fill="${red}"/></svg>`
  );
}
