import type { OutgoingMail } from './mailer.ts';
import { LETTERS, type Letter, type LetterName } from './templates.ts';

/** A mail waiting to be sent: to a user (address looked up when it goes) or, before there is one, to an address. */
export interface MailJob {
  letter: LetterName;
  userId?: string;
  address?: string;
  data?: Record<string, string>;
}

export interface MailFrame {
  to: string;
  name: string | null;
  origin: string;
  unsubscribeToken?: string | null;
}

const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (char) => `&#${char.charCodeAt(0)};`);

const FOOT =
  'Newel is a coaching practice, not a medical service. If something hurts in your chest, or you faint, stop and call your local emergency number.';

function html(letter: Letter, greeting: string, link: string | null, unsubscribe: string | null): string {
  const paragraph = (text: string) => `<p style="margin:0 0 16px">${escapeHtml(text)}</p>`;
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<meta name="color-scheme" content="light dark"><title>${escapeHtml(letter.subject)}</title></head>
<body style="margin:0;padding:24px;background:#d1e6d9;color:#13201a;font:17px/1.55 'Instrument Sans',system-ui,sans-serif">
<div style="max-width:560px;margin:0 auto;background:#faf7ed;padding:28px;border-top:8px solid #65371f">
<p style="margin:0 0 20px;font:600 22px Georgia,serif">Newel</p>
${[greeting, ...letter.paragraphs].map(paragraph).join('\n')}
${
  link && letter.action
    ? `<p style="margin:24px 0"><a href="${escapeHtml(link)}" style="display:inline-block;background:#65371f;color:#fdf9f0;padding:14px 22px;text-decoration:none;font-weight:600">${escapeHtml(letter.action.label)}</a></p>
<p style="margin:0 0 16px;font-size:14px;color:#3a4d44">Or copy this address: ${escapeHtml(link)}</p>`
    : ''
}
<p style="margin:24px 0 0;padding-top:14px;border-top:1px solid #b3c2b9;font-size:13px;color:#3a4d44">${FOOT}${
    unsubscribe ? ` <a href="${escapeHtml(unsubscribe)}" style="color:#3a4d44">Stop these reminders</a>` : ''
  }</p></div></body></html>`;
}

/** Puts a letter's words into the one frame all mails share, with a text part always. */
export function renderMail(job: MailJob, frame: MailFrame): OutgoingMail {
  const letter: Letter = LETTERS[job.letter](job.data ?? {});
  const greeting = frame.name ? `Dear ${frame.name},` : 'Hello,';
  const link = letter.action ? `${frame.origin}${letter.action.path}` : null;
  const unsubscribe =
    letter.bulk && frame.unsubscribeToken
      ? `${frame.origin}/unsubscribe?token=${frame.unsubscribeToken}`
      : null;
  const text = [
    greeting,
    ...letter.paragraphs,
    ...(link && letter.action ? [`${letter.action.label}: ${link}`] : []),
    `--\n${FOOT}`,
    ...(unsubscribe ? [`Stop these reminders: ${unsubscribe}`] : []),
  ].join('\n\n');
  return {
    to: frame.to,
    subject: letter.subject,
    text,
    html: html(letter, greeting, link, unsubscribe),
    ...(unsubscribe && {
      headers: {
        'List-Unsubscribe': `<${unsubscribe}>`,
        'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
      },
    }),
  };
}
