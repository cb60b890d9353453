import type { ErrorReply } from './errors.ts';

/** A refused or lost request, with the sentence to show and the sentence for each field. */
export class RequestError extends Error {
  constructor(
    message: string,
    readonly status: number,
    readonly fields: Record<string, string> = {},
  ) {
    super(message);
    this.name = 'RequestError';
  }
}

const LINE_LOST = 'The line is down. What you wrote is kept on this device; try again when it is back.';

async function call<T>(path: string, init: RequestInit): Promise<T> {
  let reply: Response;
  try {
    reply = await fetch(path, { credentials: 'same-origin', ...init });
  } catch {
    throw new RequestError(LINE_LOST, 0);
  }
  if (reply.ok) return (await reply.json()) as T;
  const body = (await reply.json().catch(() => null)) as ErrorReply | null;
  throw new RequestError(
    body?.error.message ?? 'That did not work. Try again.',
    reply.status,
    body?.error.fields,
  );
}

export const getJson = <T>(path: string): Promise<T> => call<T>(path, { method: 'GET' });

/** Sends a write. Keep `key` for every retry of the same write, and it is done once however often it is sent. */
export const postJson = <T>(path: string, body: unknown, key: string): Promise<T> =>
  call<T>(path, {
    method: 'POST',
    headers: { 'content-type': 'application/json', 'idempotency-key': key },
    body: JSON.stringify(body),
  });
