import type { Doc } from '../core/doc-store.ts';
import { esc, page, redirect } from '../core/pages.ts';
import { itemOf, retry, startSubscription, type Price, type Subscription } from './billing.ts';
import { cardOf, CARDS, newPaymentMethod, type CardBehaviour } from './cards.ts';
import { need, timeOf, type Desk } from './kinds.ts';

const STRIP = 'Payment stand-in: no real money moves.';
const DECLINED = 'That card was declined. Choose another; nothing was charged.';

interface Session extends Doc {
  id: string;
  status: string;
  customer: string;
  success_url: string;
  cancel_url: string | null;
  _price: string;
  _trialDays: number;
  _metadata: Record<string, string>;
  _card?: string;
}

interface Customer extends Doc {
  id: string;
  name: string | null;
  email: string | null;
  invoice_settings: { default_payment_method: string | null };
}

const money = (minor: number, currency: string) =>
  new Intl.NumberFormat('en-GB', { style: 'currency', currency: currency.toUpperCase() }).format(minor / 100);
const day = (seconds: number) =>
  new Intl.DateTimeFormat('en-GB', {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    timeZone: 'UTC',
  }).format(seconds * 1000);
const grouped = (number: string) => number.replace(/(\d{4})(?=\d)/g, '$1 ');

const cardFields = (chosen = CARDS[0]?.number) =>
  `<fieldset style="border:0;padding:0;margin:0"><legend><b>Test card</b></legend>${CARDS.map(
    ({ number, behaviour }) =>
      `<label><input type="radio" name="card" value="${number}"${number === chosen ? ' checked' : ''}> ${grouped(number)} <span class="soft">${behaviour}</span></label>`,
  ).join(
    '',
  )}</fieldset><label>Or type one of these numbers<input type="text" name="typed" inputmode="numeric" autocomplete="off"></label>`;

async function checkoutPage(desk: Desk, session: Session, fault = ''): Promise<Response> {
  const price = await need<Price>(desk, 'price', session._price);
  const product = await need<Doc & { name: string }>(desk, 'product', price.product);
  const sum = money(price.unit_amount, price.currency);
  const now = session._trialDays > 0 ? money(0, price.currency) : sum;
  return page(
    'Pay for your plan',
    STRIP,
    `<div class="panel"><p>${esc(product.name)}</p><p class="sum">${now} now</p><p class="soft">${
      session._trialDays > 0 ? `Free for ${session._trialDays} days, then ` : 'Then '
    }${sum} every ${price.recurring.interval}, until you cancel.</p></div>${fault ? `<p class="fault" role="alert">${esc(fault)}</p>` : ''}
<form method="post">${cardFields()}<p><button>Pay ${now}</button></p></form>${
      session.cancel_url ? `<p><a href="${esc(session.cancel_url)}">Back, without paying</a></p>` : ''
    }`,
    fault ? 402 : 200,
  );
}

/** Puts a card on file for the customer and makes it the one that renewals use. */
async function attach(
  desk: Desk,
  customerId: string,
  number: string,
  behaviour: CardBehaviour,
): Promise<string> {
  const card = newPaymentMethod(desk.newId('pm_'), customerId, number, behaviour);
  await desk.store.put('payment_method', card.id, card);
  const customer = await need<Customer>(desk, 'customer', customerId);
  await desk.store.put('customer', customerId, {
    ...customer,
    invoice_settings: { default_payment_method: card.id },
  });
  await desk.emit('payment_method.attached', card);
  return card.id;
}

async function complete(desk: Desk, session: Session, number: string): Promise<Response> {
  const card = cardOf(number);
  if (!card) return checkoutPage(desk, session, DECLINED);
  const paymentMethod = await attach(desk, session.customer, card.number, card.behaviour);
  const price = await need<Price>(desk, 'price', session._price);
  const subscription = await startSubscription(desk, {
    customer: session.customer,
    price,
    trialDays: session._trialDays,
    metadata: session._metadata,
    paymentMethod,
  });
  const done = {
    ...session,
    status: 'complete',
    payment_status: session._trialDays > 0 ? 'no_payment_required' : 'paid',
    subscription: subscription.id,
  };
  await desk.store.put('checkout.session', session.id, done);
  await desk.emit('checkout.session.completed', done);
  return redirect(session.success_url.replace('{CHECKOUT_SESSION_ID}', session.id));
}

async function pay(desk: Desk, session: Session, form: URLSearchParams): Promise<Response> {
  const card = cardOf(form.get('typed')?.trim() || form.get('card') || '');
  if (!card)
    return checkoutPage(desk, session, 'That is not one of the test numbers. Choose one from the list.');
  if (card.behaviour === 'is declined') return checkoutPage(desk, session, DECLINED);
  if (card.behaviour === 'needs authentication') {
    await desk.store.put('checkout.session', session.id, { ...session, _card: card.number });
    return redirect(`/pay/${session.id}/authenticate`);
  }
  return complete(desk, session, card.number);
}

const authenticatePage = (fault = '') =>
  page(
    'Your bank asks',
    STRIP,
    `${fault ? `<p class="fault" role="alert">${esc(fault)}</p>` : ''}<p>The card needs your approval before it pays.</p>
<form method="post"><p><button name="answer" value="approve">Approve</button> <button class="second" name="answer" value="refuse">Refuse</button></p></form>`,
  );

/** `/pay/:session` and its authentication step. */
export async function checkoutScreen(
  desk: Desk,
  request: Request,
  id: string,
  authenticate: boolean,
): Promise<Response> {
  const session = await need<Session>(desk, 'checkout.session', id);
  if (session.status === 'complete')
    return redirect(session.success_url.replace('{CHECKOUT_SESSION_ID}', id));
  if (session.status !== 'open')
    return page(
      'This page has closed',
      STRIP,
      '<p>Go back to the practice and start again. Nothing was charged.</p>',
      410,
    );
  if (request.method === 'GET') return authenticate ? authenticatePage() : checkoutPage(desk, session);
  const form = new URLSearchParams(await request.text());
  if (!authenticate) return pay(desk, session, form);
  if (form.get('answer') === 'approve' && session._card) return complete(desk, session, session._card);
  return checkoutPage(desk, session, 'You refused at the bank. Choose another card, or the same one again.');
}

async function portalPage(desk: Desk, customer: Customer, portal: Doc, said = ''): Promise<Response> {
  const subscriptions = (await desk.store.list<Subscription>('subscription')).filter(
    (one) => one.customer === customer.id,
  );
  const invoices = (await desk.store.list('invoice')).filter((one) => one['customer'] === customer.id);
  const live = subscriptions.find(({ status }) => status !== 'canceled');
  const plan = live
    ? `<p>${money(itemOf(live).price.unit_amount, itemOf(live).price.currency)} every ${itemOf(live).price.recurring.interval}, ${esc(live.status.replace('_', ' '))}. ${
        live.cancel_at_period_end ? 'Ends' : 'Renews'
      } ${day(itemOf(live).current_period_end)}.</p><form method="post" class="inline"><button class="second" name="do" value="${
        live.cancel_at_period_end ? 'keep' : 'cancel'
      }">${live.cancel_at_period_end ? 'Keep it after all' : 'Cancel at the end of the period'}</button></form>`
    : '<p>No plan is running.</p>';
  const rows = invoices
    .map(
      (one) =>
        `<tr><td><a href="/invoices/${esc(one['id'])}">${esc(one['number'])}</a></td><td>${day(Number(one['created']))}</td><td>${money(Number(one['total']), String(one['currency']))}</td><td>${esc(one['status'])}</td></tr>`,
    )
    .join('');
  return page(
    'Card and invoices',
    STRIP,
    `${said ? `<p role="status"><b>${esc(said)}</b></p>` : ''}<div class="panel"><h2>Plan</h2>${plan}</div>
<div class="panel"><h2>Card</h2><form method="post">${cardFields()}<p><button name="do" value="card">Use this card</button></p></form></div>
<div class="panel"><h2>Invoices</h2>${rows ? `<table><tr><th>Number</th><th>Day</th><th>Sum</th><th>State</th></tr>${rows}</table>` : '<p>None yet.</p>'}</div>
<p><a class="button" href="${esc(portal['return_url'] ?? '/')}">Return to the practice</a></p>`,
  );
}

/** `/portal/:id`: another card, the end of the plan, invoices. A new card pays what is owed at once. */
export async function portalScreen(desk: Desk, request: Request, id: string): Promise<Response> {
  const portal = await need<Doc & { customer: string }>(desk, 'billing_portal.session', id);
  const customer = await need<Customer>(desk, 'customer', portal.customer);
  if (request.method === 'GET') return portalPage(desk, customer, portal);
  const form = new URLSearchParams(await request.text());
  const live = (await desk.store.list<Subscription>('subscription')).find(
    (one) => one.customer === customer.id && one.status !== 'canceled',
  );
  if (form.get('do') === 'card') {
    const card = cardOf(form.get('typed')?.trim() || form.get('card') || '');
    if (!card || card.behaviour === 'is declined') return portalPage(desk, customer, portal, DECLINED);
    await attach(desk, customer.id, card.number, card.behaviour);
    if (live?.status === 'past_due') await retry(desk, live, await timeOf(desk, customer.id));
    return portalPage(desk, await need(desk, 'customer', customer.id), portal, 'The new card is on file.');
  }
  if (live && (form.get('do') === 'cancel' || form.get('do') === 'keep')) {
    const cancel = form.get('do') === 'cancel';
    const after = {
      ...live,
      cancel_at_period_end: cancel,
      canceled_at: cancel ? await timeOf(desk, customer.id) : null,
    };
    await desk.store.put('subscription', live.id, after);
    await desk.emit('customer.subscription.updated', after);
    return portalPage(
      desk,
      customer,
      portal,
      cancel ? 'It ends with the period that is paid.' : 'It goes on.',
    );
  }
  return portalPage(desk, customer, portal);
}

/** `/invoices/:id`, to print. */
export async function invoiceScreen(desk: Desk, id: string): Promise<Response> {
  const invoice = await need<Doc>(desk, 'invoice', id);
  const customer = await desk.store.get<Customer>('customer', String(invoice['customer']));
  return page(
    `Invoice ${String(invoice['number'])}`,
    STRIP,
    `<p>Newel, 4 Net Loft Lane, Skerrow</p><table><tr><th>For</th><td>${esc(customer?.name ?? customer?.email ?? 'a member who left')}</td></tr>
<tr><th>Day</th><td>${day(Number(invoice['created']))}</td></tr><tr><th>Period</th><td>${day(Number(invoice['period_start']))} to ${day(Number(invoice['period_end']))}</td></tr>
<tr><th>Sum</th><td>${money(Number(invoice['total']), String(invoice['currency']))}</td></tr><tr><th>State</th><td>${esc(invoice['status'])}</td></tr></table>`,
  );
}

/** `/`: what the stand-in holds, for developers. */
export async function indexScreen(desk: Desk): Promise<Response> {
  const [customers, subscriptions, deliveries] = await Promise.all([
    desk.store.list<Customer>('customer'),
    desk.store.list<Subscription>('subscription'),
    desk.store.list('delivery'),
  ]);
  const names = new Map(customers.map(({ id, name, email }) => [id, name ?? email ?? id]));
  return page(
    'Payment stand-in',
    STRIP,
    `<h2>${subscriptions.length} subscriptions</h2><table><tr><th>Who</th><th>State</th><th>Sum</th><th>Period ends</th></tr>${subscriptions
      .slice(0, 100)
      .map(
        (one) =>
          `<tr><td>${esc(names.get(one.customer) ?? one.customer)}</td><td>${esc(one.status)}${one.cancel_at_period_end ? ', ends' : ''}</td><td>${money(itemOf(one).price.unit_amount, itemOf(one).price.currency)}</td><td>${day(itemOf(one).current_period_end)}</td></tr>`,
      )
      .join(
        '',
      )}</table><h2>Newest deliveries</h2><table><tr><th>Event</th><th>Type</th><th>State</th><th>Tries</th></tr>${deliveries
      .slice(0, 40)
      .map(
        (one) =>
          `<tr><td>${esc(one['id'])}</td><td>${esc(one['type'])}</td><td>${esc(one['state'])}</td><td>${esc(one['tries'])}</td></tr>`,
      )
      .join('')}</table>`,
  );
}
