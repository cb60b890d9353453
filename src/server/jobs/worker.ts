import type { App } from '#server/app';
import { applyPaymentEvent } from '#server/billing/apply-event';
import { sendMail } from '#server/email/send';
import { preparePhoto } from '#server/services/photos';
import { BATCH, SIDE_BY_SIDE, type JobPayloads, type QueueName } from './queues.ts';
import { runTick } from './tick.ts';

type Handler<Q extends QueueName> = (app: App, payload: JobPayloads[Q]) => Promise<void>;

const HANDLERS: { [Q in QueueName]: Handler<Q> } = {
  mail: sendMail,
  'payment-event': (app, { eventId }) => applyPaymentEvent(app, eventId),
  photo: (app, { photoId }) => preparePhoto(app, photoId),
  tick: runTick,
};

const TICK_CRON = '* * * * *';

/** Takes jobs from every queue until stopped. Each job is at least once: every handler may run twice. */
export async function startWorker(app: App): Promise<void> {
  const work = async <Q extends QueueName>(queue: Q) => {
    const handle: Handler<Q> = HANDLERS[queue];
    await app.boss.work<JobPayloads[Q]>(
      queue,
      { pollingIntervalSeconds: 0.5, batchSize: BATCH[queue] },
      async (jobs) => {
        for (const job of jobs) {
          try {
            await handle(app, job.data);
          } catch (error) {
            app.log.warn(
              { queue, job: job.id, fault: error instanceof Error ? error.message : 'unknown' },
              'job failed',
            );
            throw error;
          }
        }
      },
    );
  };
  for (const queue of Object.keys(HANDLERS) as QueueName[]) {
    for (let side = 0; side < SIDE_BY_SIDE[queue]; side += 1) await work(queue);
  }
  await app.boss.schedule('tick', TICK_CRON, {});
}
