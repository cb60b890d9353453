import { html } from '../../core/html.ts';
import { route, type Route } from '../../core/router.ts';
import { money } from '../billing/amounts.ts';
import type { InvoiceDoc } from '../docs.ts';
import type { Desk } from '../index.ts';
import { day, notFoundPage, payPage } from './layout.ts';

const sumRow = (words: string, amountMinor: number, currency: string) =>
  html`<tr>
    <th scope="row" colspan="2">${words}</th>
    <td class="figure">${money(amountMinor, currency)}</td>
  </tr>`;

function invoicePage(invoice: InvoiceDoc) {
  const { currency, lines, status_transitions: moments } = invoice;
  const discount = (invoice.total_discount_amounts ?? []).reduce((sum, { amount }) => sum + amount, 0);
  const body = html`<h1>Invoice ${invoice.number}</h1>
    <div class="panel">
      <dl>
        <dt>From</dt>
        <dd>${invoice.account_name}</dd>
        <dt>To</dt>
        <dd>${invoice.customer_name} ${invoice.customer_email}</dd>
        <dt>Date</dt>
        <dd>${day(invoice.created)}</dd>
        <dt>Paid</dt>
        <dd>
          ${moments.paid_at ? day(moments.paid_at) : invoice.status === 'void' ? 'Withdrawn' : 'Not yet'}
        </dd>
      </dl>
    </div>
    <div class="scroll" role="region" aria-label="Lines" tabindex="0">
      <table>
        <thead>
          <tr>
            <th scope="col">What</th>
            <th scope="col">For</th>
            <th scope="col" class="figure">Amount</th>
          </tr>
        </thead>
        <tbody>
          ${lines.data.map(
            (line) =>
              html`<tr>
                <td>${line.description}</td>
                <td>${day(line.period.start)} to ${day(line.period.end)}</td>
                <td class="figure">${money(line.amount, currency)}</td>
              </tr>`,
          )}
          ${discount > 0 && sumRow('Discount', -discount, currency)}
          ${sumRow('Total', invoice.total, currency)}
          ${invoice.starting_balance !== 0 && sumRow('From your balance', invoice.amount_due - invoice.total, currency)}
          ${sumRow('Paid', invoice.amount_paid, currency)}
          ${sumRow('Still to pay', invoice.amount_remaining, currency)}
        </tbody>
      </table>
    </div>`;
  return payPage(`Invoice ${invoice.number ?? ''}`, body);
}

export const invoiceRoutes = (desk: Desk): Route[] => [
  route('GET', '/invoice/:id', async ({ param }) => {
    const invoice = await desk.read.find('invoice', param('id'));
    return invoice ? invoicePage(invoice) : notFoundPage();
  }),
];
