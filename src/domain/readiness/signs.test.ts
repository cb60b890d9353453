import { byName, outside } from '#support/outside';
import { describe, expect, it } from 'vitest';
import published from '../../../tests/published/screening.json' with { type: 'json' };
import { PREGNANCY_STOP_SIGNS, STOP_SIGNS, WARNING_SIGNS } from './signs.ts';

describe('signs', () => {
  it.each(
    byName(
      (
        [
          ['chest pain or pressure', /chest/],
          ['light-headedness, confusion, unsteady movement', /Light-headed, confused or unsteady/],
          ['pallor, blue lips, cold clammy skin, nausea', /Pale, cold and clammy, blue lips, or sick/],
          ['unusual breathlessness, wheeze', /breath, or a wheeze/],
          ['leg cramps or claudication', /Cramp or pain in the legs/],
          ['palpitations or irregular rhythm (memory)', /heartbeat/],
          ['wish to stop', /want to stop/],
        ] as const
      ).map(([printed, pattern]) => ({
        printed,
        pattern,
        name: outside(
          `stop sign: ${printed}`,
          'PMC10847087 table 2',
          printed.includes('memory') ? 'memory' : 'published',
        ),
      })),
    ),
  )('%s', (_, { printed, pattern }) => {
    expect(published.stop_signs).toContain(printed);
    expect(STOP_SIGNS.some((sign) => pattern.test(sign))).toBe(true);
  });

  it(
    outside('as many stop signs as the source, and as many in pregnancy', 'PMC10847087 table 2', 'published'),
    () => {
      expect(STOP_SIGNS).toHaveLength(published.stop_signs.length);
      // Ten in the source; bleeding and fluid stand in one line here, and so do dizziness and headache.
      expect(PREGNANCY_STOP_SIGNS).toHaveLength(published.pregnancy.stop.length - 2);
    },
  );

  it('warning signs have each their own name', () => {
    expect(new Set(WARNING_SIGNS.map(({ id }) => id)).size).toBe(WARNING_SIGNS.length);
    expect(WARNING_SIGNS.map(({ id }) => id)).toEqual(expect.arrayContaining(['chest', 'faint']));
  });
});
