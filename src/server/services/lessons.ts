import { eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { lessonReads } from '#server/db/schema/index';
import { AppError } from '#server/errors';
import { once } from '#server/once';
import { currentFlight, flightPosition } from './flights.ts';
import { memberState } from './members.ts';
import { writeMessage } from './messages.ts';
import { requireRole, type Viewer } from './viewer.ts';

export interface LessonKey {
  slug: string;
  /** The week of the flight that unlocks it; 0 is open to members from the first day. */
  week: number;
}

/** Whether a lesson may be read, and why not. */
export type LessonGate =
  | { allowed: true; readAt: Date | null; place: number }
  | {
      allowed: false;
      reason: 'signed-out' | 'unpaid' | 'too-early';
      sentence: string;
      /** Where to go instead. */
      next: string;
    };

/** How far a member has come: the highest week that is unlocked. Later flights keep all that the first unlocked. */
async function unlockedWeek(app: App, memberId: string, timeZone: string): Promise<number> {
  const flight = await currentFlight(app.db, memberId);
  if (!flight) return 0;
  return flight.number > 1 ? 12 : flightPosition(flight, app.clock.now(), timeZone).week;
}

/** The gate before a lesson that is not free. A held member may read; coaches may read everything. */
export async function lessonGate(app: App, viewer: Viewer | null, lesson: LessonKey): Promise<LessonGate> {
  const signIn = `/sign-in?next=${encodeURIComponent(`/lessons/${lesson.slug}`)}`;
  if (!viewer)
    return {
      allowed: false,
      reason: 'signed-out',
      sentence: 'This lesson is for members. Sign in, or read a free one.',
      next: signIn,
    };
  if (viewer.role === 'coach' || viewer.role === 'owner') return { allowed: true, readAt: null, place: 0 };
  const state = await memberState(app, viewer.id);
  if (!state?.access.mayRead) {
    const sentence = state?.access.sentence ?? 'This lesson comes with a plan.';
    return {
      allowed: false,
      reason: 'unpaid',
      sentence,
      next: state?.member.joinedAt ? '/account/membership' : '/join',
    };
  }
  const week = await unlockedWeek(app, viewer.id, state.timeZone);
  if (lesson.week > week) {
    const sentence = `This lesson opens in week ${lesson.week} of your flight. You are in week ${week}.`;
    return { allowed: false, reason: 'too-early', sentence, next: '/lessons' };
  }
  const [read] = await app.db
    .insert(lessonReads)
    .values({ memberId: viewer.id, slug: lesson.slug, openedAt: app.clock.now() })
    .onConflictDoUpdate({
      target: [lessonReads.memberId, lessonReads.slug],
      set: { openedAt: app.clock.now() },
    })
    .returning({ readAt: lessonReads.readAt, place: lessonReads.place });
  return { allowed: true, readAt: read?.readAt ?? null, place: read?.place ?? 0 };
}

export interface LessonStates {
  /** The highest unlocked week; -1 for visitors, who read the free ones. */
  week: number;
  read: ReadonlySet<string>;
  opened: ReadonlySet<string>;
}

/** Which lessons are open, opened and read for whoever asks. Three queries. */
export async function lessonStates(app: App, viewer: Viewer | null): Promise<LessonStates> {
  const none = { week: -1, read: new Set<string>(), opened: new Set<string>() };
  if (!viewer) return none;
  if (viewer.role === 'coach' || viewer.role === 'owner') return { ...none, week: 12 };
  const state = await memberState(app, viewer.id);
  if (!state?.access.mayRead) return none;
  const [rows, week] = await Promise.all([
    app.db
      .select({ slug: lessonReads.slug, readAt: lessonReads.readAt })
      .from(lessonReads)
      .where(eq(lessonReads.memberId, viewer.id)),
    unlockedWeek(app, viewer.id, state.timeZone),
  ]);
  return {
    week,
    read: new Set(rows.filter(({ readAt }) => readAt).map(({ slug }) => slug)),
    opened: new Set(rows.map(({ slug }) => slug)),
  };
}

/** Marks a lesson as read by the member who asks. Again is the same. */
export async function markLessonRead(app: App, viewer: Viewer | null, slug: string): Promise<void> {
  const member = requireRole(viewer, 'member');
  const now = app.clock.now();
  await app.db
    .insert(lessonReads)
    .values({ memberId: member.id, slug, openedAt: now, readAt: now })
    .onConflictDoUpdate({ target: [lessonReads.memberId, lessonReads.slug], set: { readAt: now } });
}

/** A line to the coach from a lesson, with the place attached; the same `once` writes it once. @throws AppError invalid when it is empty */
export async function writeLessonNote(
  app: App,
  viewer: Viewer | null,
  note: { slug: string; place: string | null; words: string; once: string },
): Promise<void> {
  const member = requireRole(viewer, 'member');
  const words = note.words.trim();
  if (words === '' || words.length > 4000)
    throw new AppError('invalid', 'Write a few words first.', { words: 'Write a few words first.' });
  const line = { words, lessonSlug: note.slug, lessonPlace: note.place };
  await once(app, member.id, { key: note.once, body: line }, async (tx) => {
    await writeMessage(tx, {
      ...line,
      memberId: member.id,
      authorId: member.id,
      byCoach: false,
      at: app.clock.now(),
    });
  });
}
