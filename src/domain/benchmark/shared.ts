/** At least three minutes between events: US Air Force; Pennsylvania's police ask five. */
export const REST_BETWEEN_TESTS = {
  seconds: 180,
  source: 'At least 3 minutes between events: US Air Force fitness test; Pennsylvania MPOETC asks 5',
} as const;

export const NO_REST = { seconds: 0, source: 'Not an effort' } as const;

/** Five minutes sitting before a pulse at rest is counted. */
export const REST_BEFORE_PULSE = { seconds: 300, source: 'Common practice, no source' } as const;

/** Signs that end any test. Source: published stop signs of exercise testing; palpitations are from memory. */
export const STOP_SIGNS = [
  'Pain or pressure in the chest, jaw or arm.',
  'Light-headed, confused or unsteady.',
  'Short of breath in a way you do not know, or a wheeze.',
  'A heart that flutters or skips.',
  'Cold, clammy skin, or feeling sick.',
  'Cramp or sharp pain in a leg or a joint.',
  'You want to stop.',
] as const;

/** No heavy meal and no smoking for two to three hours before: City of Seguin police test. */
export const BEFORE_ANY_TEST = 'No heavy meal and no smoking in the two hours before.';

export const DOCTOR_FIRST =
  'With heart trouble, high blood pressure, pregnancy or a new complaint, ask your doctor first and follow that.';
