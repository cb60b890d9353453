import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { Handler } from './router.ts';

interface Served {
  port: number;
  origin: string;
  close(): Promise<void>;
}

async function toRequest(message: IncomingMessage): Promise<Request> {
  const chunks: Buffer[] = [];
  for await (const chunk of message) chunks.push(chunk as Buffer);
  const headers = new Headers();
  for (const [name, value] of Object.entries(message.headers)) {
    for (const one of [value ?? []].flat()) headers.append(name, one);
  }
  const method = message.method ?? 'GET';
  const hasBody = method !== 'GET' && method !== 'HEAD' && chunks.length > 0;
  return new Request(new URL(message.url ?? '/', `http://${message.headers.host ?? '127.0.0.1'}`), {
    method,
    headers,
    ...(hasBody && { body: Buffer.concat(chunks) }),
  });
}

async function send(reply: Response, out: ServerResponse): Promise<void> {
  const body = Buffer.from(await reply.arrayBuffer());
  out.writeHead(reply.status, Object.fromEntries(reply.headers));
  out.end(body);
}

/**
 * The HTTP door: serves a handler on loopback.
 * @param port 0 takes any free one
 * @param onError told of a handler that threw; the caller gets a 500
 */
export async function serveHttp(
  handler: Handler,
  port: number,
  onError: (error: unknown) => void = console.error,
): Promise<Served> {
  const server = createServer((message, out) => {
    toRequest(message)
      .then(handler)
      .then((reply) => send(reply, out))
      .catch((error: unknown) => {
        onError(error);
        if (!out.headersSent) out.writeHead(500);
        out.end();
      });
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('the server has no port');
  return {
    port: address.port,
    origin: `http://127.0.0.1:${address.port}`,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}
