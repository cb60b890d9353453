/** A measure of the house beside what the body needs, with a check by feel that outranks the number. */
export interface Fit {
  readonly thing: 'step' | 'hands' | 'chair' | 'mat' | 'bar';
  /** What suits this body: from and to, in millimetres; null where only the feel tells. */
  readonly suitsMm: readonly [number, number] | null;
  /** Whether what the house has suits; null when it is not known. */
  readonly suits: boolean | null;
  readonly sentence: string;
  readonly feltCheck: string;
  readonly source: string;
}

const NO_SOURCE = 'Common practice, no source';
const cm = (mm: number): string => `${Math.round(mm / 10)} cm`;

function isSuited(haveMm: number | null, suitsMm: readonly [number, number]): boolean | null {
  if (haveMm === null || !Number.isFinite(haveMm)) return null;
  return haveMm >= suitsMm[0] && haveMm <= suitsMm[1];
}

/** The step of the step test: 12 inches, whatever the body, because the tables know no other; 1 cm either way. */
export function fitStep(haveMm: number | null): Fit {
  const suitsMm = [295, 315] as const;
  return {
    thing: 'step',
    suitsMm,
    suits: isSuited(haveMm, suitsMm),
    sentence: 'The step test wants a step of 30.5 cm. On any other the result has no place in a table.',
    feltCheck: 'The whole foot is on it, it does not tip, and the knee does not bend past a right angle.',
    source: 'YMCA three-minute step test: 12 in (memory); 1 cm either way: common practice, no source',
  };
}

/** Hands in a push-up: no number, a feel. */
export function fitHands(): Fit {
  return {
    thing: 'hands',
    suitsMm: null,
    suits: null,
    sentence: 'Hands slightly outside the shoulders.',
    feltCheck: 'At the bottom the forearms stand upright, seen from the front.',
    source:
      'Cañada College, push-up test: hands slightly outside the shoulders; forearms: common practice, no source',
  };
}

/** The height of the back of the knee as a share of stature, in shoes. Common practice, no source. */
export const KNEE_SHARE_OF_STATURE = 0.25;

/** A chair on which the thighs are level: a quarter of the stature, 3 cm either way. */
export function fitChair(statureMm: number, haveMm: number | null): Fit {
  const level = statureMm * KNEE_SHARE_OF_STATURE;
  const suitsMm = [level - 30, level + 30] as const;
  return {
    thing: 'chair',
    suitsMm,
    suits: isSuited(haveMm, suitsMm),
    sentence: `A seat between ${cm(suitsMm[0])} and ${cm(suitsMm[1])} high. The chair-stand test alone asks for 43 cm.`,
    feltCheck: 'Sit with the feet flat: the thighs are level and the heels stay down.',
    source: `A quarter of the stature: ${NO_SOURCE.toLowerCase()}. 43 cm for the test: CDC STEADI`,
  };
}

/** Free floor round the mat. */
export const MAT_MARGIN_MM = 600;

/** Mat and the free floor around it: as long as you are tall, and 60 cm free on every side. */
export function fitMat(statureMm: number, matLengthMm: number | null, marginMm: number | null): Fit {
  const longEnough = matLengthMm === null ? null : matLengthMm >= statureMm;
  const free = marginMm === null ? null : marginMm >= MAT_MARGIN_MM;
  return {
    thing: 'mat',
    suitsMm: [statureMm, Infinity],
    suits:
      longEnough === false || free === false ? false : longEnough === null || free === null ? null : true,
    sentence: `A mat of at least ${cm(statureMm)}, and ${cm(MAT_MARGIN_MM)} free on every side.`,
    feltCheck: 'Lie on your back and sweep both arms and both legs: nothing is touched.',
    source: NO_SOURCE,
  };
}

/** A bar to hang from with bent knees: at least as high as you are tall. */
export function fitBar(statureMm: number, haveMm: number | null): Fit {
  const suitsMm = [statureMm, statureMm * 1.4] as const;
  return {
    thing: 'bar',
    suitsMm,
    suits: isSuited(haveMm, suitsMm),
    sentence: `A bar between ${cm(suitsMm[0])} and ${cm(suitsMm[1])} high. Bend the knees to hang free of the floor.`,
    feltCheck:
      'Hang with straight arms: the toes are clear of the floor, and you reach the bar without a jump.',
    source: NO_SOURCE,
  };
}
