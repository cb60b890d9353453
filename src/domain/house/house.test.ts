import { describe, expect, it } from 'vitest';
import { cardLines, houseProblems, HOUSE_LIMITS, kitOf, type House } from './house.ts';

const house = (change: Partial<House> = {}): House => ({
  stairCount: 13,
  stepHeightMm: 175,
  rail: 'one side',
  matLengthCm: 180,
  matWidthCm: 61,
  marginCm: 60,
  chair: true,
  chairHeightCm: 45,
  bar: false,
  pulseMeter: false,
  ...change,
});

const fields = (change: Partial<House>) => houseProblems(house(change)).map(({ field }) => field);

describe('cautions of a house (common practice, no source)', () => {
  it('has none for a house that is in order', () => {
    expect(houseProblems(house())).toEqual([]);
  });

  it.each([
    ['stairCount', HOUSE_LIMITS.stairCount, HOUSE_LIMITS.stairCount - 1],
    ['stepHeightMm', HOUSE_LIMITS.highStepMm, HOUSE_LIMITS.highStepMm + 1],
    ['stepHeightMm', HOUSE_LIMITS.lowStepMm, HOUSE_LIMITS.lowStepMm - 1],
    ['matLengthCm', HOUSE_LIMITS.matLengthCm, HOUSE_LIMITS.matLengthCm - 1],
    ['matWidthCm', HOUSE_LIMITS.matWidthCm, HOUSE_LIMITS.matWidthCm - 1],
    ['marginCm', HOUSE_LIMITS.marginCm, HOUSE_LIMITS.marginCm - 1],
    ['chairHeightCm', HOUSE_LIMITS.lowChairCm, HOUSE_LIMITS.lowChairCm - 1],
    ['chairHeightCm', HOUSE_LIMITS.highChairCm, HOUSE_LIMITS.highChairCm + 1],
  ] as const)('%s: %i is fine, %i asks for care', (field, fine, notFine) => {
    expect(fields({ [field]: fine })).toEqual([]);
    const problems = houseProblems(house({ [field]: notFine }));
    expect(problems.map((problem) => problem.field)).toEqual([field]);
    expect(problems[0]?.sentence).toContain(String(notFine));
    expect(problems[0]?.sentence).toMatch(/\.$/u);
  });

  it('says that there is no rail', () => {
    expect(fields({ rail: 'none' })).toEqual(['rail']);
    expect(fields({ rail: 'both sides' })).toEqual([]);
  });

  it('says nothing of stairs, mat or chair that are not there', () => {
    const bare = house({
      stairCount: 0,
      rail: 'none',
      stepHeightMm: 300,
      matLengthCm: null,
      matWidthCm: null,
      marginCm: null,
      chair: false,
      chairHeightCm: 10,
    });
    expect(houseProblems(bare)).toEqual([]);
  });

  it('writes one stair in the singular', () => {
    expect(houseProblems(house({ stairCount: 1 }))[0]?.sentence).toMatch(/^1 stair means/u);
  });
});

describe('the kit', () => {
  it('is what the ladders ask for', () => {
    expect([...kitOf(house({ bar: true }))].toSorted()).toEqual(['bar', 'chair', 'mat', 'stairs']);
    expect([...kitOf(house({ stairCount: 0, chair: false, matLengthCm: null }))]).toEqual([]);
  });
});

describe('the house card', () => {
  it('begins with when to stop, and tells the stairs in metres', () => {
    const lines = cardLines(house());
    expect(lines[0]).toMatch(/^Pain or pressure in the chest/u);
    expect(lines[0]).toContain('local emergency number');
    expect(lines).toContainEqual(expect.stringContaining('13 of 175 mm, 2.3 m up'));
  });

  it('says what the person needs said', () => {
    const text = cardLines(house({ pulseMeter: true }), { medicinesAffectPulse: true, pregnant: true }).join(
      '\n',
    );
    expect(text).toContain('Your medicines change the pulse');
    expect(text).toContain('Pregnant:');
    expect(text).not.toContain('Pulse meter on');
    expect(cardLines(house({ pulseMeter: true })).join('\n')).toContain('Pulse meter on');
  });

  it('says only what the house has, and its cautions last', () => {
    const bare = cardLines(house({ stairCount: 0, matLengthCm: null, chair: false }));
    expect(bare).toHaveLength(2);
    expect(cardLines(house({ stairCount: 1 })).join('\n')).toContain('Stairs: 1 of 175 mm, 0.2 m up');
    const lines = cardLines(house({ bar: true, marginCm: 40 }));
    expect(lines.at(-1)).toBe(
      '40 cm free is tight; 60 cm all round keeps heads and elbows off the furniture.',
    );
    expect(lines.join('\n')).toContain('Bar: rated for your weight');
    expect(cardLines(house({ rail: 'none' })).join('\n')).not.toContain('on the rail coming down');
  });

  it('has each line once, in sentences', () => {
    const lines = cardLines(house({ bar: true, pulseMeter: true, rail: 'none' }), { pregnant: true });
    expect(new Set(lines).size).toBe(lines.length);
    for (const line of lines) expect(line).toMatch(/\.$/u);
  });
});
