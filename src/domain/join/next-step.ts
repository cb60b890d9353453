export type JoinStep = 'address' | 'readiness' | 'answer' | 'house' | 'plan' | 'payment';

export interface JoinStepEntry {
  readonly id: JoinStep;
  readonly path: string;
  readonly label: string;
}

/** The six steps of joining, in order. */
export const JOIN_STEPS = [
  { id: 'address', path: '/join', label: 'Address' },
  { id: 'readiness', path: '/join/readiness', label: 'Readiness' },
  { id: 'answer', path: '/join/result', label: 'Answer' },
  { id: 'house', path: '/join/house', label: 'House' },
  { id: 'plan', path: '/join/plan', label: 'Plan' },
  { id: 'payment', path: '/join/payment', label: 'Payment' },
] as const satisfies readonly JoinStepEntry[];

/** What is known of someone who joins. `screened`: answers that still count. */
export interface JoinFacts {
  readonly signedIn: boolean;
  readonly screened: boolean;
  readonly held: boolean;
  readonly house: boolean;
  readonly planChosen: boolean;
  readonly paid: boolean;
}

/**
 * Where joining goes on, on whatever device. Held people stop at the answer: nothing is charged until a clearance is
 * recorded. Someone who has paid and is then held is done joining; the hold shows elsewhere.
 */
export function nextJoinStep(facts: JoinFacts): JoinStep | 'done' {
  if (!facts.signedIn) return 'address';
  if (!facts.screened) return 'readiness';
  if (facts.held && !facts.paid) return 'answer';
  if (!facts.house) return 'house';
  if (facts.paid) return 'done';
  return facts.planChosen ? 'payment' : 'plan';
}

/** The page of a step. */
export const joinPath = (step: JoinStep): string =>
  JOIN_STEPS.find((entry) => entry.id === step)?.path ?? JOIN_STEPS[0].path;
