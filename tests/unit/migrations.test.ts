import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import journal from '../../drizzle/meta/_journal.json';

describe('the migrations', () => {
  it('rise strictly in time and number: a later one is never skipped because an earlier one claims a later hour', () => {
    const { entries } = journal;
    expect(entries.length).toBeGreaterThan(0);
    entries.slice(1).forEach((entry, at) => {
      expect(entry.when).toBeGreaterThan(entries[at]?.when ?? Infinity);
    });
    expect(entries.map(({ idx }) => idx)).toEqual(entries.map((_, at) => at));
  });

  it('are exactly the files beside the journal', () => {
    const files = readdirSync('drizzle').filter((name) => name.endsWith('.sql'));
    expect(files.sort()).toEqual(journal.entries.map(({ tag }) => `${tag}.sql`).sort());
  });

  it('each carry a snapshot that follows from the one before', () => {
    const ids = journal.entries.map(({ idx }) => {
      const path = `drizzle/meta/${String(idx).padStart(4, '0')}_snapshot.json`;
      expect(existsSync(path)).toBe(true);
      return JSON.parse(readFileSync(path, 'utf8')) as { id: string; prevId: string };
    });
    ids.slice(1).forEach(({ prevId }, at) => expect(prevId).toBe(ids[at]?.id));
  });
});
