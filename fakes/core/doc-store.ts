/** A JSON document; every one carries its own id. */
export interface Doc {
  id: string;
}

/** A part of a document that must be equal in it, at any depth: `{ customer: 'cus_1', status: 'open' }`. */
export type Where = Readonly<Record<string, unknown>>;

/**
 * Where the stand-ins keep their state: JSON documents by kind and id, in the order of their first writing.
 * What comes out is a copy; what is changed in it is kept only by `put`.
 */
export interface DocStore {
  get<T extends Doc>(kind: string, id: string): Promise<T | null>;
  /** Writes or overwrites. An overwritten document keeps its place in the order. */
  put(kind: string, doc: Doc): Promise<void>;
  /** The same for many at once, in their order. */
  putAll(kind: string, docs: Doc[]): Promise<void>;
  /** Newest first. */
  list<T extends Doc>(kind: string, where?: Where, limit?: number): Promise<T[]>;
  /** @returns whether there was one */
  delete(kind: string, id: string): Promise<boolean>;
  /** Runs alone among transactions; a throw undoes everything written through `tx`. */
  transaction<T>(run: (tx: DocStore) => Promise<T>): Promise<T>;
  close(): Promise<void>;
}

/** Lets one task at a time through, in the order of asking. */
export function createLock(): <T>(run: () => Promise<T>) => Promise<T> {
  let last: Promise<unknown> = Promise.resolve();
  return (run) => {
    const mine = last.then(run, run);
    last = mine.catch(() => undefined);
    return mine;
  };
}
