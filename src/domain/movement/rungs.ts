import type { Kit, Rung, Unit, WeightShare } from './types.ts';

interface RungFacts {
  readonly costPerUnit: number;
  readonly needs?: readonly Kit[];
  readonly unit?: Unit;
  readonly share?: WeightShare;
  /** Where another rung's figure shows this one too. */
  readonly figure?: string;
}

const rung = (id: string, name: string, watch: string, facts: RungFacts): Rung => ({
  id,
  name,
  watch,
  unit: facts.unit ?? 'reps',
  costPerUnit: facts.costPerUnit,
  needs: facts.needs ?? [],
  figure: facts.figure ?? id,
  ...(facts.share && { share: facts.share }),
});

/** Ground force on the hands over body weight: Ebben 2011, J Strength Cond Res 25:2891; quoted from memory. */
const remembered = (ofBodyWeight: number): WeightShare => ({ ofBodyWeight, flag: 'memory' });

export const PUSH_RUNGS = [
  rung('push-up-wall', 'Push-up, hands on the wall', 'One line from ear to ankle.', { costPerUnit: 1 }),
  rung('push-up-stair-4', 'Push-up, hands on the fourth stair', 'The hips do not sag.', {
    costPerUnit: 1.4,
    needs: ['stairs'],
    share: remembered(0.41),
  }),
  rung('push-up-stair-2', 'Push-up, hands on the second stair', 'The chin does not lead.', {
    costPerUnit: 1.9,
    needs: ['stairs'],
    share: remembered(0.55),
  }),
  rung('push-up-knees', 'Push-up from the knees', 'One line from ear to knee.', {
    costPerUnit: 2.2,
    needs: ['mat'],
    share: remembered(0.49),
  }),
  rung('push-up-floor', 'Push-up on the floor', 'The breastbone lands first, the belt line stays.', {
    costPerUnit: 3,
    share: remembered(0.64),
  }),
  rung('push-up-feet-stair', 'Push-up, feet on a stair', 'The seat stays in line.', {
    costPerUnit: 3.6,
    needs: ['stairs'],
    share: remembered(0.7),
  }),
] as const;

export const SIT_UP_RUNGS = [
  rung('sit-up-curl', 'Partial curl-up', 'The neck is carried, not pulled.', {
    costPerUnit: 1,
    needs: ['mat'],
  }),
  rung('sit-up-arms-across', 'Sit-up, arms across', 'No swing starts it.', {
    costPerUnit: 1.6,
    needs: ['mat'],
  }),
  rung('sit-up-tested', 'Sit-up, hands behind the head, feet held', 'The hands do not drag the head.', {
    costPerUnit: 1.8,
    needs: ['mat'],
  }),
  rung('sit-up-lowering', 'Slow lowering', 'Down in one speed; no drop.', {
    costPerUnit: 2.6,
    needs: ['mat'],
  }),
] as const;

export const SQUAT_RUNGS = [
  rung('squat-chair', 'Squat to a chair', 'Touch the seat, do not drop on it.', {
    costPerUnit: 1,
    needs: ['chair'],
  }),
  rung('squat-free', 'Squat, free', 'Knees over the feet, heels down.', { costPerUnit: 1.3 }),
  rung('squat-split', 'Split squat', 'The front knee stays over its foot. Reps a side.', {
    costPerUnit: 2.1,
  }),
  rung('squat-step-down', 'Step-down from a stair', 'No fall at the end. Reps a side, the rail in reach.', {
    costPerUnit: 2.6,
    needs: ['stairs'],
  }),
  rung('squat-rear-foot', 'Split squat, rear foot raised', 'The rear foot only rests. Reps a side.', {
    costPerUnit: 3.1,
    needs: ['stairs'],
  }),
] as const;

export const STAIR_RUNGS = [
  rung('stairs-walk', 'Walk up', 'The whole foot, or at least its ball, on each step.', {
    costPerUnit: 1,
    unit: 'flights',
    needs: ['stairs'],
  }),
  rung('stairs-brisk', 'Walk up, brisk', 'Tall; no folding at the waist. Walk down easily.', {
    costPerUnit: 1.4,
    unit: 'flights',
    needs: ['stairs'],
  }),
  rung('stairs-step-up-knee', 'Step-up with knee drive', 'No push from the lower foot. Reps a side.', {
    costPerUnit: 0.5,
    needs: ['stairs'],
  }),
  rung('stairs-two', 'Two stairs at a time', 'Hands off the knees; walk down one at a time.', {
    costPerUnit: 2.1,
    unit: 'flights',
    needs: ['stairs'],
  }),
] as const;

export const PULL_RUNGS = [
  rung('row-towel-seated', 'Towel row, seated, round your own feet', 'Long back, low shoulders.', {
    costPerUnit: 1,
    needs: ['mat'],
  }),
  rung('row-prone', 'Row lying face down', 'The elbows move, not the back.', {
    costPerUnit: 1.1,
    needs: ['mat'],
  }),
  rung('row-bag', 'One-arm row with a bag', 'The trunk stays still. Reps a side.', {
    costPerUnit: 1.5,
    needs: ['chair'],
  }),
  rung('hang-dead', 'Dead hang', 'No swing; one foot near the floor.', {
    costPerUnit: 0.5,
    unit: 'seconds',
    needs: ['bar'],
  }),
  rung('hang-active', 'Active hang', 'Straight elbows; the shoulders drop.', {
    costPerUnit: 2.2,
    needs: ['bar'],
  }),
  rung('pull-up-negative', 'Lowering from the bar', 'Five seconds down, one speed.', {
    costPerUnit: 3.6,
    needs: ['bar', 'chair'],
  }),
  rung('pull-up', 'Pull-up', 'No kick; the chin clears the bar by itself.', {
    costPerUnit: 4.2,
    needs: ['bar'],
  }),
  rung('chin-up', 'Chin-up', 'All the way down each time.', { costPerUnit: 4.4, needs: ['bar'] }),
] as const;

export const PLANK_RUNGS = [
  rung('plank-knees', 'Plank from the knees', 'The line from ear to knee holds.', {
    costPerUnit: 1,
    unit: 'seconds',
    needs: ['mat'],
  }),
  rung('plank-forearms', 'Plank on the forearms', 'The hold ends when the line breaks.', {
    costPerUnit: 1.5,
    unit: 'seconds',
    needs: ['mat'],
  }),
  rung('plank-side', 'Side plank', 'The lower hip does not sink. Seconds a side.', {
    costPerUnit: 2,
    unit: 'seconds',
    needs: ['mat'],
  }),
  rung('plank-reach', 'Plank with reach', 'The hips stay level while one arm reaches.', {
    costPerUnit: 2.3,
    unit: 'seconds',
    needs: ['mat'],
  }),
] as const;

export const HINGE_RUNGS = [
  rung('bridge', 'Glute bridge', 'The back does not arch at the top.', { costPerUnit: 1, needs: ['mat'] }),
  rung('bridge-one-leg', 'One-leg bridge', 'The hips stay level. Reps a side.', {
    costPerUnit: 1.8,
    needs: ['mat'],
  }),
  rung('hinge', 'Good-morning hinge', 'The hips go back; the back stays long.', { costPerUnit: 2 }),
] as const;

export const CALF_RUNGS = [
  rung('calf-raise-stair', 'Calf raise on the lowest stair', 'A hand on the newel or the rail, always.', {
    costPerUnit: 1,
    needs: ['stairs'],
  }),
  rung('calf-raise-slow', 'Calf raise, five seconds down', 'One speed down; a hand on the rail.', {
    costPerUnit: 1.5,
    needs: ['stairs'],
    figure: 'calf-raise-stair',
  }),
] as const;
