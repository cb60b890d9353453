import { DateTime } from 'luxon';
import { MINIMUM_AGE } from '../minimum-age.ts';
import { NONE, type ReadinessAnswers } from './questions.ts';

export { STOP_SIGNS, WARNING_SIGNS } from './signs.ts';

/** Clear: begin. Gentle: begin light to moderate. Doctor: the plan is held until a clearance is recorded. */
export type ScreenResult = 'clear' | 'gentle' | 'doctor';

export interface Screen {
  readonly result: ScreenResult;
  /** Why, in sentences; those that decide the result come first. */
  readonly reasons: readonly string[];
  /** No pulse ranges are shown then. Also when the person is not sure. */
  readonly medicinesAffectPulse: boolean;
  readonly pregnant: boolean;
}

interface Rule {
  readonly result: 'gentle' | 'doctor';
  readonly when: (answers: ReadinessAnswers) => boolean;
  readonly reason: string;
}

const isNamed = (values: readonly string[]): boolean => values.some((value) => value !== NONE);

/**
 * The decision table. The first four and `inactive` are the published algorithm (Riebe 2015, Med Sci Sports Exerc
 * 47:2473-2479). The published cell 'active, disease, vigorous: clearance if none in the last 12 months' is a doctor here
 * whatever the date: the coach records the clearance and the hold ends. The rest is stricter than the source, never looser.
 */
const RULES: readonly Rule[] = [
  {
    result: 'doctor',
    when: (a) => isNamed(a.signs),
    reason:
      'What you have noticed can come from the heart, the vessels or the kidneys. A doctor should look first.',
  },
  {
    result: 'doctor',
    when: (a) => isNamed(a.disease) && a.activity === 'inactive',
    reason:
      'With a disease of the heart, the kidneys or diabetes, and not used to training, a doctor should agree first.',
  },
  {
    result: 'doctor',
    when: (a) => isNamed(a.disease) && a.activity === 'active' && a.effort === 'vigorous',
    reason:
      'With a disease of the heart, the kidneys or diabetes, a doctor should agree before hard training.',
  },
  {
    result: 'gentle',
    when: (a) => isNamed(a.disease) && a.activity === 'active' && a.effort === 'light-moderate',
    reason:
      'With a disease of the heart, the kidneys or diabetes, you go on at an effort you can talk through.',
  },
  {
    result: 'doctor',
    when: (a) => a.age === 'under-18',
    reason: `Newel is for people of ${MINIMUM_AGE} and over. Nearly every table here was measured on adults.`,
  },
  {
    result: 'doctor',
    when: (a) => a.bloodPressure === 'high',
    reason: 'Blood pressure of 160 over 100 or above should be seen to before training.',
  },
  {
    result: 'doctor',
    when: (a) => a.pregnancy === 'pregnant',
    reason: 'Your midwife or doctor should agree first. Training in pregnancy is usually good.',
  },
  {
    result: 'doctor',
    when: (a) => a.pregnancy === 'birth',
    reason: 'After a birth your midwife or doctor should say when to begin.',
  },
  {
    result: 'doctor',
    when: (a) => a.recentIllnessOrSurgery === 'fever',
    reason: 'No training while you are ill or have a fever. Ask a doctor if it lasts.',
  },
  {
    result: 'doctor',
    when: (a) => a.recentIllnessOrSurgery === 'surgery',
    reason: 'After an operation, a hospital stay or an injury, whoever treated you should say when to begin.',
  },
  {
    result: 'gentle',
    when: (a) => a.recentIllnessOrSurgery === 'illness',
    reason: 'After an illness the first weeks are easier.',
  },
  {
    result: 'gentle',
    when: (a) => a.activity === 'inactive' && a.effort === 'vigorous',
    reason: 'Not used to it yet: begin where you can still talk. Hard comes later.',
  },
  {
    result: 'gentle',
    when: (a) => a.activity === 'inactive' && a.effort === 'light-moderate',
    reason: 'Not used to it yet: begin where you can still talk.',
  },
  {
    result: 'gentle',
    when: (a) => a.age === '65-plus',
    reason: 'From 65 on the first weeks are easier, with the rail and a chair at hand.',
  },
];

const CLEAR_REASON = 'Nothing you told us speaks against it. Stop signs still count, each time.';

/**
 * What the answers to the readiness questions allow. The strictest rule that fits decides. This is no medical advice and no
 * finding; a doctor's word stands above it.
 */
export function screen(answers: ReadinessAnswers): Screen {
  const fired = RULES.filter((rule) => rule.when(answers));
  const isDoctor = fired.some((rule) => rule.result === 'doctor');
  const result = isDoctor ? 'doctor' : fired.length > 0 ? 'gentle' : 'clear';
  const deciding = fired.filter((rule) => rule.result === result);
  const others = fired.filter((rule) => rule.result !== result);
  const reasons = [...deciding, ...others].map((rule) => rule.reason);
  return {
    result,
    reasons: reasons.length > 0 ? reasons : [CLEAR_REASON],
    medicinesAffectPulse: answers.medicinesPulse !== 'no',
    pregnant: answers.pregnancy === 'pregnant',
  };
}

/** Months an answered screen counts (the yearly repeat; 12-month clearance: memory). */
export const VALID_MONTHS = 12;

/** The last day that a screen answered on this day counts, ISO: the same day a year on; 29 Feb becomes 28 Feb. */
export function validUntil(answeredOn: string): string {
  const until = DateTime.fromISO(answeredOn, { zone: 'utc' }).plus({ months: VALID_MONTHS }).toISODate();
  if (until === null) throw new RangeError(`Not an ISO date: ${answeredOn}`);
  return until;
}
