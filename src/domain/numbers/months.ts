/** Months in three letters, as dates are printed: '7 Nov'. (Intl prints 'Sept' for en-GB, so the table is ours.) */
export const MONTHS = [
  'Jan',
  'Feb',
  'Mar',
  'Apr',
  'May',
  'Jun',
  'Jul',
  'Aug',
  'Sep',
  'Oct',
  'Nov',
  'Dec',
] as const;

const NAMES = [
  'january',
  'february',
  'march',
  'april',
  'may',
  'june',
  'july',
  'august',
  'september',
  'october',
  'november',
  'december',
] as const;

/** The month (1 to 12) a lower-case English name or its beginning of three letters or more stands for; null if none. */
export function monthNumber(name: string): number | null {
  if (name.length < 3) return null;
  const index = NAMES.findIndex((month) => month.startsWith(name));
  return index === -1 ? null : index + 1;
}
