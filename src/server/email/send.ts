import { eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { members, users } from '#server/db/schema/index';
import { renderMail, type MailJob } from './render.ts';

/** Sends one queued mail. A person who is gone gets none; bulk mail follows their wish at the moment of sending. */
export async function sendMail(app: App, job: MailJob): Promise<void> {
  const origin = app.env.publicOrigin;
  if (!job.userId) {
    if (job.address) await app.mailer.send(renderMail(job, { to: job.address, name: null, origin }));
    return;
  }
  const [person] = await app.db
    .select({
      email: users.email,
      name: users.name,
      token: members.unsubscribeToken,
      wantsReminders: members.wantsReminders,
    })
    .from(users)
    .leftJoin(members, eq(members.userId, users.id))
    .where(eq(users.id, job.userId));
  if (!person) return;
  const mail = renderMail(job, {
    to: person.email,
    name: person.name,
    origin,
    unsubscribeToken: person.token,
  });
  if (mail.headers && person.wantsReminders === false) return;
  await app.mailer.send(mail);
}
