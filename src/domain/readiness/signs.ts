export interface Sign {
  readonly id: string;
  readonly label: string;
}

/**
 * Signs or symptoms of heart, metabolic or kidney disease that send a person to a doctor before any training. The list is
 * that of the screening source (Riebe 2015, Med Sci Sports Exerc 47:2473-2479: memory), in our own words.
 */
export const SIGNS = [
  { id: 'chest', label: 'Pain, pressure or tightness in the chest, neck, jaw or arms' },
  { id: 'breath', label: 'Short of breath at rest, lying down, at night or with little effort' },
  { id: 'dizzy', label: 'Dizzy spells, or fainting' },
  { id: 'ankles', label: 'Swollen ankles' },
  { id: 'palpitations', label: 'A racing or uneven heartbeat' },
  { id: 'leg-pain', label: 'Pain in the legs when walking that goes at rest' },
  { id: 'murmur', label: 'A heart murmur that a doctor has heard' },
  { id: 'fatigue', label: 'Unusual tiredness with everyday things' },
] as const satisfies readonly Sign[];

/** Signs that stop everything at once: a full-screen stop, an alert to the coach, a held plan. */
export const WARNING_SIGNS = [
  { id: 'chest', label: 'Pain or pressure in the chest' },
  { id: 'faint', label: 'Fainted, or nearly' },
  { id: 'breath', label: 'Much shorter of breath than the work explains' },
  { id: 'palpitations', label: 'A racing or uneven heartbeat' },
  { id: 'confused', label: 'Confused, unsteady, or slurred speech' },
  { id: 'pale', label: 'Pale, cold and clammy, or blue lips' },
] as const satisfies readonly Sign[];

/**
 * When to stop, shown on every session and test. The published list (Exercise testing, PMC10847087 table 2;
 * palpitations: memory), in our own words.
 */
export const STOP_SIGNS: readonly string[] = [
  'Pain or pressure in the chest, neck, jaw or arm',
  'Light-headed, confused or unsteady',
  'Pale, cold and clammy, blue lips, or sick',
  'Unusually short of breath, or a wheeze',
  'Cramp or pain in the legs',
  'A racing or uneven heartbeat',
  'You want to stop',
];

/** More reasons to stop in pregnancy: the published list, in our own words. */
export const PREGNANCY_STOP_SIGNS: readonly string[] = [
  'Bleeding, or fluid',
  'Short of breath before you begin',
  'Dizzy, or a headache',
  'Chest pain',
  'Weak muscles',
  'Pain or swelling in the calf',
  'Pains like labour',
  'The child moves less',
];
