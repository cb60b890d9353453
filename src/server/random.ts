import { randomBytes, randomUUID } from 'node:crypto';

/** The one source of chance, injected so that tests can repeat it. */
export interface Random {
  uuid(): string;
  /** A secret of `bytes` random bytes in base64url. */
  token(bytes?: number): string;
}

export const secureRandom: Random = {
  uuid: randomUUID,
  token: (bytes = 32) => randomBytes(bytes).toString('base64url'),
};
