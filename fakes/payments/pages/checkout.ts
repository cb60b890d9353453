import { html, seeOther } from '../../core/html.ts';
import { route, type Route } from '../../core/router.ts';
import { money } from '../billing/amounts.ts';
import { DAY_SECONDS, periodEnd, rhythmOf } from '../billing/periods.ts';
import { freshSession } from '../calls/checkout.ts';
import { checkoutTime, completeCheckout, successUrl } from '../checkout.ts';
import type { CheckoutDoc } from '../docs.ts';
import { Fault } from '../fault.ts';
import type { Desk } from '../index.ts';
import type { Ledger } from '../ledger.ts';
import { cardFields, chosenCard, readCardFields, type CardFields } from './card-fields.ts';
import { day, faultBox, notFoundPage, payPage, readFields } from './layout.ts';

/** Today, the trial and the first renewal, in words. */
async function terms(ledger: Ledger, session: CheckoutDoc) {
  const at = await checkoutTime(ledger, session);
  const plan = await ledger.need('checkout_plan', session.id);
  const [line] = session.line_items.data;
  if (!line) throw new Error('a checkout session has a line');
  const { price } = line;
  const trialEnd = plan.trial_end ?? (plan.trial_end_days ? at + plan.trial_end_days * DAY_SECONDS : null);
  const days = trialEnd === null ? 0 : Math.round((trialEnd - at) / DAY_SECONDS);
  const whole = session.line_items.data.reduce((sum, { amount_total: amount }) => sum + amount, 0);
  const each = `${money(whole, price.currency)} each ${rhythmOf(price)}`;
  return {
    due: money(session.amount_total ?? 0, price.currency),
    free: trialEnd !== null,
    trial:
      trialEnd === null
        ? null
        : `The first ${days} ${days === 1 ? 'day is' : 'days are'} free, until ${day(trialEnd)}.`,
    renewal: `${trialEnd === null ? 'Then' : 'After that'} ${each}, next on ${day(trialEnd ?? periodEnd(at, at, price))}, until you cancel.`,
  };
}

const pageTitle = (session: CheckoutDoc) => session.line_items.data[0]?.description ?? 'Checkout';

async function checkoutPage(
  ledger: Ledger,
  session: CheckoutDoc,
  typed: CardFields & { email: string },
  problem: string | null,
) {
  const { due, free, trial, renewal } = await terms(ledger, session);
  const customer = session.customer ? await ledger.find('customer', session.customer) : null;
  const known = customer?.email ?? session.customer_email;
  const body = html`<div class="narrow">
    <h1>${free ? 'Start the trial' : 'Pay'}</h1>
    ${faultBox(problem)}
    <section class="panel" aria-label="What you buy">
      ${session.line_items.data.map(
        ({ description, quantity, price }) =>
          html`<p>
            <strong>${description}</strong>${(quantity ?? 1) > 1 && html`, ${quantity} times`}<br />
            ${money(price.unit_amount, price.currency)} each ${rhythmOf(price)}
          </p>`,
      )}
      <p class="due">Today: <strong>${due}</strong></p>
      ${trial && html`<p>${trial}</p>`}
      <p>${renewal}</p>
      ${known && html`<p class="quiet">For ${known}</p>`}
    </section>
    <form method="post">
      ${
        !known &&
        html`<label class="field" for="email">E-mail</label>
          <input type="email" id="email" name="email" required autocomplete="email" value="${typed.email}" />`
      }
      ${cardFields(typed)}
      <div class="acts">
        <button class="tread">${free ? 'Start the trial' : `Pay ${due}`}</button>
        ${session.cancel_url && html`<a class="button" href="${session.cancel_url}">Back</a>`}
      </div>
    </form>
  </div>`;
  return payPage(pageTitle(session), body, problem ? 422 : 200);
}

function closedPage(session: CheckoutDoc) {
  return payPage(
    'This page is closed',
    html`<h1>This page is closed</h1>
      <p>Nothing was charged. Go back and begin again.</p>
      ${session.cancel_url && html`<div class="acts"><a class="button" href="${session.cancel_url}">Back</a></div>`}`,
    410,
  );
}

/** The session, or the reply that stands in its place when it is unknown or over. */
export async function openSession(desk: Desk, id: string): Promise<CheckoutDoc | Response> {
  if (!(await desk.read.find('checkout.session', id))) return notFoundPage();
  const session = await desk.change((ledger) => freshSession(ledger, id));
  if (session.status === 'complete') return seeOther(successUrl(session));
  return session.status === 'open' ? session : closedPage(session);
}

/** Pays and leaves, or shows the page again with the bank's words. */
export async function payAndLeave(
  desk: Desk,
  session: CheckoutDoc,
  card: Exclude<ReturnType<typeof chosenCard>, { problem: string }>,
  typed: CardFields & { email: string },
): Promise<Response> {
  try {
    const done = await desk.change((ledger) => completeCheckout(ledger, session, card, typed.email || null));
    return seeOther(successUrl(done));
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    const words =
      error.type === 'card_error'
        ? 'The card was declined. Nothing was charged. Try another card.'
        : error.message;
    return checkoutPage(desk.read, session, typed, words);
  }
}

const SAID: Record<string, string> = { refused: 'The bank was told no. Nothing was charged.' };

export const checkoutRoutes = (desk: Desk): Route[] => [
  route('GET', '/pay/:id', async ({ param, url }) => {
    const session = await openSession(desk, param('id'));
    if (session instanceof Response) return session;
    const words = SAID[url.searchParams.get('said') ?? ''] ?? null;
    return checkoutPage(desk.read, session, { choice: 'succeeds', number: '', email: '' }, words);
  }),
  route('POST', '/pay/:id', async ({ param, request }) => {
    const session = await openSession(desk, param('id'));
    if (session instanceof Response) return session;
    const fields = await readFields(request);
    const typed = { ...readCardFields(fields), email: fields.get('email')?.trim() ?? '' };
    const card = chosenCard(typed);
    if ('problem' in card) return checkoutPage(desk.read, session, typed, card.problem);
    if (card.choice !== 'authenticate') return payAndLeave(desk, session, card, typed);
    const { number } = card;
    await desk.change((ledger) =>
      ledger.save('approval', { id: session.id, number, email: typed.email || null }),
    );
    return seeOther(`/pay/${session.id}/authenticate`);
  }),
];
