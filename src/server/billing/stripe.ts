import Stripe from 'stripe';
import type { Env } from '#server/env';

/** The version our code was written against; pinned here and on the webhook endpoint. */
export const STRIPE_API_VERSION = '2026-10-28.endive';

/** The payment provider's client; in the demo it talks to our stand-in at `STRIPE_API_URL`. */
export function openStripe(env: Env): Stripe {
  const standIn = env.stripeApiUrl ? new URL(env.stripeApiUrl) : null;
  return new Stripe(env.stripeSecretKey, {
    apiVersion: STRIPE_API_VERSION,
    telemetry: false,
    maxNetworkRetries: 1,
    timeout: 10_000,
    ...(standIn && {
      host: standIn.hostname,
      port: Number(standIn.port),
      protocol: standIn.protocol === 'https:' ? 'https' : 'http',
    }),
  });
}
