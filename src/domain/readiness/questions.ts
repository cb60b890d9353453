import { SIGNS } from './signs.ts';

export interface Question {
  readonly id: string;
  readonly text: string;
  /** One answer, or all that fit. */
  readonly kind: 'one' | 'many';
  readonly options: readonly { readonly value: string; readonly label: string }[];
  /** Why it is asked, in a sentence under the question. */
  readonly why: string;
}

/** The answer to a `many` question when none of the others fits. */
export const NONE = 'none';

/**
 * The readiness questions, in our own words. Inputs one to three and the effort: Riebe 2015, Med Sci Sports Exerc
 * 47:2473-2479 (30 minutes, 3 days, 3 months: memory). The others: the published lists of contraindications, and
 * common practice.
 */
export const QUESTIONS = [
  {
    id: 'activity',
    text: 'In the last three months, have you moved on purpose for 30 minutes or more, three days a week, so that you breathed harder?',
    kind: 'one',
    options: [
      { value: 'active', label: 'Yes, all three months' },
      { value: 'inactive', label: 'No, or not that often' },
    ],
    why: 'A body that is used to it may go on. One that is not begins gently.',
  },
  {
    id: 'disease',
    text: 'Has a doctor ever told you that you have one of these?',
    kind: 'many',
    options: [
      { value: 'cardiovascular', label: 'A disease of the heart or the blood vessels, or a stroke' },
      { value: 'metabolic', label: 'Diabetes' },
      { value: 'renal', label: 'A disease of the kidneys' },
      { value: NONE, label: 'None of these' },
    ],
    why: 'With these a doctor should know that you train, and how hard.',
  },
  {
    id: 'signs',
    text: 'Have you noticed any of these in the last months, at rest or when you move?',
    kind: 'many',
    options: [
      ...SIGNS.map(({ id, label }) => ({ value: id, label })),
      { value: NONE, label: 'None of these' },
    ],
    why: 'Each can be harmless and each can be the heart. A doctor can tell; we cannot.',
  },
  {
    id: 'pregnancy',
    text: 'Are you pregnant, or have you given birth in the last 12 weeks?',
    kind: 'one',
    options: [
      { value: 'no', label: 'No, or it does not apply' },
      { value: 'pregnant', label: 'Pregnant' },
      { value: 'birth', label: 'A birth in the last 12 weeks' },
    ],
    why: 'Training in pregnancy is usually good. Your midwife or doctor should agree first.',
  },
  {
    id: 'age',
    text: 'How old are you?',
    kind: 'one',
    options: [
      { value: 'under-18', label: 'Under 18' },
      { value: '18-44', label: '18 to 44' },
      { value: '45-64', label: '45 to 64' },
      { value: '65-plus', label: '65 or over' },
    ],
    why: 'Newel is for adults. From 65 on, the first weeks are easier.',
  },
  {
    id: 'medicinesPulse',
    text: 'Do you take medicines that slow or change the pulse, such as beta-blockers?',
    kind: 'one',
    options: [
      { value: 'no', label: 'No' },
      { value: 'yes', label: 'Yes' },
      { value: 'unsure', label: 'I am not sure' },
    ],
    why: 'With them the pulse says little. We go by effort and breath, and show no pulse ranges.',
  },
  {
    id: 'bloodPressure',
    text: 'What was your blood pressure when it was last measured?',
    kind: 'one',
    options: [
      { value: 'normal', label: 'Below 160 over 100' },
      { value: 'high', label: '160 over 100 or above, in either number' },
      { value: 'unknown', label: 'I do not know' },
    ],
    why: 'Hard effort lifts it further. Our limit is lower than the one used in a clinic.',
  },
  {
    id: 'recentIllnessOrSurgery',
    text: 'Have you been ill or operated on lately?',
    kind: 'one',
    options: [
      { value: 'no', label: 'No' },
      { value: 'illness', label: 'Ill in the last four weeks, well again now' },
      { value: 'fever', label: 'Ill now, or a fever now' },
      { value: 'surgery', label: 'An operation, a hospital stay or an injury in the last three months' },
    ],
    why: 'Fever and hard work do not go together, and a wound sets its own pace.',
  },
  {
    id: 'effort',
    text: 'How hard do you want to train?',
    kind: 'one',
    options: [
      { value: 'light-moderate', label: 'So that I can still talk' },
      { value: 'vigorous', label: 'Hard: a few words at a time' },
    ],
    why: 'The harder it is meant to be, the more we ask for first.',
  },
] as const satisfies readonly Question[];

type Asked = (typeof QUESTIONS)[number];
type ValueOf<Q extends Asked> = Q['options'][number]['value'];

/** A whole set of answers: one value for each question, an array where several may fit. */
export type ReadinessAnswers = {
  readonly [Q in Asked as Q['id']]: Q['kind'] extends 'many' ? readonly ValueOf<Q>[] : ValueOf<Q>;
};
