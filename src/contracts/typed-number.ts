import { z } from './zod.ts';
import { parseCount, parseDate, parseDecimal } from '#domain/numbers/parse';

interface Bounds {
  min: number;
  max: number;
  /** The sentence for a number outside the bounds. */
  outside: string;
}

/** A whole number as people type it (`1 000`, ` 40 `) or as an island sends it. */
export const typedCount = (missing: string, { min, max, outside }: Bounds) =>
  z.union([z.string(), z.number()], { error: missing }).transform((typed, ctx): number => {
    const read = parseCount(String(typed));
    if (String(typed).trim() === '') ctx.addIssue({ code: 'custom', message: missing });
    else if (!read.ok) ctx.addIssue({ code: 'custom', message: read.reason });
    else if (read.value < min || read.value > max) ctx.addIssue({ code: 'custom', message: outside });
    else return read.value;
    return z.NEVER;
  });

/** A number with decimals as people type it (`12,5`). */
export const typedDecimal = (missing: string, { min, max, outside }: Bounds) =>
  z.union([z.string(), z.number()], { error: missing }).transform((typed, ctx): number => {
    const read = parseDecimal(String(typed));
    if (String(typed).trim() === '') ctx.addIssue({ code: 'custom', message: missing });
    else if (!read.ok) ctx.addIssue({ code: 'custom', message: read.reason });
    else if (read.value < min || read.value > max) ctx.addIssue({ code: 'custom', message: outside });
    else return read.value;
    return z.NEVER;
  });

/** The same, but an empty field is null. */
export const optional = <T extends z.ZodType>(schema: T) =>
  z.union([z.literal('').transform(() => null), z.undefined().transform(() => null), z.null(), schema]);

/** A date as people type it, as an ISO date. */
export const typedDate = (missing: string) =>
  z.string({ error: missing }).transform((typed, ctx): string => {
    const read = parseDate(typed);
    if (read.ok) return read.value;
    ctx.addIssue({ code: 'custom', message: typed.trim() === '' ? missing : read.reason });
    return z.NEVER;
  });
