import { html, seeOther, type Html } from '../../core/html.ts';
import { route, type Route } from '../../core/router.ts';
import { money } from '../billing/amounts.ts';
import { changeSubscription, currentPeriod, settle } from '../billing/lifecycle.ts';
import { rhythmOf } from '../billing/periods.ts';
import { setDefaultCard } from '../calls/customers.ts';
import { attachMethod, createMethod, type TestCard } from '../cards.ts';
import type { CustomerDoc, InvoiceDoc, PortalDoc, SubscriptionDoc } from '../docs.ts';
import { badRequest, Fault } from '../fault.ts';
import type { Desk } from '../index.ts';
import type { Ledger } from '../ledger.ts';
import { cardFields, chosenCard, readCardFields, type CardFields } from './card-fields.ts';
import { day, faultBox, notFoundPage, payPage, readFields } from './layout.ts';

const DONE: Record<string, string> = {
  card: 'The card was changed.',
  cancelled: 'The membership ends with this period. Nothing more is charged.',
  kept: 'The membership goes on.',
  paid: 'The invoice is paid.',
};
const FAILED: Record<string, string> = {
  refused: 'The bank was told no. The card on file stays as it was.',
  declined: 'The card was declined. Nothing was charged.',
};

const STATUS: Record<string, string> = {
  trialing: 'In trial',
  active: 'Running',
  past_due: 'Payment is late',
  canceled: 'Ended',
  paused: 'Paused',
  incomplete: 'First payment is missing',
  incomplete_expired: 'Never began',
  unpaid: 'Unpaid',
};

export const statusWord = (status: string) => STATUS[status] ?? status;

/** Makes a new card the one that pays everything of this customer. @throws Fault when the bank refuses it */
export async function keepCard(desk: Desk, portal: string, card: TestCard): Promise<void> {
  await desk.change(async (ledger) => {
    const { customer: id } = await ledger.need('billing_portal.session', portal);
    const customer = await ledger.need('customer', id);
    const at = await ledger.time(customer.test_clock);
    const method = await createMethod(ledger, card, at, { email: customer.email });
    await attachMethod(ledger, method, id, at);
    const paying = await setDefaultCard(ledger, customer, method.id);
    await ledger.save('customer', paying);
    ledger.emit('customer.updated', paying, at);
    for (const { id: subscription, status } of await ledger.all('subscription', { customer: id })) {
      if (status === 'canceled' || status === 'incomplete_expired') continue;
      await changeSubscription(ledger, subscription, { default_payment_method: method.id }, at);
    }
  });
}

function membership(subscription: SubscriptionDoc, name: string): Html {
  const { status, cancel_at_period_end: ends, id } = subscription;
  const [item] = subscription.items.data;
  const over = status === 'canceled' || status === 'incomplete_expired';
  const until = day(currentPeriod(subscription).end);
  return html`<section class="panel">
    <h3>${name}</h3>
    <p>
      ${statusWord(status)}${item && html` · ${money(item.price.unit_amount, item.price.currency)} each ${rhythmOf(item.price)}`}
    </p>
    <p>
      ${over ? `Ended on ${day(subscription.ended_at)}.` : ends ? `Ends on ${until}.` : `Next on ${until}.`}
    </p>
    ${
      !over &&
      html`<form method="post" class="acts">
        <input type="hidden" name="subscription" value="${id}" />
        ${
          ends
            ? html`<button name="act" value="keep">Keep it after all</button>`
            : html`<button name="act" value="cancel">Cancel at the end of the period</button>`
        }
      </form>`
    }
  </section>`;
}

const INVOICE_STATUS: Record<string, string> = {
  paid: 'Paid',
  open: 'Not paid yet',
  void: 'Withdrawn',
  uncollectible: 'Given up',
  draft: 'Draft',
};

const invoiceRow = (invoice: InvoiceDoc): Html =>
  html`<tr>
    <td><a href="/invoice/${invoice.id}">${invoice.number ?? 'Draft'}</a></td>
    <td>${day(invoice.created)}</td>
    <td>
      ${INVOICE_STATUS[String(invoice.status)]}
      ${
        invoice.status === 'open' &&
        html`<form method="post">
          <input type="hidden" name="invoice" value="${invoice.id}" />
          <button name="act" value="pay">Pay now</button>
        </form>`
      }
    </td>
    <td class="figure">${money(invoice.amount_due, invoice.currency)}</td>
  </tr>`;

async function portalPage(
  ledger: Ledger,
  portal: PortalDoc,
  customer: CustomerDoc,
  {
    typed,
    done = null,
    problem = null,
  }: { typed: CardFields; done?: string | null; problem?: string | null },
) {
  const subscriptions = await ledger.all('subscription', { customer: customer.id });
  const invoices = await ledger.all('invoice', { customer: customer.id });
  const products = new Map((await ledger.all('product')).map(({ id, name }) => [id, name]));
  const method = await ledger.find('payment_method', customer.invoice_settings.default_payment_method ?? '');
  const nameOf = ({ items }: SubscriptionDoc) =>
    products.get(items.data[0]?.price.product ?? '') ?? 'Membership';
  const body = html`<h1>Membership and card</h1>
    ${done && html`<div class="said" role="status"><p>${done}</p></div>`} ${faultBox(problem)}
    <p class="quiet">For ${customer.email ?? customer.id}</p>
    <h2 id="membership">Membership</h2>
    ${
      subscriptions.length > 0
        ? subscriptions.map((one) => membership(one, nameOf(one)))
        : html`<p>There is none yet.</p>`
    }
    <h2 id="card">Card</h2>
    <p>${method ? `Visa ending in ${method.card.last4}` : 'No card is on file.'}</p>
    <details ${problem && html`open`}>
      <summary>Change the card</summary>
      <form method="post">
        ${cardFields(typed)}
        <div class="acts"><button class="tread" name="act" value="card">Change the card</button></div>
      </form>
    </details>
    <h2 id="invoices">Invoices</h2>
    ${
      invoices.length === 0
        ? html`<p>There are none yet.</p>`
        : html`<div class="scroll" role="region" aria-labelledby="invoices" tabindex="0">
            <table>
              <thead>
                <tr>
                  <th scope="col">Number</th>
                  <th scope="col">Date</th>
                  <th scope="col">State</th>
                  <th scope="col" class="figure">Amount</th>
                </tr>
              </thead>
              <tbody>
                ${invoices.map(invoiceRow)}
              </tbody>
            </table>
          </div>`
    }
    ${portal.return_url && html`<div class="acts"><a class="button" href="${portal.return_url}">Return</a></div>`}`;
  return payPage('Membership and card', body, problem ? 422 : 200);
}

async function changeEnd(desk: Desk, customer: string, id: string, ends: boolean): Promise<void> {
  await desk.change(async (ledger) => {
    const subscription = await ledger.need('subscription', id);
    if (subscription.customer !== customer) throw badRequest('This is another membership.');
    const at = await ledger.time(subscription.test_clock);
    const reason = ends ? ('cancellation_requested' as const) : null;
    await changeSubscription(
      ledger,
      id,
      {
        cancel_at_period_end: ends,
        cancel_at: ends ? currentPeriod(subscription).end : null,
        canceled_at: ends ? at : null,
        cancellation_details: { comment: null, feedback: null, feedback_option: null, reason },
      },
      at,
    );
  });
}

async function payInvoice(desk: Desk, customer: string, id: string): Promise<boolean> {
  return desk.change(async (ledger) => {
    const invoice = await ledger.need('invoice', id);
    if (invoice.customer !== customer || invoice.status !== 'open')
      throw badRequest('This invoice is not open.');
    const at = await ledger.time(invoice.test_clock);
    return (await settle(ledger, invoice, { at, present: false, counted: false })).fault === null;
  });
}

/** Does what a button of the portal asks, and says with which word to come back. */
async function act(desk: Desk, portal: PortalDoc, fields: URLSearchParams): Promise<string> {
  const subscription = fields.get('subscription') ?? '';
  switch (fields.get('act')) {
    case 'cancel':
      await changeEnd(desk, portal.customer, subscription, true);
      return 'cancelled';
    case 'keep':
      await changeEnd(desk, portal.customer, subscription, false);
      return 'kept';
    case 'pay':
      return (await payInvoice(desk, portal.customer, fields.get('invoice') ?? '')) ? 'paid' : 'declined';
    default:
      throw badRequest('This button is unknown.');
  }
}

const EMPTY: CardFields = { choice: 'succeeds', number: '' };

export const portalRoutes = (desk: Desk): Route[] => [
  route('GET', '/portal/:id', async ({ param, url }) => {
    const portal = await desk.read.find('billing_portal.session', param('id'));
    const customer = portal && (await desk.read.find('customer', portal.customer));
    if (!customer) return notFoundPage();
    const said = url.searchParams.get('said') ?? '';
    const words = { done: DONE[said] ?? null, problem: FAILED[said] ?? null };
    return portalPage(desk.read, portal, customer, { typed: EMPTY, ...words });
  }),
  route('POST', '/portal/:id', async ({ param, request }) => {
    const portal = await desk.read.find('billing_portal.session', param('id'));
    const customer = portal && (await desk.read.find('customer', portal.customer));
    if (!customer) return notFoundPage();
    const fields = await readFields(request);
    const typed = readCardFields(fields);
    try {
      if (fields.get('act') !== 'card')
        return seeOther(`/portal/${portal.id}?said=${await act(desk, portal, fields)}`);
      const card = chosenCard(typed);
      if ('problem' in card)
        return await portalPage(desk.read, portal, customer, { typed, problem: card.problem });
      if (card.choice === 'authenticate') {
        await desk.change((ledger) =>
          ledger.save('approval', { id: portal.id, number: card.number, email: null }),
        );
        return seeOther(`/portal/${portal.id}/authenticate`);
      }
      await keepCard(desk, portal.id, card);
      return seeOther(`/portal/${portal.id}?said=card`);
    } catch (error) {
      if (!(error instanceof Fault)) throw error;
      return portalPage(desk.read, portal, customer, { typed, problem: error.message });
    }
  }),
];
