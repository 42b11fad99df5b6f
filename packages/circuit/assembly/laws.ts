/** From declared figures to the coefficients of the engine's laws. SI in, engine units out. */
import type { FlowAt } from './assembly.ts';
import { BAR, LITRE_PER_MINUTE, toLitresPerSecond, toMPa } from './units.ts';

/** Laminar core of every path, Pa (0.1 bar). */
export const DELTA = 0.1 * BAR;

/** K of q = K d/(d2 + delta2)^(1/4), L/s and MPa, so that the curve passes exactly through the declared point. */
export function pathK(at: FlowAt): number {
  const d = toMPa(at.drop);
  const delta = toMPa(DELTA);
  return (toLitresPerSecond(at.flow) * (d * d + delta * delta) ** 0.25) / d;
}

/** An optional `passes` left out: 600 L/min at 0.1 bar, under 0.01 bar at 40 L/min. */
export const NO_LOSS: FlowAt = { flow: 600 * LITRE_PER_MINUTE, drop: 0.1 * BAR };

/** The declared drop of a check is the total one; the path's is what is left above the cracking pressure. Undefined: nothing is left. */
export function behindCrack(at: FlowAt, crack: number): FlowAt | undefined {
  return at.drop > crack ? { flow: at.flow, drop: at.drop - crack } : undefined;
}

/** Flow at another drop by the exact path law, m3/s. */
export function pathFlow(at: FlowAt, drop: number): number {
  const shape = (d: number) => d / (d * d + DELTA * DELTA) ** 0.25;
  return (at.flow * shape(drop)) / shape(at.drop);
}

/** Conductance of a laminar leak, L/s/MPa. */
export const laminarG = (at: FlowAt): number => toLitresPerSecond(at.flow) / toMPa(at.drop);

/** Flow coefficient of a sharp-edged orifice (textbooks give 0.60 to 0.64). */
export const ORIFICE_CD = 0.62;
/** Flow of a sharp-edged orifice at 10 bar: Q = Cd A sqrt(2 dp / rho). d in m, rho in kg/m3. */
export function orificeAt(d: number, rho: number): FlowAt {
  const drop = 10 * BAR;
  return { flow: ORIFICE_CD * ((Math.PI * d * d) / 4) * Math.sqrt((2 * drop) / rho), drop };
}

/** Reverse check inside a valve: cracking pressure, Pa. */
export const REVERSE_CRACK = 0.5 * BAR;

/** Band of a pressure valve: 10 % of its opening pressure, at least 0.5 bar. Pa. */
export const bandOf = (set: number): number => Math.max(0.1 * set, 0.5 * BAR);
