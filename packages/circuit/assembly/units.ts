/** SI to the engine's units and back: MPa, L/s, 1e-3 m2, L/rad, kN, kN.m, L, t, kW. The only place where they meet. */

export const toMPa = (pa: number): number => pa * 1e-6;
export const fromMPa = (mpa: number): number => mpa * 1e6;
export const toLitresPerSecond = (m3s: number): number => m3s * 1e3;
export const fromLitresPerSecond = (ls: number): number => ls * 1e-3;
/** m2 -> 1e-3 m2, and m3/rad -> L/rad. */
export const toArea = (m2: number): number => m2 * 1e3;
export const toKilo = (n: number): number => n * 1e-3;
export const fromKilo = (kn: number): number => kn * 1e3;
export const toLitres = (m3: number): number => m3 * 1e3;
export const fromLitres = (l: number): number => l * 1e-3;

/** Everyday units of laws that are stated in them, to SI. */
export const BAR = 1e5;
export const LITRE_PER_MINUTE = 1e-3 / 60;
export const CM3_PER_MINUTE = 1e-6 / 60;
/** Standard gravity, m/s2. */
export const GRAVITY = 9.80665;
