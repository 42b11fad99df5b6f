/** The C1 building blocks of every law, each with its slope. All are monotone and, beyond their blend, exact. */

/** Turbulent passage with a laminar core: d/(d^2 + delta^2)^(1/4). Odd; tends to sign(d) sqrt|d|. */
export function root(d: number, delta: number): number {
  return d / Math.sqrt(Math.sqrt(d * d + delta * delta));
}
export function rootSlope(d: number, delta: number): number {
  const s = d * d + delta * delta;
  return (s - 0.5 * d * d) / (s * Math.sqrt(Math.sqrt(s)));
}

/**
 * Positive part: 0 up to 0, z from `width` on, between them the cubic that meets both with equal slope.
 * One-sided, so that nothing flows against a pressure and a declared point beyond the blend is met exactly.
 */
export function positive(z: number, width: number): number {
  if (z <= 0) return 0;
  if (z >= width) return z;
  const t = z / width;
  return z * t * (2 - t);
}
export function positiveSlope(z: number, width: number): number {
  if (z <= 0) return 0;
  if (z >= width) return 1;
  const t = z / width;
  return t * (4 - 3 * t);
}

/** 0 below 0, 1 above 1, z between, rounded inside over `edge` (at most 0.5) at either end. */
export function ramp(z: number, edge: number): number {
  if (z <= 0) return 0;
  if (z >= 1) return 1;
  return z < 0.5 ? positive(z, edge) : 1 - positive(1 - z, edge);
}
export function rampSlope(z: number, edge: number): number {
  if (z <= 0 || z >= 1) return 0;
  return z < 0.5 ? positiveSlope(z, edge) : positiveSlope(1 - z, edge);
}

/** The smaller of u and 1 for u >= 0, rounded over `edge` below 1: exactly 1 from u = 1 on. */
export function capped(u: number, edge: number): number {
  return u >= 1 ? 1 : u <= 1 - edge ? u : 1 - positive(1 - u, edge);
}
export function cappedSlope(u: number, edge: number): number {
  return u >= 1 ? 0 : u <= 1 - edge ? 1 : positiveSlope(1 - u, edge);
}

/** The smaller of two flows a, b >= 0, rounded where they differ by less than `edge` of their sum: zero when either is zero. */
export function smaller(a: number, b: number, edge: number): number {
  const sum = a + b;
  if (sum <= 0) return 0;
  const u = (a - b) / sum;
  if (u <= -edge) return a;
  if (u >= edge) return b;
  return 0.5 * sum * (1 - (u * u) / (2 * edge) - edge / 2);
}
/** d/da of `smaller`; d/db is the same with a and b exchanged. */
export function smallerSlope(a: number, b: number, edge: number): number {
  const sum = a + b;
  if (sum <= 0) return 0.5;
  const u = (a - b) / sum;
  if (u <= -edge) return 1;
  if (u >= edge) return 0;
  return 0.5 - u / (2 * edge) + (u * u) / (4 * edge) - edge / 4;
}

/** Quadratic onset: 0 up to 0, z^2/2w up to w, z - w/2 beyond. For limits that must not be crossed stealthily. */
export function onset(z: number, width: number): number {
  return z <= 0 ? 0 : z < width ? (z * z) / (2 * width) : z - width / 2;
}
export function onsetSlope(z: number, width: number): number {
  return z <= 0 ? 0 : z < width ? z / width : 1;
}

/** Coulomb friction shape v/sqrt(v^2 + v0^2). */
export function sliding(v: number, v0: number): number {
  return v / Math.sqrt(v * v + v0 * v0);
}
export function slidingSlope(v: number, v0: number): number {
  const s = v * v + v0 * v0;
  return (v0 * v0) / (s * Math.sqrt(s));
}

/** Share of a resisting load in force: 0 at rest and against its direction, 1 from 3 v0 on; never drives. */
export function resisting(v: number, v0: number): number {
  if (v <= 0) return 0;
  const t = v / (3 * v0);
  return t >= 1 ? 1 : t * t * (3 - 2 * t);
}
export function resistingSlope(v: number, v0: number): number {
  if (v <= 0) return 0;
  const t = v / (3 * v0);
  return t >= 1 ? 0 : (6 * t * (1 - t)) / (3 * v0);
}

/** Size of z, rounded at zero over `width` and exact beyond it: friction that grows with a pressure difference keeps its declared share. */
export function magnitude(z: number, width: number): number {
  return z < 0 ? positive(-z, width) : positive(z, width);
}
export function magnitudeSlope(z: number, width: number): number {
  return z < 0 ? -positiveSlope(-z, width) : positiveSlope(z, width);
}
