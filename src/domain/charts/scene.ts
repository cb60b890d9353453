import { drawNewel } from './fittings.ts';
import { color, escapeText, px, rect, text } from './svg.ts';

export interface Scene {
  width: number;
  height: number;
  /** Left edge of the first tread. */
  stairsX: number;
  treadWidth: number;
  rise: number;
  treads: number;
  /** Heights above the pitch of the stairs, in pixels. */
  railHeight: number;
  dadoHeight: number;
  newel: { height: number; width: number };
  lamp: { x: number; y: number; radius: number };
  /** Panes of light on the wall: x, y, width, height. */
  panes: readonly (readonly [number, number, number, number])[];
  /** Sessions that were missed, as week and post (0 to 2). */
  missed?: readonly (readonly [number, number])[];
  /** A door post at the left edge with its marks, oldest first. */
  jamb?: { x: number; marks: readonly { y: number; day: string }[] };
  /** Unique on the page. */
  id: string;
  className: string;
  align: string;
}

interface Step {
  week: number;
  x: number;
  y: number;
  width: number;
  landing: boolean;
}

/** The hall of the house at the foot of the stairs: decoration behind a heading. */
export function drawScene(scene: Scene): string {
  const { width, height, stairsX, rise } = scene;
  const steps = layOut(scene);
  const last = steps.at(-1);
  const end = last ? `L${px(last.x + last.width)} ${px(last.y)}` : '';
  const pitch = (offset: number) =>
    steps.map((step) => `L${px(step.x)} ${px(step.y + offset + rise / 2)}`).join('') +
    (last ? `L${px(last.x + last.width)} ${px(last.y + offset)}L${width + 40} ${px(last.y + offset)}` : '');
  const dadoTop = height - scene.dadoHeight - 44;
  const dadoLine = (shift: number) =>
    `M0 ${dadoTop + shift}L${stairsX} ${dadoTop + shift}${pitch(shift - scene.dadoHeight)}`;
  const panes = scene.panes
    .map(
      ([x, y, wide, tall]) =>
        `<path d="M${x} ${y}l${wide} ${px(-wide * 0.34)}v${tall}l${-wide} ${px(wide * 0.34)}z"/>`,
    )
    .join('');
  const id = escapeText(scene.id);
  return (
    `<svg class="scene ${escapeText(scene.className)}" viewBox="0 0 ${width} ${height}" preserveAspectRatio="${escapeText(scene.align)}" aria-hidden="true">` +
    `<defs><radialGradient id="${id}"><stop offset="0" stop-color="${color('brass-lit')}" stop-opacity="var(--lamp-opacity)"/><stop offset="1" stop-color="${color('brass-lit')}" stop-opacity="0"/></radialGradient></defs>` +
    `<g fill="${color('cast')}">${panes}</g>` +
    `<ellipse cx="${scene.lamp.x}" cy="${scene.lamp.y}" rx="${scene.lamp.radius}" ry="${px(scene.lamp.radius * 0.8)}" fill="url(#${id})"/>` +
    `<path d="${dadoLine(0)}V${height}H0Z" fill="${color('dado')}"/>` +
    `<path d="${dadoLine(0)}" fill="none" stroke="${color('post')}" stroke-width="13"/>` +
    `<path d="${dadoLine(3)}" fill="none" stroke="${color('moulding')}" stroke-width="2"/>` +
    rect(0, height - 34, stairsX, 34, `fill="${color('post')}"`) +
    `<path d="M0 ${height - 26}H${stairsX}M0 ${height - 22}H${stairsX}" stroke="${color('moulding')}" stroke-width="1.5"/>` +
    steps.map((step) => drawBalusters(step, scene)).join('') +
    `<path d="M${stairsX} ${height}${steps.map((step) => `L${px(step.x)} ${px(step.y)}L${px(step.x + step.width)} ${px(step.y)}`).join('')}${end}V${height}Z" fill="${color('post')}"/>` +
    steps.map((step) => drawStep(step, height, step === last)).join('') +
    drawHandrail(steps, scene) +
    drawNewel(stairsX - 34, height, scene.newel.height, scene.newel.width) +
    (scene.jamb ? drawPost(scene.jamb, height) : '') +
    '</svg>'
  );
}

function layOut(scene: Scene): Step[] {
  let [x, y] = [scene.stairsX, scene.height];
  const steps = Array.from({ length: scene.treads }, (_, index) => {
    const week = index + 1;
    const landing = week % 4 === 0;
    const step = { week, x, y: (y -= scene.rise), width: scene.treadWidth * (landing ? 1.35 : 1), landing };
    x += step.width;
    return step;
  });
  const last = steps.at(-1);
  if (last) last.width = Math.max(last.width, scene.width + 20 - last.x);
  return steps;
}

function drawBalusters(step: Step, scene: Scene): string {
  return [0, 1, 2]
    .map((place) => {
      const share = (place + 0.5) / 3;
      const x = step.x + step.width * share;
      const slope = scene.rise * share * (step.landing ? 0.4 : 1);
      const top = step.y - scene.railHeight + scene.rise / 2 - slope + 4;
      if (scene.missed?.some(([week, post]) => week === step.week && post === place)) {
        return `<path d="M${px(x)} ${px(step.y)}V${px(top)}" stroke="${color('post')}" stroke-dasharray="3 6" stroke-width="1.6"/>`;
      }
      return (
        rect(x - 4, top, 8, step.y - top, `fill="${color('post')}"`) +
        rect(x + 1.5, top, 2.5, step.y - top, `fill="${color('moulding')}"`)
      );
    })
    .join('');
}

function drawStep(step: Step, floor: number, last: boolean): string {
  const tall = floor - step.y - 54;
  const panel =
    tall > 30
      ? rect(
          step.x + 8,
          step.y + 40,
          step.width - 16,
          tall,
          `fill="none" stroke="${color('moulding')}" stroke-width="1.5"`,
        )
      : '';
  const word =
    step.landing && step.width > 80 && !last
      ? text(step.x + 34, step.y + 28.5, 'landing', { size: 13, fill: 'post-g' })
      : '';
  return (
    panel +
    rect(
      step.x - 7,
      step.y - 3,
      step.width + 7,
      10,
      `rx="5" fill="${color(step.landing ? 'rail' : 'post')}" stroke="${color('moulding')}"`,
    ) +
    `<path d="M${px(step.x)} ${px(step.y + 8)}h${px(step.width)}" stroke="${color('moulding')}" stroke-width="3"/>` +
    text(step.x + 12, step.y + 29, step.week, { size: 15, weight: 700, fill: 'post-ink' }) +
    word
  );
}

function drawHandrail(steps: readonly Step[], scene: Scene): string {
  const { rise, railHeight } = scene;
  const last = steps.at(-1);
  if (!last) return '';
  const course =
    `M${scene.stairsX - 30} ${px(scene.height - railHeight - rise * 0.2)}` +
    steps
      .map(
        (step) =>
          `L${px(step.x)} ${px(step.y - railHeight + rise / 2)}` +
          (step.landing && step !== last
            ? `L${px(step.x + step.width * 0.9)} ${px(step.y - railHeight + rise * 0.1)}`
            : ''),
      )
      .join('') +
    `L${px(last.x + last.width)} ${px(last.y - railHeight)}L${scene.width + 40} ${px(last.y - railHeight)}`;
  const rail = (token: string, thick: number, shift: number) =>
    `<path d="${course}" fill="none" stroke="${color(token)}" stroke-width="${thick}" stroke-linejoin="round" transform="translate(0 ${shift})"/>`;
  return rail('rail-lo', 17, 2) + rail('rail', 14, 0) + rail('rail-hi', 3.5, -4);
}

function drawPost(jamb: NonNullable<Scene['jamb']>, floor: number): string {
  const [x, right] = [jamb.x, jamb.x + 74];
  const marks = jamb.marks.map(
    (mark, index) =>
      `<path class="draw" style="--i:${index * 4}" pathLength="1" d="M${x - 6} ${mark.y}q30 -2 52 0" fill="none" stroke="${color('post-g')}" stroke-width="${index === jamb.marks.length - 1 ? 4 : 2.2}" stroke-linecap="round"/>` +
      text(x + 9, mark.y - 6, mark.day, { size: 15, fill: 'post-blue', hand: true }),
  );
  return (
    rect(x, -20, 74, floor + 20, `fill="${color('post')}"`) +
    `<path d="M${x} -20V${floor}M${right} -20V${floor}" stroke="${color('line')}"/>` +
    `<path d="M${x + 6} -20V${floor}M${right - 7} -20V${floor}M${right - 11} -20V${floor}" stroke="${color('moulding')}" stroke-width="1.5"/>${marks.join('')}`
  );
}

/** The hall behind the home page's heading, for wide screens. */
export const HALL_WIDE: Scene = {
  width: 1440,
  height: 668,
  stairsX: 770,
  treadWidth: 50,
  rise: 33,
  treads: 12,
  railHeight: 118,
  dadoHeight: 88,
  newel: { height: 262, width: 42 },
  lamp: { x: 1120, y: 120, radius: 520 },
  panes: [0, 1].flatMap((row) =>
    [0, 1, 2].map((column) => [800 + column * 88, 70 - column * 30 + row * 130, 74, 120] as const),
  ),
  missed: [
    [5, 1],
    [7, 0],
    [7, 2],
  ],
  jamb: {
    x: 74,
    marks: [
      { y: 470, day: '12 Sep' },
      { y: 428, day: '10 Oct' },
      { y: 352, day: '7 Nov' },
    ],
  },
  id: 'hall-wide',
  className: 'max-desk:hidden',
  align: 'xMaxYMax slice',
};

/** The same hall for telephones: the newel at the left, seven treads. */
export const HALL_PHONE: Scene = {
  width: 390,
  height: 400,
  stairsX: 74,
  treadWidth: 46,
  rise: 24,
  treads: 8,
  railHeight: 84,
  dadoHeight: 62,
  newel: { height: 178, width: 32 },
  lamp: { x: 250, y: 90, radius: 190 },
  panes: [0, 1].flatMap((row) =>
    [0, 1].map((column) => [250 + column * 48, 30 - column * 18 + row * 72, 40, 66] as const),
  ),
  id: 'hall-phone',
  className: 'desk:hidden',
  align: 'xMidYMax slice',
};
