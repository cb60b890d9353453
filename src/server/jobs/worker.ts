import type { App } from '#server/app';
import { applyPaymentEvent } from '#server/billing/apply-event';
import { sendMail } from '#server/email/send';
import { preparePhoto } from '#server/services/photos';
import type { JobPayloads, QueueName } from './queues.ts';
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
    await app.boss.work<JobPayloads[Q]>(queue, { pollingIntervalSeconds: 0.5 }, async (jobs) => {
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
    });
  };
  await work('mail');
  await work('payment-event');
  await work('photo');
  await work('tick');
  await app.boss.schedule('tick', TICK_CRON, {});
}
