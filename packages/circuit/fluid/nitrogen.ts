/**
 * Nitrogen as a real gas: the reference equation of state of Span, Lemmon, Jacobsen, Wagner, Yokozeki, J. Phys. Chem. Ref. Data 29 (2000) 1361
 * (uncertainty of density 0.02 % below 30 MPa). SI: K, Pa, mol/m3, J/(mol K). Valid from 63 K to 1000 K; here for charges of accumulators.
 */

const R = 8.31451;
const T_CRITICAL = 126.192;
const RHO_CRITICAL = 11183.9;

/** N, exponent of delta, exponent of tau, exponent of delta in the exponential (0: none). */
// biome-ignore format: a table
const TERMS: readonly (readonly [number, number, number, number])[] = [
  [0.924803575275, 1, 0.25, 0], [-0.492448489428, 1, 0.875, 0], [0.661883336938, 2, 0.5, 0], [-0.192902649201e1, 2, 0.875, 0],
  [-0.622469309629e-1, 3, 0.375, 0], [0.349943957581, 3, 0.75, 0], [0.564857472498, 1, 0.5, 1], [-0.161720005987e1, 1, 0.75, 1],
  [-0.481395031883, 1, 2, 1], [0.421150636384, 3, 1.25, 1], [-0.161962230825e-1, 3, 3.5, 1], [0.172100994165, 4, 1, 1],
  [0.735448924933e-2, 6, 0.5, 1], [0.168077305479e-1, 6, 3, 1], [-0.107626664179e-2, 7, 0, 1], [-0.137318088513e-1, 7, 2.75, 1],
  [0.635466899859e-3, 8, 0.75, 1], [0.304432279419e-2, 8, 2.5, 1], [-0.435762336045e-1, 1, 4, 2], [-0.723174889316e-1, 2, 6, 2],
  [0.389644315272e-1, 3, 6, 2], [-0.212201363910e-1, 4, 3, 2], [0.408822981509e-2, 5, 3, 2], [-0.551990017984e-4, 8, 6, 2],
  [-0.462016716479e-1, 4, 16, 3], [-0.300311716011e-2, 5, 11, 3], [0.368825891208e-1, 5, 15, 3], [-0.255856846220e-2, 8, 12, 3],
  [0.896915264558e-2, 3, 12, 4], [-0.441513370350e-2, 5, 7, 4], [0.133722924858e-2, 6, 4, 4], [0.264832491957e-3, 9, 16, 4],
];
/** N, exponents of delta and tau, phi, beta, gamma of exp(-phi (delta - 1)^2 - beta (tau - gamma)^2). */
// biome-ignore format: a table
const BELLS: readonly (readonly [number, number, number, number, number, number])[] = [
  [0.196688194015e2, 1, 0, 20, 325, 1.16], [-0.209115600730e2, 1, 1, 20, 325, 1.16],
  [0.167788306989e-1, 3, 2, 15, 300, 1.13], [0.262767566274e4, 2, 3, 25, 275, 1.25],
];
/** Ideal part: ln delta + a1 ln tau + a2 + a3 tau + a4/tau + a5/tau^2 + a6/tau^3 + a7 ln(1 - exp(-a8 tau)). */
const IDEAL = [2.5, -12.76952708, -0.00784163, -1.934819e-4, -1.247742e-5, 6.678326e-8, 1.012941, 26.65788] as const;

/** Residual Helmholtz energy and its derivatives to delta and tau. */
function residual(delta: number, tau: number): { readonly a: number; readonly byDelta: number; readonly byTau: number } {
  let a = 0;
  let byDelta = 0;
  let byTau = 0;
  for (const [n, i, j, l] of TERMS) {
    const damp = l === 0 ? 0 : delta ** l;
    const term = n * delta ** i * tau ** j * Math.exp(-damp);
    a += term;
    byDelta += (term * (i - l * damp)) / delta;
    byTau += (term * j) / tau;
  }
  for (const [n, i, j, phi, beta, gamma] of BELLS) {
    const term = n * delta ** i * tau ** j * Math.exp(-phi * (delta - 1) ** 2 - beta * (tau - gamma) ** 2);
    a += term;
    byDelta += term * (i / delta - 2 * phi * (delta - 1));
    byTau += term * (j / tau - 2 * beta * (tau - gamma));
  }
  return { a, byDelta, byTau };
}

/** Pressure, Pa absolute, at a temperature (K) and molar density (mol/m3). */
export function nitrogenPressure(t: number, rho: number): number {
  const delta = rho / RHO_CRITICAL;
  return rho * R * t * (1 + delta * residual(delta, T_CRITICAL / t).byDelta);
}

/** Entropy, J/(mol K), at a temperature (K) and molar density (mol/m3). */
export function nitrogenEntropy(t: number, rho: number): number {
  const delta = rho / RHO_CRITICAL;
  const tau = T_CRITICAL / t;
  const [a1, a2, a3, a4, a5, a6, a7, a8] = IDEAL;
  const ideal =
    Math.log(delta) +
    a1 * Math.log(tau) +
    a2 +
    a3 * tau +
    a4 / tau +
    a5 / tau ** 2 +
    a6 / tau ** 3 +
    a7 * Math.log(1 - Math.exp(-a8 * tau));
  const idealByTau = a1 / tau + a3 - a4 / tau ** 2 - (2 * a5) / tau ** 3 - (3 * a6) / tau ** 4 + (a7 * a8) / (Math.exp(a8 * tau) - 1);
  const rest = residual(delta, tau);
  return R * (tau * (idealByTau + rest.byTau) - ideal - rest.a);
}

/** Root of a rising function in [low, high], by bisection on the logarithm. */
function rising(low: number, high: number, excess: (x: number) => number): number {
  for (let i = 0; i < 80; i++) {
    const middle = Math.sqrt(low * high);
    if (excess(middle) < 0) low = middle;
    else high = middle;
  }
  return Math.sqrt(low * high);
}

/** Molar density, mol/m3, at a temperature above 150 K and an absolute pressure, Pa. */
export const nitrogenDensity = (t: number, p: number): number => rising(1e-3, 3.2e4, (rho) => nitrogenPressure(t, rho) - p);

/** Compressibility Z = p/(rho R T). */
export const nitrogenZ = (t: number, p: number): number => p / (nitrogenDensity(t, p) * R * t);

/** Oil (m3) in a charge of gas volume `volume` and precharge p0 at absolute pressure p, filled slowly at t K: no more than ideal below 100 bar. */
export function realOilAt(volume: number, p0: number, p: number, t: number): number {
  return p <= p0 ? 0 : volume * (1 - nitrogenDensity(t, p0) / nitrogenDensity(t, p));
}

/** Precharge, Pa absolute, at another gas temperature: constant volume. */
export const realPrechargeAt = (p0: number, t0: number, t: number): number => nitrogenPressure(t, nitrogenDensity(t0, p0));

/**
 * Oil (m3) given quickly (no heat exchanged) between absolute pressures `from` and `to`, after filling slowly to `from` at t K; and the gas
 * temperature at the end, K.
 */
export function realYield(
  volume: number,
  p0: number,
  from: number,
  to: number,
  t: number,
): { readonly oil: number; readonly temperature: number } {
  const filled = nitrogenDensity(t, from);
  const entropy = nitrogenEntropy(t, filled);
  const gas = (volume * nitrogenDensity(t, p0)) / filled;
  // Along the isentrope density falls with pressure: for each temperature the density at `to`, and the temperature of equal entropy.
  const temperature = rising(120, t, (x) => nitrogenEntropy(x, nitrogenDensity(x, to)) - entropy);
  return { oil: gas * (filled / nitrogenDensity(temperature, to) - 1), temperature };
}
