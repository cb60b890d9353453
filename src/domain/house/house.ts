import { formatNumber } from '../numbers/format.ts';
import type { Kit } from '../movement/types.ts';

export type Rail = 'none' | 'one side' | 'both sides';

/** A member's stairs, space and kit. Null: not measured. */
export interface House {
  readonly stairCount: number;
  readonly stepHeightMm: number;
  readonly rail: Rail;
  readonly matLengthCm: number | null;
  readonly matWidthCm: number | null;
  /** Free floor all round the mat, at its narrowest. */
  readonly marginCm: number | null;
  readonly chair: boolean;
  readonly chairHeightCm: number | null;
  readonly bar: boolean;
  readonly pulseMeter: boolean;
}

/** Below these the house asks for care. Common practice, no source, all of them. */
export const HOUSE_LIMITS = {
  /** Fewer steps than this make hard work of turning. */
  stairCount: 6,
  lowStepMm: 130,
  highStepMm: 200,
  matLengthCm: 170,
  matWidthCm: 60,
  marginCm: 60,
  lowChairCm: 40,
  highChairCm: 52,
} as const;

/** A caution about one fact of the house; `field` is the fact's name. Nothing here refuses anybody. */
export interface HouseProblem {
  readonly field: keyof House;
  readonly sentence: string;
}

function stairProblems({ stairCount, stepHeightMm, rail }: House): HouseProblem[] {
  if (stairCount === 0) return [];
  const problems: HouseProblem[] = [];
  if (stairCount < HOUSE_LIMITS.stairCount)
    problems.push({
      field: 'stairCount',
      sentence: `${stairCount} ${stairCount === 1 ? 'stair' : 'stairs'} means many turns. Turn slowly, with a hand on the wall.`,
    });
  if (stepHeightMm > HOUSE_LIMITS.highStepMm)
    problems.push({
      field: 'stepHeightMm',
      sentence: `${stepHeightMm} mm is a high step. One stair at a time, and the rail in hand on the way down.`,
    });
  if (stepHeightMm < HOUSE_LIMITS.lowStepMm)
    problems.push({
      field: 'stepHeightMm',
      sentence: `${stepHeightMm} mm is a low step. Measure from tread to tread once more.`,
    });
  if (rail === 'none')
    problems.push({
      field: 'rail',
      sentence: 'No rail: walk the stairs, one at a time, with a hand on the wall. No fast stairs.',
    });
  return problems;
}

function matProblems({ matLengthCm, matWidthCm, marginCm }: House): HouseProblem[] {
  const problems: HouseProblem[] = [];
  if (matLengthCm !== null && matLengthCm < HOUSE_LIMITS.matLengthCm)
    problems.push({
      field: 'matLengthCm',
      sentence: `${matLengthCm} cm is short for a mat. A folded blanket makes up the rest.`,
    });
  if (matWidthCm !== null && matWidthCm < HOUSE_LIMITS.matWidthCm)
    problems.push({
      field: 'matWidthCm',
      sentence: `${matWidthCm} cm is narrow for a mat. Two side by side do.`,
    });
  if (marginCm !== null && marginCm < HOUSE_LIMITS.marginCm)
    problems.push({
      field: 'marginCm',
      sentence: `${marginCm} cm free is tight; ${HOUSE_LIMITS.marginCm} cm all round keeps heads and elbows off the furniture.`,
    });
  return problems;
}

function chairProblems({ chair, chairHeightCm }: House): HouseProblem[] {
  if (!chair || chairHeightCm === null) return [];
  if (chairHeightCm < HOUSE_LIMITS.lowChairCm)
    return [
      {
        field: 'chairHeightCm',
        sentence: `${chairHeightCm} cm is low. A firm cushion brings the thighs level.`,
      },
    ];
  if (chairHeightCm > HOUSE_LIMITS.highChairCm)
    return [
      {
        field: 'chairHeightCm',
        sentence: `${chairHeightCm} cm is high. Check that both feet stand flat when you sit.`,
      },
    ];
  return [];
}

/** Cautions about a house, in the order of its form. None of them refuses anybody. */
export function houseProblems(house: House): HouseProblem[] {
  return [...stairProblems(house), ...matProblems(house), ...chairProblems(house)];
}

/** What the house has for training, as the ladders ask for it. A mat counts once it is measured. */
export function kitOf(house: Pick<House, 'stairCount' | 'matLengthCm' | 'chair' | 'bar'>): ReadonlySet<Kit> {
  const kit = new Set<Kit>();
  if (house.stairCount > 0) kit.add('stairs');
  if (house.matLengthCm !== null) kit.add('mat');
  if (house.chair) kit.add('chair');
  if (house.bar) kit.add('bar');
  return kit;
}

/** What of a person's readiness the card must say. */
export interface CardPerson {
  readonly medicinesAffectPulse?: boolean;
  readonly pregnant?: boolean;
}

const climbMetres = (house: House): string => formatNumber((house.stairCount * house.stepHeightMm) / 1000, 1);

/** The lines of the printable house card, most important first. Common practice, no source, where no rule is named. */
export function cardLines(house: House, person: CardPerson = {}): string[] {
  const lines = [
    'Pain or pressure in the chest, fainting, sudden breathlessness: stop, and call the local emergency number.',
    'Telephone within reach. Water beside the mat. No heavy meal in the two hours before.',
  ];
  if (person.medicinesAffectPulse)
    lines.push('Your medicines change the pulse. Go by effort: you can still speak in sentences.');
  if (person.pregnant)
    lines.push(
      'Pregnant: effort no higher than you can talk through. Bleeding, fluid, headache, calf pain, or dizziness: stop and call your midwife or doctor.',
    );
  if (house.stairCount > 0)
    lines.push(
      `Stairs: ${house.stairCount} of ${house.stepHeightMm} mm, ${climbMetres(house)} m up. Lit, dry, nothing lying on them, shoes or bare feet, never socks.`,
    );
  if (house.stairCount > 0 && house.rail !== 'none')
    lines.push('A hand near the rail going up, on the rail coming down.');
  if (house.matLengthCm !== null)
    lines.push('Mat flat on a floor that grips. Children and animals in another room.');
  if (house.chair) lines.push('Chair with its back against the wall. No wheels.');
  if (house.bar)
    lines.push('Bar: rated for your weight, fixed as its maker says. Try it with one foot down, every time.');
  if (house.pulseMeter && !person.medicinesAffectPulse)
    lines.push('Pulse meter on before the first step, and a minute of rest before you read it.');
  return [...lines, ...houseProblems(house).map((problem) => problem.sentence)];
}
