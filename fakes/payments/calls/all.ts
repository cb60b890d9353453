import type { Call } from '../call.ts';
import { catalogueCalls } from './catalogue.ts';
import { checkoutCalls } from './checkout.ts';
import { couponCalls } from './coupons.ts';
import { customerCalls } from './customers.ts';
import { invoiceCalls } from './invoices.ts';
import { paymentCalls } from './payments.ts';
import { portalCalls } from './portal.ts';
import { subscriptionUpdateCalls } from './subscription-update.ts';
import { subscriptionCalls } from './subscriptions.ts';
import { timeCalls } from './time.ts';

/** Every call this stand-in knows; any other is answered as an unknown address. */
export const CALLS: Call[] = [
  ...customerCalls,
  ...catalogueCalls,
  ...couponCalls,
  ...checkoutCalls,
  ...portalCalls,
  ...subscriptionCalls,
  ...subscriptionUpdateCalls,
  ...invoiceCalls,
  ...paymentCalls,
  ...timeCalls,
];
