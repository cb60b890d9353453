import { z } from './zod.ts';
import { optional, typedCount } from './typed-number.ts';

const yes = z.union([z.literal('yes').transform(() => true), z.literal('no').transform(() => false)], {
  error: 'Choose yes or no.',
});
const cm = (missing: string, min: number, max: number, outside: string) =>
  optional(typedCount(missing, { min, max, outside }));

/** The house as its wizard asks it. Stairs in steps and millimetres, the rest in centimetres. */
export const HouseInput = z.strictObject({
  stairCount: typedCount('Count the steps of one flight.', {
    min: 0,
    max: 60,
    outside: 'A flight has from 0 to 60 steps. More is a lighthouse: check the number.',
  }),
  stepHeightMm: typedCount('Measure one step from tread to tread, in millimetres.', {
    min: 80,
    max: 300,
    outside: 'A step is between 80 and 300 mm high. Measure from tread to tread, in millimetres.',
  }),
  rail: z.enum(['none', 'one side', 'both sides'], { error: 'Say where there is a rail.' }),
  matLengthCm: cm('Give the length in centimetres.', 50, 600, 'From 50 to 600 cm.'),
  matWidthCm: cm('Give the width in centimetres.', 30, 600, 'From 30 to 600 cm.'),
  marginCm: cm('Give the free margin in centimetres.', 0, 600, 'From 0 to 600 cm.'),
  chair: yes,
  chairHeightCm: cm(
    'Give the height of the seat in centimetres.',
    20,
    90,
    'A seat is from 20 to 90 cm high.',
  ),
  bar: yes,
  pulseMeter: yes,
});
export type HouseInput = z.output<typeof HouseInput>;
