import { html, seeOther } from '../../core/html.ts';
import { route, type Route } from '../../core/router.ts';
import { cardByNumber, type TestCard } from '../cards.ts';
import type { ApprovalDoc } from '../docs.ts';
import type { Desk } from '../index.ts';
import { openSession, payAndLeave } from './checkout.ts';
import { payPage, readFields } from './layout.ts';
import { keepCard } from './portal.ts';

const question = () =>
  payPage(
    'Your bank asks',
    html`<div class="narrow">
      <h1>Your bank asks: is this you?</h1>
      <p>A real bank would ask in its own app. Here you answer for it.</p>
      <form method="post" class="acts">
        <button class="tread" name="answer" value="approve">Approve</button>
        <button name="answer" value="refuse">Refuse</button>
      </form>
    </div>`,
  );

/** What was typed before the bank asked; null when nothing waits for an answer. */
async function waiting(desk: Desk, id: string): Promise<{ approval: ApprovalDoc; card: TestCard } | null> {
  const approval = await desk.read.find('approval', id);
  const card = approval && cardByNumber(approval.number);
  return card ? { approval, card } : null;
}

async function answered(request: Request): Promise<boolean> {
  return (await readFields(request)).get('answer') === 'approve';
}

/** The bank's question, for the checkout page and for a new card in the portal. */
export const cardRoutes = (desk: Desk): Route[] => [
  route('GET', '/pay/:id/authenticate', async ({ param }) =>
    (await waiting(desk, param('id'))) ? question() : seeOther(`/pay/${param('id')}`),
  ),
  route('POST', '/pay/:id/authenticate', async ({ param, request }) => {
    const id = param('id');
    const session = await openSession(desk, id);
    if (session instanceof Response) return session;
    const asked = await waiting(desk, id);
    if (!asked) return seeOther(`/pay/${id}`);
    await desk.change((ledger) => ledger.remove('approval', id));
    if (!(await answered(request))) return seeOther(`/pay/${id}?said=refused`);
    return payAndLeave(desk, session, asked.card, {
      choice: asked.card.choice,
      number: '',
      email: asked.approval.email ?? '',
    });
  }),
  route('GET', '/portal/:id/authenticate', async ({ param }) =>
    (await waiting(desk, param('id'))) ? question() : seeOther(`/portal/${param('id')}`),
  ),
  route('POST', '/portal/:id/authenticate', async ({ param, request }) => {
    const id = param('id');
    const asked = await waiting(desk, id);
    if (!asked) return seeOther(`/portal/${id}`);
    await desk.change((ledger) => ledger.remove('approval', id));
    if (!(await answered(request))) return seeOther(`/portal/${id}?said=refused`);
    await keepCard(desk, id, asked.card);
    return seeOther(`/portal/${id}?said=card`);
  }),
];
