import type { IncomingMessage } from 'node:http';

/**
 * The client's address: with no trusted proxy the socket's; behind `hops` of them the entry that the nearest trusted
 * proxy wrote, counted from the right. What a client puts in front is never believed.
 */
export function clientAddress(request: IncomingMessage, hops: number): string {
  const socket = request.socket.remoteAddress ?? '';
  if (hops === 0) return socket;
  const header = request.headers['x-forwarded-for'];
  const chain = (Array.isArray(header) ? header.join(',') : (header ?? ''))
    .split(',')
    .map((part) => part.trim())
    .filter(Boolean);
  return chain[chain.length - hops] ?? socket;
}
