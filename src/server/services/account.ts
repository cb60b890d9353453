import { DeleteObjectsCommand } from '@aws-sdk/client-s3';
import { eq } from 'drizzle-orm';
import type { ProfileInput } from '#contracts/account';
import { birthDateProblem } from '#domain/minimum-age';
import type { App } from '#server/app';
import { members, photos, stripeCustomers, subscriptions, users } from '#server/db/schema/index';
import { AppError, notFound } from '#server/errors';
import { audit } from './audit.ts';
import type { Viewer } from './viewer.ts';

/** What the account page shows: the user row and, for a member, the member row. */
export async function readProfile(app: App, viewer: Viewer) {
  const [row] = await app.db
    .select({ user: users, member: members })
    .from(users)
    .leftJoin(members, eq(members.userId, users.id))
    .where(eq(users.id, viewer.id));
  if (!row) throw notFound();
  return row;
}

/** Writes the profile; birth date and sex may be taken back by leaving them empty. */
export async function saveProfile(app: App, viewer: Viewer, input: ProfileInput): Promise<void> {
  const { name, timeZone, units, wants, ...member } = input;
  await app.db.transaction(async (tx) => {
    await tx.update(users).set({ name, timeZone, units }).where(eq(users.id, viewer.id));
    await tx
      .update(members)
      .set({
        ...member,
        wantsReminders: wants.has('reminders'),
        wantsLetter: wants.has('letter'),
        measuresBody: wants.has('body'),
      })
      .where(eq(members.userId, viewer.id));
  });
}

/** The one rule about age that the form itself cannot check: it needs today. */
export function ageProblem(app: App, { birthDate }: Pick<ProfileInput, 'birthDate'>): Record<string, string> {
  const problem = birthDate && birthDateProblem(birthDate, app.clock.now());
  return problem ? { birthDate: problem } : {};
}

/**
 * Deletes a member: pictures, the running subscription, then every row by cascade. The provider keeps its invoices, as
 * the law asks; the audit line names nobody.
 * @throws AppError forbidden for staff, who are removed by the owner
 */
export async function deleteAccount(app: App, viewer: Viewer): Promise<void> {
  if (viewer.role === 'coach' || viewer.role === 'owner') {
    throw new AppError('forbidden', 'Members hang on this account. Ask the owner to move them first.');
  }
  const keys = await app.db
    .select({ key: photos.objectKey })
    .from(photos)
    .where(eq(photos.memberId, viewer.id));
  const live = await app.db
    .select({ id: subscriptions.id, status: subscriptions.status })
    .from(subscriptions)
    .where(eq(subscriptions.memberId, viewer.id));
  const [customer] = await app.db
    .select()
    .from(stripeCustomers)
    .where(eq(stripeCustomers.memberId, viewer.id));
  for (const { id, status } of live) {
    if (status !== 'canceled' && status !== 'incomplete_expired') await app.stripe.subscriptions.cancel(id);
  }
  if (customer) await app.stripe.customers.del(customer.customerId);
  if (keys.length > 0) {
    await app.objects.send(
      new DeleteObjectsCommand({
        Bucket: app.env.s3.bucket,
        Delete: { Objects: keys.map(({ key }) => ({ Key: key })) },
      }),
    );
  }
  await app.transaction(async (tx, enqueue) => {
    await tx.delete(users).where(eq(users.id, viewer.id));
    await audit(tx, { at: app.clock.now(), actorId: null, action: 'deleted an account' });
    await enqueue('mail', { letter: 'deleted', address: viewer.email });
  });
}

/** Turns bulk mail off by the token in a mail; needs no sign-in. Answers whether the token was known. */
export async function unsubscribe(app: App, token: string): Promise<boolean> {
  const changed = await app.db
    .update(members)
    .set({ wantsReminders: false, wantsLetter: false })
    .where(eq(members.unsubscribeToken, token))
    .returning({ id: members.userId });
  return changed.length > 0;
}
