import type { Frame, V3 } from './types.ts';

export const RADIANS = Math.PI / 180;

export const add = (a: V3, b: V3, k = 1): V3 => [a[0] + b[0] * k, a[1] + b[1] * k, a[2] + b[2] * k];
export const subtract = (a: V3, b: V3): V3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const dot = (a: V3, b: V3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
/** Length 1 in the same direction; a null vector stays null. */
export function unit(a: V3): V3 {
  const length = Math.hypot(a[0], a[1], a[2]) || 1;
  return [a[0] / length, a[1] / length, a[2] / length];
}
export const cross = (a: V3, b: V3): V3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const mix = (a: V3, b: V3, t: number): V3 => [
  a[0] + (b[0] - a[0]) * t,
  a[1] + (b[1] - a[1]) * t,
  a[2] + (b[2] - a[2]) * t,
];
/** a × x + b × y. */
export const combine = (a: V3, x: number, b: V3, y: number): V3 => [
  a[0] * x + b[0] * y,
  a[1] * x + b[1] * y,
  a[2] * x + b[2] * y,
];

export const ROOM: Frame = { f: [1, 0, 0], u: [0, 1, 0], s: [0, 0, 1] };

/** Turned about its side axis by degrees: a trunk leans back, a thigh goes forward. */
export function turnAboutSide(R: Frame, degrees: number): Frame {
  const c = Math.cos(degrees * RADIANS);
  const s = Math.sin(degrees * RADIANS);
  return { f: combine(R.f, c, R.u, s), u: combine(R.f, -s, R.u, c), s: R.s };
}
/** Turned about its front axis: abduction, bending to the side. */
export function turnAboutFront(R: Frame, degrees: number): Frame {
  const c = Math.cos(degrees * RADIANS);
  const s = Math.sin(degrees * RADIANS);
  return { f: R.f, u: combine(R.u, c, R.s, s), s: combine(R.u, -s, R.s, c) };
}
/** Turned about its own length. */
export function turnAboutLength(R: Frame, degrees: number): Frame {
  const c = Math.cos(degrees * RADIANS);
  const s = Math.sin(degrees * RADIANS);
  return { f: combine(R.f, c, R.s, -s), u: R.u, s: combine(R.f, s, R.s, c) };
}
/** The room's place of `x` front, `y` up, `z` side from `origin` in a frame. */
export const place = (o: V3, R: Frame, x: number, y: number, z = 0): V3 => [
  o[0] + R.f[0] * x + R.u[0] * y + R.s[0] * z,
  o[1] + R.f[1] * x + R.u[1] * y + R.s[1] * z,
  o[2] + R.f[2] * x + R.u[2] * y + R.s[2] * z,
];
export const clamp01 = (value: number): number => Math.max(0, Math.min(1, value));
