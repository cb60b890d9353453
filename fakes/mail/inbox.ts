import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import type { Doc, DocStore } from '../core/doc-store.ts';
import type { Handler } from '../core/doors.ts';
import { esc, page, redirect, stylesheet } from '../core/pages.ts';

const STRIP = 'Local inbox: these letters leave this machine never.';

interface Mail extends Doc {
  id: string;
  to: string;
  from: string;
  subject: string;
  text: string;
  html: string;
  receivedAt: string;
  headers: Record<string, string>;
}

/** An SMTP server that takes every letter, reads it and keeps it. */
export function createSmtp(store: DocStore, newId: (prefix: string) => string, now: () => Date): SMTPServer {
  return new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onAuth: (_auth, _session, done) => done(null, { user: 'anybody' }),
    onData(stream, session, done) {
      simpleParser(stream)
        .then(async (parsed) => {
          const mail: Mail = {
            id: newId('mail_'),
            to: session.envelope.rcptTo.map(({ address }) => address.toLowerCase()).join(', '),
            from: parsed.from?.text ?? '',
            subject: parsed.subject ?? '',
            text: parsed.text ?? '',
            html: parsed.html || '',
            receivedAt: now().toISOString(),
            headers: Object.fromEntries(
              parsed.headerLines.map(({ key, line }) => [key, line.slice(key.length + 1).trim()]),
            ),
          };
          await store.put('mail', mail.id, mail);
          done();
        })
        .catch((error: unknown) => done(error instanceof Error ? error : new Error('unreadable letter')));
    },
  });
}

const links = (mail: Mail) => [...new Set(mail.text.match(/https?:\/\/\S+/g) ?? [])];

function listPage(mails: Mail[], to: string): Response {
  const rows = mails
    .slice(0, 100)
    .map(
      (mail) =>
        `<tr><td><a href="/mail/${mail.id}">${esc(mail.subject)}</a></td><td>${esc(mail.to)}</td><td>${esc(new Date(mail.receivedAt).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit', second: '2-digit' }))}</td></tr>`,
    )
    .join('');
  return page(
    'Inbox',
    STRIP,
    `<form method="get"><label>To whom<input type="text" name="to" value="${esc(to)}"></label><button>Look</button></form>${
      rows
        ? `<table><tr><th>Subject</th><th>To</th><th>At</th></tr>${rows}</table>`
        : '<p>No letter lies here. When the product sends one, it comes within seconds.</p>'
    }`,
  );
}

const mailPage = (mail: Mail) =>
  page(
    mail.subject,
    STRIP,
    `<p><a href="/">Inbox</a></p><p class="soft">From ${esc(mail.from)} to ${esc(mail.to)}</p>
<ul>${links(mail)
      .map((link) => `<li><a href="${esc(link)}">${esc(link)}</a></li>`)
      .join('')}</ul>
<iframe title="The letter as it looks" src="/mail/${mail.id}/html" sandbox style="width:100%;height:34rem;border:0"></iframe>
<h2>Text part</h2><pre style="white-space:pre-wrap">${esc(mail.text)}</pre>`,
  );

/** The inbox's web page, and its API for tests: `GET /api/mails?to=`, `GET /api/mails/:id`, `DELETE /api/mails`. */
export const inboxHandler =
  (store: DocStore): Handler =>
  async (request) => {
    const url = new URL(request.url);
    const [, area = '', id = '', part = ''] = url.pathname.split('/');
    const to = (url.searchParams.get('to') ?? '').toLowerCase();
    const mails = async () => (await store.list<Mail>('mail')).filter((mail) => mail.to.includes(to));
    if (url.pathname === '/style.css') return stylesheet();
    if (url.pathname === '/') return listPage(await mails(), to);
    if (area === 'api' && id === 'mails') {
      if (request.method === 'DELETE') {
        for (const mail of await mails()) await store.remove('mail', mail.id);
        return redirect('/');
      }
      return Response.json(part ? await store.get<Mail>('mail', part) : await mails());
    }
    const mail = area === 'mail' ? await store.get<Mail>('mail', id) : null;
    if (!mail) return page('No such letter', STRIP, '<p><a href="/">Inbox</a></p>', 404);
    if (part !== 'html') return mailPage(mail);
    return new Response(mail.html, {
      headers: {
        'content-type': 'text/html; charset=utf-8',
        'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'",
      },
    });
  };
