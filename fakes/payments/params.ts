import qs from 'qs';
import { z } from 'zod';
import { badRequest, type Fault } from './fault.ts';

/** Form values are text; these read them as what they stand for. An empty text unsets a field. */
export const text = z.string().min(1).max(5000);
export const unsettable = z
  .string()
  .max(5000)
  .transform((value) => (value === '' ? null : value));
export const whole = z
  .string()
  .regex(/^-?\d{1,15}$/, 'expected a whole number')
  .transform(Number);
export const share = z
  .string()
  .regex(/^\d{1,3}(\.\d+)?$/, 'expected a number')
  .transform(Number);
export const yesNo = z.enum(['true', 'false']).transform((value) => value === 'true');
export const metadata = z.union([z.literal(''), z.record(z.string().max(40), z.string().max(500))]);
export const moment = whole.refine((value) => value > 0, 'expected seconds since 1970');
export const momentOrNow = z.union([z.literal('now'), moment]);

const expand = z.array(z.string()).optional();

/** Parameters of one call: exactly these, and `expand`, which every call takes. */
export const params = <Shape extends z.ZodRawShape>(shape: Shape) => z.strictObject({ ...shape, expand });

/** Parameters of a list: exactly these, and the ones for paging. */
export const listParams = <Shape extends z.ZodRawShape>(shape: Shape) =>
  params({
    limit: whole.refine((value) => value >= 1 && value <= 100, 'from 1 to 100').optional(),
    starting_after: text.optional(),
    ending_before: text.optional(),
    ...shape,
  });

/** Lists of 30 and nesting of 5 are usual here; the defaults of qs would break both. */
export const parseForm = (raw: string) =>
  qs.parse(raw, { depth: 10, arrayLimit: 1000, parameterLimit: 5000 });

const inBrackets = ([first = '', ...rest]: PropertyKey[]) =>
  String(first) + rest.map((part) => `[${String(part)}]`).join('');

function isMissing(raw: unknown, path: PropertyKey[]): boolean {
  let value = raw;
  for (const name of path) {
    if (typeof value !== 'object' || value === null) return true;
    value = Reflect.get(value, name);
  }
  return value === undefined;
}

function toFault(raw: unknown, issue: z.core.$ZodIssue): Fault {
  if (issue.code === 'unrecognized_keys') {
    const param = inBrackets([...issue.path, issue.keys[0] ?? '']);
    return badRequest(`Received unknown parameter: ${param}`, { code: 'parameter_unknown', param });
  }
  const param = inBrackets(issue.path);
  return isMissing(raw, issue.path)
    ? badRequest(`Missing required param: ${param}.`, { code: 'parameter_missing', param })
    : badRequest(`Invalid ${param}: ${issue.message}`, { code: 'parameter_invalid', param });
}

/** @throws Fault for the first parameter that is unknown, missing or of the wrong kind */
export function readParams<T>(schema: z.ZodType<T>, raw: unknown): T {
  const result = schema.safeParse(raw);
  if (result.success) return result.data;
  const [issue] = result.error.issues;
  throw issue ? toFault(raw, issue) : badRequest('The parameters cannot be read.');
}

/** Stripe's rule: given keys are set, a key with an empty value goes, an empty map clears all. */
export function mergeMetadata(
  old: Record<string, string>,
  change: '' | Record<string, string> | undefined,
): Record<string, string> {
  if (change === undefined) return old;
  if (change === '') return {};
  return Object.fromEntries(Object.entries({ ...old, ...change }).filter(([, value]) => value !== ''));
}
