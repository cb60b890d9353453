/** A stand-in's whole behaviour: a web-standard request in, a web-standard reply out. */
export type Handler = (request: Request) => Promise<Response>;

interface Visit {
  request: Request;
  url: URL;
  /** The part of the path that `:name` stands for, decoded. */
  param(name: string): string;
}

export interface Route {
  method: string;
  pattern: RegExp;
  run: (visit: Visit) => Promise<Response>;
}

/** `route('GET', '/mail/:id', …)`: a `:name` stands for one part of the path. */
export function route(method: string, path: string, run: Route['run']): Route {
  const source = path.replaceAll('.', '\\.').replace(/:(\w+)/g, '(?<$1>[^/]+)');
  return { method, pattern: new RegExp(`^${source}$`), run };
}

/** The first route that fits answers; HEAD is answered like GET. */
export function createRouter(routes: Route[], otherwise: Handler): Handler {
  return async (request) => {
    const url = new URL(request.url);
    const method = request.method === 'HEAD' ? 'GET' : request.method;
    for (const { method: wanted, pattern, run } of routes) {
      const match = wanted === method ? pattern.exec(url.pathname) : null;
      if (!match) continue;
      const param = (name: string) => decodeURIComponent(match.groups?.[name] ?? '');
      return run({ request, url, param });
    }
    return otherwise(request);
  };
}
