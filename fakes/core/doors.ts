import { createServer, type IncomingMessage, type Server } from 'node:http';
import { Readable } from 'node:stream';
import { http, type HttpHandler } from 'msw';

/** One core: a web-standard handler. Its two doors are below. */
export type Handler = (request: Request) => Promise<Response>;

function toRequest(incoming: IncomingMessage): Request {
  const headers = new Headers();
  for (const [name, value] of Object.entries(incoming.headers)) {
    for (const one of [value ?? []].flat()) headers.append(name, one);
  }
  const method = incoming.method ?? 'GET';
  const hasBody = method !== 'GET' && method !== 'HEAD';
  return new Request(`http://${incoming.headers.host ?? 'localhost'}${incoming.url ?? '/'}`, {
    method,
    headers,
    ...(hasBody && { body: Readable.toWeb(incoming) as ReadableStream, duplex: 'half' }),
  } as RequestInit);
}

/** The first door: a real server on loopback. */
export async function serve(handler: Handler, port: number): Promise<Server> {
  const server = createServer((incoming, outgoing) => {
    handler(toRequest(incoming))
      .then(async (reply) => {
        outgoing.statusCode = reply.status;
        reply.headers.forEach((value, name) => outgoing.setHeader(name, value));
        outgoing.end(Buffer.from(await reply.arrayBuffer()));
      })
      .catch((error: unknown) => {
        console.error(error);
        outgoing.statusCode = 500;
        outgoing.end('the stand-in broke');
      });
  });
  await new Promise<void>((done) => server.listen(port, '127.0.0.1', done));
  return server;
}

/** The second door: the same handler for msw, at an origin that is never opened. */
export const mswDoor = (handler: Handler, origin: string): HttpHandler[] => [
  http.all(`${origin}/*`, ({ request }) => handler(request)),
];
