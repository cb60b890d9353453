/// <reference types="astro/client" />

declare namespace App {
  /** What the front server (or, in `astro dev`, the middleware) puts beside a request. */
  interface Locals {
    app: import('#server/app').App;
    requestId: string;
    /** The client's address, computed from the configured number of trusted proxies. */
    clientIp: string;
    /** A prerendered page for a status, from memory; undefined in `astro dev`. */
    errorPage?: ((status: number) => string | undefined) | undefined;
    /** Set by the middleware: who is signed in. */
    viewer: import('#server/services/viewer').Viewer | null;
  }
}
