/** What a posted form held, as text; a name that came more than once is a list. */
export type FormValues = Record<string, string | string[]>;

/** Text for an input's `value`, from what was typed or, before that, from what is stored. */
export function typed(
  values: FormValues | undefined,
  name: string,
  stored: string | number | null = '',
): string {
  const value = values?.[name];
  return Array.isArray(value) ? (value[0] ?? '') : (value ?? String(stored ?? ''));
}
