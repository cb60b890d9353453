import nodemailer from 'nodemailer';
import type { Env } from '#server/env';

export interface OutgoingMail {
  to: string;
  subject: string;
  text: string;
  html: string;
  headers?: Record<string, string>;
}

export interface Mailer {
  send(mail: OutgoingMail): Promise<void>;
  close(): void;
}

/** Sends through the configured SMTP server. A refused or lost connection throws, and the job is tried again. */
export function openMailer(env: Env): Mailer {
  const transport = nodemailer.createTransport(env.smtpUrl, { from: env.mailFrom });
  return {
    send: async (mail) => void (await transport.sendMail(mail)),
    close: () => transport.close(),
  };
}
