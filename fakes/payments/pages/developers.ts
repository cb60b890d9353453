import { z } from 'zod';
import { html, json, seeOther, type Html } from '../../core/html.ts';
import { route, type Route } from '../../core/router.ts';
import { currentPeriod } from '../billing/lifecycle.ts';
import { CALM, readChaos } from '../deliveries.ts';
import type { ChaosDoc } from '../docs.ts';
import type { Desk } from '../index.ts';
import { day, moment, notFoundPage, payPage } from './layout.ts';
import { statusWord } from './portal.ts';

const SHOWN = 50;

function table(id: string, title: string, heads: string[], rows: Html[]): Html {
  return html`<h2 id="${id}">${title}</h2>
    ${
      rows.length === 0
        ? html`<p>Nothing yet.</p>`
        : html`<div class="scroll" role="region" aria-labelledby="${id}" tabindex="0">
            <table>
              <thead>
                <tr>
                  ${heads.map((head) => html`<th scope="col">${head}</th>`)}
                </tr>
              </thead>
              <tbody>
                ${rows}
              </tbody>
            </table>
          </div>`
    }`;
}

const cells = (...parts: (Html | string | number | null)[]) =>
  html`<tr>
    ${parts.map((part) => html`<td>${part}</td>`)}
  </tr>`;

function chaosForm(chaos: ChaosDoc): Html {
  const box = (name: 'shuffle' | 'duplicate', words: string) =>
    html`<label class="choice"
      ><input type="checkbox" name="${name}" value="true" ${chaos[name] && html`checked`} />${words}</label
    >`;
  return html`<h2 id="post">The post</h2>
    <form method="post" action="/_fake/chaos">
      <fieldset>
        <legend>How badly events travel</legend>
        ${box('shuffle', 'In any order')} ${box('duplicate', 'Each one twice')}
        <label class="field" for="drop"
          >Share that gets lost <small>From 0 to 1. A lost one can be sent again below.</small></label
        >
        <input type="text" id="drop" name="drop" inputmode="decimal" value="${chaos.drop}" />
      </fieldset>
      <div class="acts"><button>Set</button></div>
    </form>`;
}

async function indexPage({ read, store }: Desk) {
  const customers = await read.all('customer', {}, SHOWN);
  const subscriptions = await read.all('subscription', {}, SHOWN);
  const events = await read.all('event', {}, SHOWN);
  const deliveries = await read.all('delivery', {}, SHOWN);
  const clocks = await read.all('test_helpers.test_clock', {}, SHOWN);
  const body = html`<h1>What the stand-in knows</h1>
    <p>The newest ${SHOWN} of each. The product talks to this as if it were the real service.</p>
    ${table(
      'customers',
      'Customers',
      ['Id', 'E-mail', 'Since', 'Clock'],
      customers.map(({ id, email, created, test_clock: clock }) =>
        cells(id, email, moment(created), clock ?? 'real time'),
      ),
    )}
    ${table(
      'subscriptions',
      'Subscriptions',
      ['Id', 'Customer', 'State', 'Period ends'],
      subscriptions.map((one) =>
        cells(
          one.id,
          one.customer,
          statusWord(one.status) + (one.cancel_at_period_end ? ', ends with the period' : ''),
          day(currentPeriod(one).end),
        ),
      ),
    )}
    ${table(
      'clocks',
      'Test clocks',
      ['Id', 'Name', 'Stands at'],
      clocks.map(({ id, name, frozen_time: at }) => cells(id, name, moment(at))),
    )}
    ${chaosForm(await readChaos(store))}
    ${table(
      'deliveries',
      'Deliveries',
      ['Event', 'State', 'Answers', 'Again'],
      deliveries.map(({ id, event, type, state, attempts }) =>
        cells(
          html`<a href="/_fake/events/${event}">${type}</a>`,
          state,
          attempts.map(({ outcome }) => outcome).join(', ') || 'none',
          html`<form method="post" action="/_fake/deliveries/${id}/resend">
            <button aria-label="Send ${type} again">Send again</button>
          </form>`,
        ),
      ),
    )}
    ${table(
      'events',
      'Events',
      ['Id', 'What', 'When'],
      events.map(({ id, type, created }) =>
        cells(html`<a href="/_fake/events/${id}">${id}</a>`, type, moment(created)),
      ),
    )}`;
  return payPage('What the stand-in knows', body);
}

const chaosShape = z.strictObject({
  shuffle: z.boolean().default(false),
  duplicate: z.boolean().default(false),
  drop: z.coerce.number().min(0).max(1).default(0),
});

/** From a test's JSON or the page's form. */
async function readChaosWish(request: Request): Promise<unknown> {
  const text = await request.text();
  if (request.headers.get('content-type')?.includes('json')) return JSON.parse(text);
  const fields = new URLSearchParams(text);
  return {
    shuffle: fields.get('shuffle') === 'true',
    duplicate: fields.get('duplicate') === 'true',
    drop: fields.get('drop') || 0,
  };
}

/** The pages and switches that the real service does not have. */
export const developerRoutes = (desk: Desk): Route[] => [
  route('GET', '/', () => indexPage(desk)),
  route('GET', '/_fake/events/:id', async ({ param }) => {
    const event = await desk.read.find('event', param('id'));
    if (!event) return notFoundPage();
    return payPage(
      event.type,
      html`<h1>${event.type}</h1>
        <pre>${JSON.stringify(event, null, 2)}</pre>`,
    );
  }),
  route('POST', '/_fake/deliveries/:id/resend', async ({ param }) => {
    await desk.resend(param('id'));
    return seeOther('/#deliveries');
  }),
  route('POST', '/_fake/chaos', async ({ request }) => {
    const isJson = request.headers.get('content-type')?.includes('json') ?? false;
    const wish = chaosShape.safeParse(await readChaosWish(request));
    if (!wish.success)
      return json({ error: 'shuffle and duplicate are yes or no, drop is from 0 to 1' }, 400);
    const chaos: ChaosDoc = { ...CALM, ...wish.data };
    await desk.change((ledger) => ledger.save('setting', chaos));
    return isJson ? json(chaos) : seeOther('/#post');
  }),
];
