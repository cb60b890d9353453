import { createLock, type Doc, type DocStore, type Where } from './doc-store.ts';

/** The same containment as PostgreSQL's `@>` on the objects and plain values that the stand-ins ask for. */
function holds(value: unknown, part: unknown): boolean {
  if (typeof part !== 'object' || part === null) return value === part;
  if (typeof value !== 'object' || value === null) return false;
  const fields = new Map<string, unknown>(Object.entries(value));
  return Object.entries(part).every(([name, wanted]) => holds(fields.get(name), wanted));
}

const copy = <T>(doc: Doc): T => JSON.parse(JSON.stringify(doc)) as T;

/** A store that lives as long as the test that made it. */
export function createMemoryStore(): DocStore {
  let kinds = new Map<string, Map<string, Doc>>();
  const locked = createLock();
  const kindOf = (kind: string) => kinds.get(kind) ?? new Map<string, Doc>();

  const store: DocStore = {
    get: async <T extends Doc>(kind: string, id: string) => {
      const doc = kindOf(kind).get(id);
      return doc ? copy<T>(doc) : null;
    },
    put: async (kind, doc) => void kinds.set(kind, kindOf(kind).set(doc.id, copy<Doc>(doc))),
    putAll: async (kind, docs) => {
      for (const doc of docs) await store.put(kind, doc);
    },
    list: async <T extends Doc>(kind: string, where: Where = {}, limit = Infinity) =>
      [...kindOf(kind).values()]
        .reverse()
        .filter((doc) => holds(doc, where))
        .slice(0, limit)
        .map((doc) => copy<T>(doc)),
    delete: async (kind, id) => kindOf(kind).delete(id),
    transaction: (run) =>
      locked(async () => {
        const before = new Map([...kinds].map(([kind, docs]) => [kind, new Map(docs)]));
        try {
          return await run({ ...store, transaction: (inner) => inner(store) });
        } catch (error) {
          kinds = before;
          throw error;
        }
      }),
    close: async () => undefined,
  };
  return store;
}
