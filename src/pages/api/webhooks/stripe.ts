import type { APIRoute } from 'astro';
import type Stripe from 'stripe';
import { receiveEvent } from '#server/billing/apply-event';
import { AppError } from '#server/errors';

/** Events of the payment provider: verified on the raw body, stored once, worked on later. */
export const POST: APIRoute = async ({ request, locals }) => {
  const { app } = locals;
  const payload = await request.text();
  let event: Stripe.Event;
  try {
    event = app.stripe.webhooks.constructEvent(
      payload,
      request.headers.get('stripe-signature') ?? '',
      app.env.stripeWebhookSecret,
    );
  } catch {
    throw new AppError('bad-request', 'The signature does not fit.');
  }
  await receiveEvent(app, event);
  return Response.json({ received: true });
};
