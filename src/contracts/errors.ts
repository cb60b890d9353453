/** Every expected failure and the status it answers with; the one table both sides read. */
export const ERROR_STATUS = {
  'bad-request': 400,
  'signed-out': 401,
  'payment-needed': 402,
  forbidden: 403,
  'not-found': 404,
  conflict: 409,
  'too-large': 413,
  'wrong-type': 415,
  invalid: 422,
  held: 423,
  'too-many': 429,
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof ERROR_STATUS;

/** The body of every JSON reply that is not a success. */
export interface ErrorReply {
  error: { code: ErrorCode | 'fault'; message: string; fields: Record<string, string>; requestId: string };
}
