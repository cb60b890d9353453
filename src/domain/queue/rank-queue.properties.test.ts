import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { rankQueue, type QueueFacts } from './rank-queue.ts';
import { waitingWeight, WEIGHTS } from './reasons.ts';

const NOW = new Date('2026-12-06T15:40:00Z');
const moment = fc.integer({ min: 0, max: 2000 }).map((hours) => new Date(NOW.getTime() - hours * 3_600_000));

const member = (id: number): fc.Arbitrary<QueueFacts> =>
  fc.record({
    memberId: fc.constant(`m${id}`),
    name: fc.constantFrom('Ann', 'Bea', 'Cy'),
    openAlerts: fc.array(
      fc.record({
        kind: fc.constantFrom('warning-sign' as const, 'pain' as const),
        words: fc.constant('knee'),
        at: moment,
      }),
      { maxLength: 2 },
    ),
    hold: fc.option(fc.record({ since: moment, cause: fc.constant('coach'), reason: fc.constant('rest') })),
    unanswered: fc.option(fc.record({ sentAt: moment, weekStart: fc.constant('2026-11-30') })),
    unreadMessages: fc.option(fc.record({ since: moment })),
    daysSinceSession: fc.option(fc.nat(90)),
    sessionsLastWeek: fc.option(fc.nat(4)),
    realDrop: fc.option(fc.constant({ test: 'Plank', sentence: 'really lower' })),
    testDayDue: fc.boolean(),
    stalledLandings: fc.nat(5),
    rungReady: fc.option(fc.constant({ movement: 'Squat' })),
    firstWeek: fc.boolean(),
    payment: fc.constantFrom('ok' as const, 'past-due' as const, 'lapsed' as const),
    questionsDueOn: fc.option(fc.constantFrom('2026-12-10', '2027-06-01', '2026-11-01')),
  });

const caseload = fc
  .integer({ min: 0, max: 12 })
  .chain((count) => fc.tuple(...Array.from({ length: count }, (_, i) => member(i))));
const promise = fc.integer({ min: 1, max: 72 });
const hasPainOrSign = (facts: QueueFacts): boolean => facts.openAlerts.length > 0;

describe('the queue, whatever the caseload', () => {
  it('is the same in whatever order the members come', () => {
    fc.assert(
      fc.property(
        caseload,
        promise,
        fc.infiniteStream(fc.double({ min: 0, max: 1, noNaN: true })),
        (members, hours, dice) => {
          const shuffled = members
            .map((facts) => ({ facts, die: dice.next().value }))
            .toSorted((a, b) => a.die - b.die)
            .map(({ facts }) => facts);
          expect(rankQueue(shuffled, NOW, hours)).toEqual(rankQueue(members, NOW, hours));
        },
      ),
    );
  });

  it('has everybody with a reason once, heaviest first', () => {
    fc.assert(
      fc.property(caseload, promise, (members, hours) => {
        const queue = rankQueue(members, NOW, hours);
        expect(new Set(queue.map(({ memberId }) => memberId)).size).toBe(queue.length);
        queue.forEach((entry, i) => {
          expect(entry.score).toBeLessThanOrEqual(queue[i - 1]?.score ?? Infinity);
          expect(entry.score).toBe(Math.max(...entry.reasons.map(({ weight }) => weight)));
        });
        const mustBeSeen = members.filter(
          (facts) => facts.unanswered !== null || hasPainOrSign(facts) || facts.hold !== null,
        );
        for (const { memberId } of mustBeSeen)
          expect(queue.some((entry) => entry.memberId === memberId)).toBe(true);
      }),
    );
  });

  it('puts pain and warning signs above all else', () => {
    fc.assert(
      fc.property(caseload, promise, (members, hours) => {
        const alerted = new Set(members.filter(hasPainOrSign).map(({ memberId }) => memberId));
        const order = rankQueue(members, NOW, hours).map(({ memberId }) => alerted.has(memberId));
        expect(order).toEqual(order.toSorted((a, b) => Number(b) - Number(a)));
      }),
    );
  });

  it('puts the older of two check-ins first when nothing else is known', () => {
    fc.assert(
      fc.property(fc.nat(5000), fc.nat(5000), promise, (first, second, hours) => {
        fc.pre(first !== second);
        const waits = (memberId: string, hoursAgo: number): QueueFacts => ({
          memberId,
          name: memberId,
          openAlerts: [],
          hold: null,
          unanswered: { sentAt: new Date(NOW.getTime() - hoursAgo * 3_600_000), weekStart: '2026-11-30' },
          unreadMessages: null,
          daysSinceSession: 1,
          sessionsLastWeek: 3,
          realDrop: null,
          testDayDue: false,
          stalledLandings: 0,
          rungReady: null,
          firstWeek: false,
          payment: 'ok',
          questionsDueOn: null,
        });
        const queue = rankQueue([waits('a', first), waits('b', second)], NOW, hours);
        expect(queue[0]?.memberId).toBe(first > second ? 'a' : 'b');
      }),
    );
  });
});

describe('nobody waits for ever', () => {
  it('a wait gains weight with every hour, and never reaches pain', () => {
    fc.assert(
      fc.property(fc.nat(3000), fc.integer({ min: 1, max: 500 }), promise, (hours, more, promised) => {
        for (const code of ['unanswered', 'message'] as const) {
          const [now, later] = [
            waitingWeight(code, hours, promised),
            waitingWeight(code, hours + more, promised),
          ];
          expect(later).toBeGreaterThan(now);
          expect(later).toBeLessThan(WEIGHTS.pain);
        }
      }),
    );
  });

  it('in the end it stands above everything that is not pain or a warning sign', () => {
    const others = Object.entries(WEIGHTS).filter(([code]) => code !== 'pain' && code !== 'warning-sign');
    const heaviest = Math.max(...others.map(([, weight]) => weight));
    // A fresh hold is the heaviest; three and a half days beyond the promise a check-in stands above it.
    expect(waitingWeight('unanswered', 24 + 84, 24)).toBeGreaterThan(heaviest);
    expect(waitingWeight('message', 24 + 84, 24)).toBeGreaterThan(heaviest);
  });

  it('weighs more at the promised hour than anything the numbers noticed', () => {
    expect(waitingWeight('unanswered', 24, 24)).toBeGreaterThan(WEIGHTS['real-drop']);
    expect(waitingWeight('unanswered', 0, 24)).toBe(WEIGHTS.unanswered);
  });
});
