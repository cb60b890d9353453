/**
 * Body mass index: kg / m². Used only as a gate (NICE's waist bands hold below 35) and never shown as a verdict.
 * Null for a body that cannot be.
 */
export function bodyMassIndex(massKg: number, heightCm: number): number | null {
  if (!(massKg > 0 && massKg < 500 && heightCm >= 100 && heightCm <= 250)) return null;
  return massKg / (heightCm / 100) ** 2;
}

/** Centimetres in an inch, and kilograms in a pound. */
export const CM_PER_INCH = 2.54;
export const KG_PER_POUND = 0.45359237;
