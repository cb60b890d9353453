import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

interface Lock {
  packages: Record<string, { version?: string }>;
}

const read = <T>(path: string) => JSON.parse(readFileSync(path, 'utf8')) as T;
const { floors } = read<{ floors: Record<string, { version: string; why: string }> }>(
  'docs/version-floors.json',
);
const NUMBERS = /^(\d+)\.(\d+)\.(\d+)(-.+)?$/;

/** True when `version` is the floor or newer. A pre-release of the floor is older than it. */
function reaches(version: string, floor: string): boolean {
  const [, ...have] = NUMBERS.exec(version) ?? [];
  const [, ...want] = NUMBERS.exec(floor) ?? [];
  for (const part of [0, 1, 2]) {
    const difference = Number(have[part]) - Number(want[part]);
    if (difference !== 0) return difference > 0;
  }
  return have[3] === undefined;
}

/** Every locked copy of a package, at the top or nested under another. */
const copies = (lock: Lock, name: string) =>
  Object.entries(lock.packages).filter(([path]) => path.split('node_modules/').at(-1) === name);

const tooOld = (lock: Lock) =>
  Object.entries(floors).flatMap(([name, { version: floor }]) =>
    copies(lock, name)
      .filter(([, { version = '' }]) => !reaches(version, floor))
      .map(([path, { version }]) => `${path} ${version} < ${floor}`),
  );

describe('the lock file', () => {
  const lock = read<Lock>('package-lock.json');

  it('holds every floor, nested copies included', () => {
    for (const name of Object.keys(floors)) expect(copies(lock, name), name).not.toEqual([]);
    expect(tooOld(lock)).toEqual([]);
  });

  it('would be caught with one old copy deep inside', () => {
    const packages = { ...lock.packages, 'node_modules/astro/node_modules/sharp': { version: '0.34.5' } };
    expect(tooOld({ packages })).toEqual(['node_modules/astro/node_modules/sharp 0.34.5 < 0.35.0']);
  });

  it('says why each floor is where it is', () => {
    for (const { version, why } of Object.values(floors)) {
      expect(version).toMatch(NUMBERS);
      expect(why.length).toBeGreaterThan(20);
    }
  });

  it.each([
    ['1.2.3', '1.2.3', true],
    ['1.2.2', '1.2.3', false],
    ['1.10.0', '1.9.9', true],
    ['1.2.3-rc.1', '1.2.3', false],
    ['2.0.0-rc.1', '1.2.3', true],
  ])('reads %s against %s', (version, floor, expected) => {
    expect(reaches(version, floor)).toBe(expected);
  });
});
