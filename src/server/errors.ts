import { ERROR_STATUS, type ErrorCode } from '#contracts/errors';

/** An expected failure: `code` decides the status, `message` is a sentence a person may read. */
export class AppError extends Error {
  readonly status: number;
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly fields: Record<string, string> = {},
  ) {
    super(message);
    this.name = 'AppError';
    this.status = ERROR_STATUS[code];
  }
}

/** Absent and somebody else's answer alike. */
export const notFound = () => new AppError('not-found', 'There is nothing here.');

export const forbidden = () => new AppError('forbidden', 'This page belongs to somebody with another role.');

/** Recognises our error across the two bundles (front and pages), where `instanceof` cannot. */
export const isAppError = (error: unknown): error is AppError =>
  error instanceof Error && error.name === 'AppError' && 'code' in error;

const CONNECTION_CODES = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  '57P01',
  '57P02',
  '57P03',
  '08006',
  '08003',
  '08001',
]);

/** True when the database could not be reached, at any depth of `cause`. */
export function isDatabaseDown(error: unknown): boolean {
  for (let at: unknown = error; at instanceof Error; at = at.cause) {
    const code = 'code' in at ? String(at.code) : '';
    if (CONNECTION_CODES.has(code) || at.message.includes('Connection terminated')) return true;
    if (at instanceof AggregateError && at.errors.some(isDatabaseDown)) return true;
  }
  return false;
}
