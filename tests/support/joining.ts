import type { ReadinessAnswers } from '#domain/readiness/questions';
import type { App } from '#server/app';
import { plans } from '#server/db/schema/index';
import type { JobPayloads, QueueName } from '#server/jobs/queues';

/** Answers that speak against nothing. */
export const CLEAR: ReadinessAnswers = {
  activity: 'active',
  disease: ['none'],
  signs: ['none'],
  pregnancy: 'no',
  age: '18-44',
  medicinesPulse: 'no',
  bloodPressure: 'normal',
  recentIllnessOrSurgery: 'no',
  effort: 'light-moderate',
};

/** Answers that send to a doctor first. */
export const DOCTOR: ReadinessAnswers = { ...CLEAR, disease: ['cardiovascular'], effort: 'vigorous' };

/** What lies in a queue, oldest first, whether or not a worker has taken it. */
export async function queued<Q extends QueueName>(app: App, queue: Q): Promise<JobPayloads[Q][]> {
  const { rows } = await app.pool.query<{ data: JobPayloads[Q] }>(
    'select data from pgboss.job where name = $1 order by created_on, id',
    [queue],
  );
  return rows.map(({ data }) => data);
}

/** The letters that wait for a person, by name. */
export const lettersTo = async (app: App, userId: string): Promise<string[]> =>
  (await queued(app, 'mail')).filter((mail) => mail.userId === userId).map(({ letter }) => letter);

/** A monthly plan of £39 with as many trial days as given. */
export async function addPlanOnSale(app: App, trialDays = 0) {
  const [plan] = await app.db
    .insert(plans)
    .values({
      slug: `month-${app.random.uuid()}`,
      name: 'With a coach',
      summary: 'A coach who answers within a day.',
      interval: 'month',
      amountMinor: 3900,
      trialDays,
      createdAt: app.clock.now(),
    })
    .returning();
  if (!plan) throw new Error('the plan was not written');
  return plan;
}

/** Pays at the stand-in's hosted page, as a browser would, with the card of this number. */
export const payAt = (address: string, number: string): Promise<Response> =>
  fetch(address, { method: 'POST', body: new URLSearchParams({ number }), redirect: 'manual' });

/** Runs `work` and gives the code of the AppError it throws, or 'none'. */
export async function codeOf(work: Promise<unknown>): Promise<string> {
  try {
    await work;
    return 'none';
  } catch (error) {
    if (error instanceof Error && error.name === 'AppError' && 'code' in error) return String(error.code);
    throw error;
  }
}
