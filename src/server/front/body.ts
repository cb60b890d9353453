import type { IncomingMessage } from 'node:http';

const SMALL_BYTES = 1024 * 1024;
const PHOTO_BYTES = 12 * 1024 * 1024;

/** The largest body a path accepts, in bytes. */
export const bodyLimit = (pathname: string): number =>
  pathname === '/api/photos' ? PHOTO_BYTES : SMALL_BYTES;

/** Thrown in mid-stream when a body without a stated length grows past its limit. */
export class BodyTooLarge extends Error {
  constructor() {
    super('the body is larger than this address takes');
    this.name = 'BodyTooLarge';
  }
}

/** True when the stated length alone is too large: answered before a byte is read. */
export function statedTooLarge(request: IncomingMessage, limit: number): boolean {
  const stated = request.headers['content-length'];
  return stated !== undefined && !(Number(stated) <= limit);
}

/** Passes a body on and counts; past the limit it throws, so a chunked body cannot fill the memory either. */
export async function* countedBody(
  request: IncomingMessage,
  limit: number,
  onTooLarge: () => void,
): AsyncGenerator<Buffer> {
  let seen = 0;
  for await (const chunk of request as AsyncIterable<Buffer>) {
    seen += chunk.length;
    if (seen > limit) {
      onTooLarge();
      throw new BodyTooLarge();
    }
    yield chunk;
  }
}
