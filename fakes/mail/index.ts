import type { DocStore } from '../core/doc-store.ts';
import { html, json, page, type Html } from '../core/html.ts';
import { createRouter, route, type Handler } from '../core/router.ts';
import { styleRoute } from '../core/style.ts';
import { findLetters, LETTER, type Letter } from './letters.ts';

const BAND = 'Mail stand-in: nothing leaves this machine';

const mailPage = (title: string, body: Html, status = 200) => page({ title, band: BAND, body, status });

const notFound = () =>
  mailPage(
    'No such mail',
    html`<h1>No such mail</h1>
      <p><a href="/">To the inbox</a></p>`,
    404,
  );

const moment = (at: string) =>
  `${new Date(at).toLocaleDateString('en-GB', { day: 'numeric', month: 'short', timeZone: 'UTC' })}, ${at.slice(11, 16)} UTC`;

async function listPage(store: DocStore, search: string | null) {
  const letters = await findLetters(store, search);
  const rows = letters.map(
    ({ id, to, subject, at }) =>
      html`<tr>
        <td><a href="/mail/${id}">${subject || 'No subject'}</a></td>
        <td>${to.join(', ')}</td>
        <td>${moment(at)}</td>
      </tr>`,
  );
  const body = html`<h1>Inbox</h1>
    <form method="get" action="/" role="search">
      <label class="field" for="to">Address <small>A part of it is enough.</small></label>
      <input type="search" id="to" name="to" value="${search}" />
      <div class="acts"><button>Search</button></div>
    </form>
    ${
      rows.length === 0
        ? html`<p>
            ${search ? 'No mail to or from this address.' : 'No mail yet. It arrives here as soon as it is sent.'}
          </p>`
        : html`<div class="scroll" role="region" aria-label="Mails, newest first" tabindex="0">
            <table>
              <thead>
                <tr>
                  <th scope="col">Subject</th>
                  <th scope="col">To</th>
                  <th scope="col">Arrived</th>
                </tr>
              </thead>
              <tbody>
                ${rows}
              </tbody>
            </table>
          </div>`
    }`;
  return mailPage('Inbox', body);
}

function letterPage(letter: Letter) {
  const body = html`<p><a href="/">Inbox</a></p>
    <h1>${letter.subject || 'No subject'}</h1>
    <div class="panel">
      <dl>
        <dt>From</dt>
        <dd>${letter.from}</dd>
        <dt>To</dt>
        <dd>${letter.to.join(', ')}</dd>
        <dt>Arrived</dt>
        <dd>${moment(letter.at)}</dd>
      </dl>
    </div>
    ${
      letter.links.length > 0 &&
      html`<h2>Links</h2>
        <ul>
          ${letter.links.map((link) => html`<li><a href="${link}">${link}</a></li>`)}
        </ul>`
    }
    ${
      letter.html &&
      html`<h2>As a mail program shows it</h2>
        <iframe title="The mail" sandbox="allow-popups" src="/mail/${letter.id}/html"></iframe>`
    }
    <h2>As text</h2>
    <pre class="panel">${letter.text || 'There is no text part.'}</pre>
    ${
      letter.attachments.length > 0 &&
      html`<h2>Attached</h2>
        <ul>
          ${letter.attachments.map(({ name, type, bytes }) => html`<li>${name}, ${type}, ${bytes} bytes</li>`)}
        </ul>`
    }
    <details>
      <summary>Headers</summary>
      <dl>
        ${letter.headers.map(
          ({ name, value }) =>
            html`<dt>${name}</dt>
              <dd>${value}</dd>`,
        )}
      </dl>
    </details>`;
  return mailPage(letter.subject || 'No subject', body);
}

/** The mail's own HTML: no script runs, nothing is fetched, links open a page of their own. */
const htmlPart = (letter: Letter) =>
  new Response(`<base target="_blank">${letter.html ?? ''}`, {
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy':
        "default-src 'none'; style-src 'unsafe-inline'; img-src data:; sandbox allow-popups",
      'x-content-type-options': 'nosniff',
    },
  });

/** The inbox: pages for people, JSON under `/api/mails` for tests. */
export function createInbox(store: DocStore): Handler {
  const withLetter = (show: (letter: Letter) => Response) => async (id: string) => {
    const letter = await store.get<Letter>(LETTER, id);
    return letter ? show(letter) : notFound();
  };
  return createRouter(
    [
      styleRoute,
      route('GET', '/', ({ url }) => listPage(store, url.searchParams.get('to'))),
      route('GET', '/mail/:id', ({ param }) => withLetter(letterPage)(param('id'))),
      route('GET', '/mail/:id/html', ({ param }) => withLetter(htmlPart)(param('id'))),
      route('GET', '/api/mails', async ({ url }) =>
        json({ mails: await findLetters(store, url.searchParams.get('to')) }),
      ),
      route('GET', '/api/mails/:id', async ({ param }) => {
        const letter = await store.get<Letter>(LETTER, param('id'));
        return letter ? json(letter) : json({ error: 'no such mail' }, 404);
      }),
      route('DELETE', '/api/mails', async () => {
        const letters = await store.list<Letter>(LETTER);
        for (const { id } of letters) await store.delete(LETTER, id);
        return json({ deleted: letters.length });
      }),
    ],
    async () => notFound(),
  );
}
