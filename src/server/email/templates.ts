/** One mail's words. `action` is the only link; `bulk` mails carry one-click unsubscribe. */
export interface Letter {
  subject: string;
  paragraphs: string[];
  action?: { label: string; path: string };
  bulk?: boolean;
}

type Data = Record<string, string>;
const of = (data: Data, key: string) => data[key] ?? '';

/**
 * Every mail the product sends. No health data stands in a mail: it says that something waits and where.
 * `data` holds only names, dates, amounts and paths.
 */
export const LETTERS = {
  'sign-in': (d: Data): Letter => ({
    subject: 'Your way in to Newel',
    paragraphs: [
      'Open this link on the device where you asked for it, then press the button there. It works once, for ten minutes.',
      'You did not ask? Then nothing happens unless somebody presses that button on your device. Leave this letter be.',
    ],
    action: { label: 'Sign in', path: of(d, 'path') },
  }),
  invite: (d: Data): Letter => ({
    subject: `${of(d, 'inviter')} invites you to coach at Newel`,
    paragraphs: [`${of(d, 'inviter')} has set a desk up for you. Sign in with this address and it is yours.`],
    action: { label: 'Sign in', path: '/sign-in' },
  }),
  welcome: (d: Data): Letter => ({
    subject: 'You have joined Newel',
    paragraphs: [
      `${of(d, 'coach')} is your coach. Begin with the baseline test day: sit-ups, push-ups and stairs, about half an hour.`,
      'You can change, pause or cancel the plan alone, at any time, on your membership page.',
    ],
    action: { label: 'Open your week', path: '/week' },
  }),
  held: (): Letter => ({
    subject: 'Your plan is held',
    paragraphs: [
      'Your plan is held until your coach has recorded that you are cleared. Nothing is asked of you while it is held.',
      'If anything feels like an emergency, call your local emergency number first.',
    ],
    action: { label: 'Read what to do', path: '/held' },
  }),
  cleared: (d: Data): Letter => ({
    subject: 'You are cleared to go on',
    paragraphs: [`${of(d, 'coach')} has recorded your clearance. Your plan is open again.`],
    action: { label: 'Open your week', path: '/week' },
  }),
  'stop-alert': (d: Data): Letter => ({
    subject: `Stop pressed by ${of(d, 'member')}`,
    paragraphs: ['A warning sign was reported. The plan is held. Please look now.'],
    action: { label: 'Open the desk', path: of(d, 'path') },
  }),
  answer: (d: Data): Letter => ({
    subject: `${of(d, 'coach')} answered`,
    paragraphs: ['Your check-in has an answer. It waits in your thread.'],
    action: { label: 'Read it', path: '/check-in' },
  }),
  'check-in-due': (): Letter => ({
    subject: 'This week’s check-in',
    paragraphs: ['A few words on how the week went, when you have five minutes. Your coach reads every one.'],
    action: { label: 'Write it', path: '/check-in' },
    bulk: true,
  }),
  'test-day': (d: Data): Letter => ({
    subject: `Test day ${of(d, 'when')}`,
    paragraphs: [
      'This week is a landing. The same tests as before, on the same stairs, at the same time of day if you can.',
    ],
    action: { label: 'See the test day', path: '/test-day' },
    bulk: true,
  }),
  'questions-due': (): Letter => ({
    subject: 'The yearly questions',
    paragraphs: ['The readiness questions are asked again once a year. They take three minutes.'],
    action: { label: 'Answer them', path: '/readiness' },
  }),
  'trial-ends': (d: Data): Letter => ({
    subject: `Your trial ends ${of(d, 'when')}`,
    paragraphs: [
      `After that the plan costs ${of(d, 'amount')}. If you would rather not, cancel before then; nothing is charged.`,
    ],
    action: { label: 'Your membership', path: '/account/membership' },
  }),
  'payment-failed': (d: Data): Letter => ({
    subject: 'The payment did not go through',
    paragraphs: [
      `Your card was declined. It happens. Your plan stays open until ${of(d, 'until')}; put another card in before then and nothing changes.`,
    ],
    action: { label: 'Put a card in', path: '/account/membership' },
  }),
  cancelled: (d: Data): Letter => ({
    subject: 'Your plan is cancelled',
    paragraphs: [
      `It stays open until ${of(d, 'until')}. Your records stay yours: take them with you from your account page.`,
    ],
    action: { label: 'Your membership', path: '/account/membership' },
  }),
  deleted: (): Letter => ({
    subject: 'Your records are deleted',
    paragraphs: [
      'What Newel kept about you is gone, except the invoices that the law makes the practice keep.',
    ],
  }),
} satisfies Record<string, (data: Data) => Letter>;

export type LetterName = keyof typeof LETTERS;
