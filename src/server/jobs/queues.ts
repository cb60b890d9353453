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
  'payment-event': { expireInSeconds: 30, retryLimit: 12 },
  photo: { expireInSeconds: 60, retryLimit: 3 },
  tick: { expireInSeconds: 120, retryLimit: 0 },
};
