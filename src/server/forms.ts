import { z } from 'zod';
import type { FormValues } from '#contracts/form-values';
import { AppError } from '#server/errors';

export { typed, type FormValues } from '#contracts/form-values';

export type FormRead<T> =
  | { ok: true; data: T; values: FormValues }
  | { ok: false; errors: Record<string, string>; values: FormValues };

const UNKNOWN_FIELD = 'The form held a field that this page does not know. Reload the page and try again.';

/** All fields of a posted form as text; a name that comes more than once becomes a list. Files are left out. */
export async function formValues(request: Request): Promise<FormValues> {
  const form = await request.formData().catch(() => {
    throw new AppError('bad-request', 'The form did not arrive whole. Try again.');
  });
  const values: FormValues = {};
  for (const name of new Set(form.keys())) {
    const all = form.getAll(name).filter((value): value is string => typeof value === 'string');
    values[name] = all.length > 1 ? all : (all[0] ?? '');
  }
  return values;
}

/** One sentence a field, the first that failed; the key is the field's name as in the form. */
export function fieldErrors(error: z.ZodError): Record<string, string> {
  const errors: Record<string, string> = {};
  for (const issue of error.issues) {
    if (issue.code === 'unrecognized_keys') throw new AppError('bad-request', UNKNOWN_FIELD);
    errors[issue.path.join('.') || 'form'] ??= issue.message;
  }
  return errors;
}

/**
 * Reads and checks a form against the one schema that page, endpoint and client share. What was typed comes back in
 * `values` either way, so nothing is lost.
 */
export async function readForm<S extends z.ZodType>(
  request: Request,
  schema: S,
): Promise<FormRead<z.output<S>>> {
  const values = await formValues(request);
  const parsed = schema.safeParse(values);
  return parsed.success
    ? { ok: true, data: parsed.data, values }
    : { ok: false, errors: fieldErrors(parsed.error), values };
}
