/** Density over temperature, and the stiffness of oil that holds free air. SI. */

/** Thermal expansion of mineral oil, 1/K (Rabie, Fluid Power Engineering, p. 37: 7e-4). */
export const EXPANSION = 7e-4;
/** Standard atmosphere, Pa. */
export const ATMOSPHERE = 101325;

/** Density, kg/m3, at t K of an oil that has rho kg/m3 at t0 K. */
export const densityAt = (rho: number, t0: number, t: number): number => rho / (1 + EXPANSION * (t - t0));

/**
 * Effective (tangent) bulk modulus, Pa, of oil with free air at absolute pressure p, Pa:
 * 1/Ke = (va/(n p) + vl/K)/(va + vl), va = a (p0/p)^(1/n), vl = (1 - a) exp(-(p - p0)/K); a = share of air at one atmosphere.
 */
export function effectiveBulk(bulk: number, air: number, p: number, n = 1.4): number {
  const pa = Math.max(p, 1000);
  const va = air * (ATMOSPHERE / pa) ** (1 / n);
  const vl = (1 - air) * Math.exp(-(pa - ATMOSPHERE) / bulk);
  return (va + vl) / (va / (n * pa) + vl / bulk);
}
