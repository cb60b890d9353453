import { pino, type Logger } from 'pino';

export type Log = Logger;

/** Makes the process's logger. Health data, addresses and tokens are never passed to it; `redact` is the net below. */
export function createLog(level: string): Log {
  return pino({
    level,
    base: undefined,
    redact: { paths: ['email', 'to', 'token', 'cookie', 'authorization', 'words', 'body'], remove: true },
  });
}
