import type { BodyName } from '#domain/figure/bodies';
import { drawFigure } from '#domain/figure/draw-figure';
import { movementOf } from '#domain/figure/movements';
import { solveMovement } from '#domain/figure/pose-of';
import type { SolvedPose } from '#domain/figure/solve-pose';
import type { Fault, Movement, ViewName } from '#domain/figure/types';
import { viewOf } from '#domain/figure/view';
import { jointWindow, windowOf, type Window } from '#domain/figure/window';

/** full: a lesson's drawing. thumb: under 130 px, without shading and with thick lines. */
export type FigureSize = 'full' | 'thumb';

export interface FigureLook {
  body?: BodyName | undefined;
  view?: ViewName | undefined;
  size?: FigureSize | undefined;
  /** Muscles to hatch instead of shading, at most three. */
  muscles?: readonly string[] | undefined;
  className?: string | undefined;
}

const THUMB_WEIGHT = 2.4;
/** As wide as its column, but a standing figure never taller than a screen of a phone. */
const FULL = 'w-full max-h-96';
/** Ladders where ear, hip and ankle are one line when it is right. */
const STRAIGHT: ReadonlySet<string> = new Set(['push-up', 'plank']);

/**
 * Drawings by what they show. The same question always has the same answer and the questions are few (movements,
 * phases, bodies), so each is worked out once a process instead of 20 ms a request.
 */
const drawn = new Map<string, string>();
const solved = new Map<string, SolvedPose>();

function once<T>(kept: Map<string, T>, key: unknown, make: () => T): T {
  const name = JSON.stringify(key);
  const known = kept.get(name);
  if (known !== undefined) return known;
  const made = make();
  kept.set(name, made);
  return made;
}

/** A phase or fault on a body, solved once. */
function solve(movement: Movement, which: number | Fault, body: BodyName): SolvedPose {
  const name = typeof which === 'number' ? which : which.name;
  return once(solved, [movement.id, name, body], () => solveMovement(movement, which, body));
}

const looks = (size: FigureSize = 'full') =>
  size === 'thumb' ? { isHatched: false, weight: THUMB_WEIGHT } : {};

function windowFor(
  movement: Movement,
  whichs: readonly (number | Fault)[],
  body: BodyName,
  view: ViewName,
): Window {
  return jointWindow(whichs.map((which) => windowOf(solve(movement, which, body), viewOf(view))));
}

/** One phase (0, 1 or 2) of a movement as SVG. */
export function drawPhase(id: string, phase: number, look: FigureLook = {}): string {
  return once(drawn, ['phase', id, phase, look], () => {
    const movement = movementOf(id);
    const { body = 'even', view = movement.view, size, muscles, className } = look;
    const title = `${movement.name}: ${movement.phases[phase]?.name ?? ''}`;
    return drawFigure(solve(movement, phase, body), {
      title,
      view,
      muscles,
      className,
      ...looks(size),
    });
  });
}

export interface DrawnPhase {
  name: string;
  cue: string;
  svg: string;
}

/** The three phases on one floor at one scale. */
export function drawPhases(id: string, { body = 'even', view, muscles }: FigureLook = {}): DrawnPhase[] {
  const movement = movementOf(id);
  const seen = view ?? movement.view;
  let shared: Window | undefined;
  return movement.phases.map(({ name, cue }, phase) => {
    const svg = once(drawn, ['phases', id, phase, body, seen, muscles], () => {
      shared ??= windowFor(movement, [0, 1, 2], body, seen);
      const title = `${movement.name}, phase ${phase + 1}: ${name}`;
      return drawFigure(solve(movement, phase, body), {
        title,
        view: seen,
        window: shared,
        muscles,
        className: FULL,
      });
    });
    return { name, cue, svg };
  });
}

/** The words of a fault of a movement. @throws RangeError for a name that the movement does not have */
export function faultOf(id: string, name: string): Fault {
  const found = movementOf(id).faults.find((fault) => fault.name === name);
  if (!found) throw new RangeError(`${id} has no fault called ${name}`);
  return found;
}

/** A fault with its joint marked, and its mend with the line from ear to ankle, at one scale. */
export function drawFault(
  id: string,
  name: string,
  body: BodyName = 'even',
): { wrong: string; mended: string } {
  const movement = movementOf(id);
  const fault = faultOf(id, name);
  const view = fault.view ?? movement.view;
  const draw = (isWrong: boolean) =>
    once(drawn, ['fault', id, name, body, isWrong], () => {
      const window = windowFor(movement, [fault, fault.mendPhase], body, view);
      const shared = { view, window, isHatched: true, className: FULL };
      return isWrong
        ? drawFigure(solve(movement, fault, body), {
            ...shared,
            title: `Fault: ${name}`,
            faultAt: fault.at,
          })
        : drawFigure(solve(movement, fault.mendPhase, body), {
            ...shared,
            title: `Mended: not ${name}`,
            hasLine: STRAIGHT.has(movement.ladder) && view === 'side',
          });
    });
  return { wrong: draw(true), mended: draw(false) };
}
