import type { MailJob } from '#server/email/render';

/** What each queue carries. Ids only: no health data lies in the job table. */
export interface JobPayloads {
  mail: MailJob;
  'payment-event': { eventId: string };
  photo: { photoId: string };
  /** Looks for whatever has become due by the practice's clock: reminders, letters, grace that ran out. */
  tick: Record<string, never>;
}

export type QueueName = keyof JobPayloads;

/** Longest run in seconds before a job is given to another worker, and how often it is tried again. */
export const QUEUES: Record<QueueName, { expireInSeconds: number; retryLimit: number }> = {
  mail: { expireInSeconds: 30, retryLimit: 8 },
  'payment-event': { expireInSeconds: 120, retryLimit: 12 },
  photo: { expireInSeconds: 60, retryLimit: 3 },
  tick: { expireInSeconds: 120, retryLimit: 0 },
};

/**
 * How many jobs of a queue one fetch takes. Only queues whose jobs change nothing when run again take many: when one job of
 * a fetch fails, all of it is tried again.
 */
export const BATCH: Record<QueueName, number> = { mail: 1, 'payment-event': 50, photo: 1, tick: 1 };

/** How many fetch side by side. A fetch is made every half second. */
export const SIDE_BY_SIDE: Record<QueueName, number> = { mail: 4, 'payment-event': 1, photo: 1, tick: 1 };
