import { findMovement } from '../figure/movements.ts';
import { describe, expect, it } from 'vitest';
import {
  canDo,
  isRung,
  LADDERS,
  movementOf,
  MOVEMENTS,
  neighbours,
  rungOf,
  rungsFor,
  type Kit,
} from './ladders.ts';

const ALL_RUNGS = MOVEMENTS.flatMap((movement) => LADDERS[movement].rungs);
const NOTHING: ReadonlySet<Kit> = new Set();

describe('the ladders (order and costs: common practice, no source)', () => {
  it('has eight movements and the rungs of the push-up in the order of the practice', () => {
    expect(MOVEMENTS).toEqual(['push', 'sit-up', 'squat', 'stairs', 'pull', 'plank', 'hinge', 'calf']);
    expect(LADDERS.push.rungs.map(({ id }) => id)).toEqual([
      'push-up-wall',
      'push-up-stair-4',
      'push-up-stair-2',
      'push-up-knees',
      'push-up-floor',
      'push-up-feet-stair',
    ]);
  });

  it('gives every rung its own id, a name and one thing to watch', () => {
    expect(new Set(ALL_RUNGS.map(({ id }) => id)).size).toBe(ALL_RUNGS.length);
    expect(new Set(ALL_RUNGS.map(({ name }) => name)).size).toBe(ALL_RUNGS.length);
    for (const { watch } of ALL_RUNGS) expect(watch).toMatch(/^[A-Z].*\.$/u);
  });

  it.each(MOVEMENTS)('%s: each rung of one unit costs more than the one before', (movement) => {
    expect(LADDERS[movement].rungs[0].costPerUnit).toBeGreaterThan(0);
    for (const unit of ['reps', 'seconds', 'flights'] as const) {
      const costs = LADDERS[movement].rungs
        .filter((rung) => rung.unit === unit)
        .map(({ costPerUnit }) => costPerUnit);
      expect(costs).toEqual([...new Set(costs)].toSorted((a, b) => a - b));
    }
  });

  it('flags every share of body weight, and none is above the whole body', () => {
    const shares = ALL_RUNGS.flatMap(({ share }) => share ?? []);
    expect(shares.length).toBeGreaterThan(0);
    for (const { ofBodyWeight, flag } of shares) {
      expect(ofBodyWeight).toBeGreaterThan(0);
      expect(ofBodyWeight).toBeLessThan(1);
      expect(flag).toBe('memory');
    }
  });

  it('shows every rung by a drawn figure', () => {
    expect(ALL_RUNGS.filter(({ figure }) => findMovement(figure) === null)).toEqual([]);
  });

  it('finds a rung and its movement by id', () => {
    for (const movement of MOVEMENTS)
      for (const rung of LADDERS[movement].rungs) {
        expect(rungOf(rung.id)).toBe(rung);
        expect(movementOf(rung.id)).toBe(movement);
        expect(isRung(rung.id)).toBe(true);
      }
    expect(isRung('push-up-moon')).toBe(false);
    expect(() => rungOf('push-up-moon')).toThrow(RangeError);
    expect(() => neighbours('toString')).toThrow(RangeError);
  });
});

describe('neighbours', () => {
  it('lead from one end of each ladder to the other and back', () => {
    for (const movement of MOVEMENTS) {
      const ids = LADDERS[movement].rungs.map(({ id }) => id);
      ids.forEach((id, i) => {
        expect(neighbours(id).down?.id).toBe(ids[i - 1]);
        expect(neighbours(id).up?.id).toBe(ids[i + 1]);
      });
    }
  });

  it('pass over what the house does not allow', () => {
    expect(neighbours('push-up-wall', NOTHING).up?.id).toBe('push-up-floor');
    expect(neighbours('push-up-floor', NOTHING).down?.id).toBe('push-up-wall');
    expect(neighbours('pull-up', new Set<Kit>(['mat'])).down?.id).toBe('row-prone');
    expect(neighbours('row-prone', new Set<Kit>(['mat'])).up).toBeNull();
  });
});

describe('what a house allows', () => {
  it('is every rung whose needs are met', () => {
    expect(rungsFor('pull', new Set<Kit>(['bar'])).map(({ id }) => id)).toEqual([
      'hang-dead',
      'hang-active',
      'pull-up',
      'chin-up',
    ]);
    expect(canDo(rungOf('pull-up-negative'), new Set<Kit>(['bar']))).toBe(false);
    expect(canDo(rungOf('pull-up-negative'), new Set<Kit>(['bar', 'chair']))).toBe(true);
  });

  it('is push-ups, squats and the hinge where there is nothing', () => {
    expect(MOVEMENTS.filter((movement) => rungsFor(movement, NOTHING).length > 0)).toEqual([
      'push',
      'squat',
      'hinge',
    ]);
  });
});
