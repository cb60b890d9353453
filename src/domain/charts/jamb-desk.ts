import type { Jamb } from './jamb.ts';

/** The desk's small board has room for three marks: the first, the one that now is judged against, and now. */
export function deskJamb(jamb: Jamb): Jamb {
  const now = jamb.marks.length - 1;
  const before = jamb.beforeIndex ?? now - 1;
  const kept = [...new Set([0, before, now])].filter((index) => index >= 0).sort((a, b) => a - b);
  return {
    ...jamb,
    size: 'desk',
    marks: kept.flatMap((index) => jamb.marks[index] ?? []),
    beforeIndex: before >= 0 ? kept.indexOf(before) : undefined,
  };
}
