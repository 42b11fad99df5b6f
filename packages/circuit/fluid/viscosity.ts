/** Kinematic viscosity of an oil over temperature: ISO 3448 grade at 40 degC, viscosity index, ASTM D341 (Walther) between and beyond. */
import { viscosityAt100 } from './viscosity-index.ts';

/** Mid-points of ISO 3448 that differ from the name, mm2/s at 40 degC. */
const MIDPOINTS: Readonly<Record<number, number>> = { 2: 2.2, 3: 3.2, 5: 4.6, 7: 6.8 };

/** Kinematic viscosity at 40 degC, mm2/s, of an ISO 3448 grade. */
export const midpointOfGrade = (grade: number): number => MIDPOINTS[grade] ?? grade;

/** log10 log10 Z = a - b log10 T[K], Z = nu + 0.7 (+ the terms of D341 below 2 mm2/s). */
export interface Walther {
  readonly a: number;
  readonly b: number;
}

/** Z of ASTM D341; the exponential is nothing above 2 mm2/s. */
const z = (nu: number): number => nu + 0.7 + (nu < 2 ? Math.exp(-1.47 - 1.84 * nu - 0.51 * nu * nu) : 0);

function nuOfZ(target: number): number {
  if (target >= 2.7) return target - 0.7;
  let low = 0.01;
  let high = 2.01;
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (z(middle) < target) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

const loglog = (nu: number): number => Math.log10(Math.log10(z(nu)));

/** The line through two points; nu in mm2/s, t in K. */
export function walther(nu1: number, t1: number, nu2: number, t2: number): Walther {
  const b = (loglog(nu1) - loglog(nu2)) / (Math.log10(t2) - Math.log10(t1));
  return { a: loglog(nu1) + b * Math.log10(t1), b };
}

/** Kinematic viscosity, mm2/s, at t K. */
export function viscosityBy(line: Walther, t: number): number {
  return nuOfZ(10 ** (10 ** (line.a - line.b * Math.log10(t))));
}

/** Kinematic viscosity, mm2/s, at t K of an oil of ISO 3448 grade and viscosity index. */
export function viscosityOf(grade: number, index: number, t: number): number {
  const nu40 = midpointOfGrade(grade);
  return viscosityBy(walther(nu40, 313.15, viscosityAt100(nu40, index), 373.15), t);
}
