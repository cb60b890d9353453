import { z } from './zod.ts';
import { WARNING_SIGNS } from '#domain/readiness/screen';

const IDS = WARNING_SIGNS.map(({ id }) => id) as [string, ...string[]];

/** A warning sign, reported by one press. */
export const StopInput = z.strictObject({ sign: z.enum(IDS, { error: 'Press what happened.' }) });
