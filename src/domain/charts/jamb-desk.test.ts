import { describe, expect, it } from 'vitest';
import { deskJamb } from './jamb-desk.ts';

const jamb = (values: number[], beforeIndex?: number) =>
  deskJamb({
    id: 'a',
    finding: 'Five more.',
    unit: 'push-ups',
    marks: values.map((value) => ({ value, day: '7 Nov' })),
    beforeIndex,
  });
const shown = ({ marks, beforeIndex, size }: ReturnType<typeof jamb>) => [
  marks.map(({ value }) => value),
  beforeIndex,
  size,
];

describe('the small board', () => {
  it('keeps the first mark, the one judged against and the last', () => {
    expect(shown(jamb([8, 9, 10, 12, 11, 13], 3))).toEqual([[8, 12, 13], 1, 'desk']);
    expect(shown(jamb([8, 9, 10, 12, 11, 13]))).toEqual([[8, 11, 13], 1, 'desk']);
  });

  it('shows one mark once, whatever it stands for', () => {
    expect(shown(jamb([8]))).toEqual([[8], undefined, 'desk']);
    expect(shown(jamb([8, 9], 0))).toEqual([[8, 9], 0, 'desk']);
    expect(shown(jamb([]))).toEqual([[], undefined, 'desk']);
  });
});
