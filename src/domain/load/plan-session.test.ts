import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findMovement } from '../figure/movements.ts';
import { MOVEMENTS, rungsFor, type Kit, type MovementId } from '../movement/ladders.ts';
import { planSession, trainable, type PlanSessionInput } from './plan-session.ts';

const ALL: ReadonlySet<Kit> = new Set(['bar', 'chair', 'stairs', 'mat']);

const plan = (change: Partial<PlanSessionInput> = {}) =>
  planSession({ week: 1, ordinal: 1, emphasis: 'balanced', targets: [], kit: ALL, cautions: {}, ...change });

const week = (change: Partial<PlanSessionInput>) =>
  [1, 2, 3].map((ordinal) => plan({ ...change, ordinal }).items);

describe('the round of sessions (common practice, no source)', () => {
  it('covers every movement it should in a week, with a bar and without', () => {
    expect(week({})).toEqual([
      ['push', 'squat', 'sit-up'],
      ['stairs', 'pull', 'plank'],
      ['push', 'stairs', 'hinge'],
    ]);
    const withoutBar = week({ kit: new Set<Kit>(['stairs', 'mat', 'chair']), week: 2 });
    expect(withoutBar).toEqual([
      ['push', 'squat', 'sit-up'],
      ['stairs', 'hinge', 'plank'],
      ['push', 'stairs', 'squat'],
    ]);
  });

  it('starts the round again with a fourth session', () => {
    expect(plan({ ordinal: 4 }).items).toEqual(plan({ ordinal: 1 }).items);
  });

  it('is named by what is in it', () => {
    expect(plan().title).toBe('Push-up, squat and sit-up');
  });

  it('adds up warm-up, work and cool-down', () => {
    // Three movements of 3 × (8 × 3 s + 75 s) = 297 s each: 14.85 min, so 15, and twice 5.
    expect(plan().minutes).toBe(25);
    const longer = plan({
      targets: [{ movement: 'push', rung: 'push-up-wall', sets: 3, amount: 28, unit: 'reps', effort: 6 }],
    });
    // 180 s more: 3 min.
    expect(longer.minutes).toBe(28);
    expect(plan().warmUp.minutes).toBe(5);
    expect(plan().coolDown.minutes).toBe(5);
    for (const { figures } of [plan().warmUp, plan().coolDown]) {
      expect(figures.length).toBeGreaterThan(0);
      for (const figure of figures) expect(findMovement(figure)).not.toBeNull();
    }
  });

  it('leaves sit-ups and planks out in pregnancy', () => {
    for (const ordinal of [1, 2, 3]) {
      const { items } = plan({ ordinal, cautions: { pregnant: true } });
      expect(items).toHaveLength(3);
      expect(items).not.toContain('sit-up');
      expect(items).not.toContain('plank');
    }
  });

  it('leaves out what the coach has taken out, and fills the place', () => {
    const { items } = plan({ cautions: { avoid: ['push'] } });
    expect(items).toHaveLength(3);
    expect(items).not.toContain('push');
  });

  it('works in a house with nothing', () => {
    expect([...trainable(new Set(), {})].toSorted()).toEqual(['hinge', 'push', 'squat']);
    expect(week({ kit: new Set() }).map((items) => items.toSorted())).toEqual([
      ['hinge', 'push', 'squat'],
      ['hinge', 'push', 'squat'],
      ['hinge', 'push', 'squat'],
    ]);
  });

  it('gives fewer only when cautions leave fewer', () => {
    const { items, minutes, title } = plan({ kit: new Set(), cautions: { avoid: ['push', 'hinge'] } });
    expect(items).toEqual(['squat']);
    expect(title).toBe('Squat');
    expect(minutes).toBe(15);
  });

  it('never plans what the house or the cautions forbid, and nothing twice', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 12 }),
        fc.integer({ min: 1, max: 14 }),
        fc.subarray<Kit>(['bar', 'chair', 'stairs', 'mat']).map((have) => new Set(have)),
        fc.subarray<MovementId>([...MOVEMENTS]),
        fc.boolean(),
        (weekNumber, ordinal, kit, avoid, pregnant) => {
          const cautions = { pregnant, avoid };
          const { items } = plan({ week: weekNumber, ordinal, kit, cautions });
          expect(new Set(items).size).toBe(items.length);
          expect(items.length).toBe(Math.min(3, trainable(kit, cautions).size));
          for (const movement of items) {
            expect(avoid).not.toContain(movement);
            expect(rungsFor(movement, kit).length).toBeGreaterThan(0);
          }
        },
      ),
    );
  });

  it('with all kit, brings no movement more than twice a week', () => {
    for (let number = 1; number <= 12; number += 1) {
      const planned = week({ week: number }).flat();
      for (const movement of planned)
        expect(planned.filter((other) => other === movement).length).toBeLessThanOrEqual(2);
    }
  });
});
