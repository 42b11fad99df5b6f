/**
 * Nitrogen as a real gas: reference equation of Span, Lemmon, Jacobsen, Wagner, Yokozeki, J. Phys. Chem. Ref. Data 29 (2000) 1361.
 * Helmholtz energy a/RT = ideal(delta, tau) + residual(delta, tau), delta = rho/rho_c, tau = T_c/T.
 */
import type { GasCurve } from './network.ts';

const R = 8.31451;
/** K and mol/L of the critical point; kg/mol. */
const T_C = 126.192;
const RHO_C = 11.1839;
const MOLAR_MASS = 0.02801348;

/** Residual terms [N, delta exponent, tau exponent, exponent of delta in exp(-delta^l) (0: none)]. */
const TERMS: readonly (readonly [number, number, number, number])[] = [
  [0.924803575275, 1, 0.25, 0],
  [-0.492448489428, 1, 0.875, 0],
  [0.661883336938, 2, 0.5, 0],
  [-1.92902649201, 2, 0.875, 0],
  [-0.0622469309629, 3, 0.375, 0],
  [0.349943957581, 3, 0.75, 0],
  [0.564857472498, 1, 0.5, 1],
  [-1.61720005987, 1, 0.75, 1],
  [-0.481395031883, 1, 2, 1],
  [0.421150636384, 3, 1.25, 1],
  [-0.0161962230825, 3, 3.5, 1],
  [0.172100994165, 4, 1, 1],
  [0.00735448924933, 6, 0.5, 1],
  [0.0168077305479, 6, 3, 1],
  [-0.00107626664179, 7, 0, 1],
  [-0.0137318088513, 7, 2.75, 1],
  [0.000635466899859, 8, 0.75, 1],
  [0.00304432279419, 8, 2.5, 1],
  [-0.0435762336045, 1, 4, 2],
  [-0.0723174889316, 2, 6, 2],
  [0.0389644315272, 3, 6, 2],
  [-0.021220136391, 4, 3, 2],
  [0.00408822981509, 5, 3, 2],
  [-0.0000551990017984, 8, 6, 2],
  [-0.0462016716479, 4, 16, 3],
  [-0.00300311716011, 5, 11, 3],
  [0.0368825891208, 5, 15, 3],
  [-0.0025585684622, 8, 12, 3],
  [0.00896915264558, 3, 12, 4],
  [-0.0044151337035, 5, 7, 4],
  [0.00133722924858, 6, 4, 4],
  [0.000264832491957, 9, 16, 4],
];
/** Terms near the critical point [N, delta exponent, tau exponent, phi, beta, gamma]. */
const CRITICAL: readonly (readonly [number, number, number, number, number, number])[] = [
  [19.6688194015, 1, 0, 20, 325, 1.16],
  [-20.911560073, 1, 1, 20, 325, 1.16],
  [0.0167788306989, 3, 2, 15, 300, 1.13],
  [2627.67566274, 2, 3, 25, 275, 1.25],
];

/** Residual energy and its derivatives delta d/d delta, tau d/d tau. */
function residual(delta: number, tau: number): { a: number; byDelta: number; byTau: number } {
  let a = 0;
  let byDelta = 0;
  let byTau = 0;
  for (const [n, i, t, l] of TERMS) {
    const power = l > 0 ? delta ** l : 0;
    const term = n * delta ** i * tau ** t * (l > 0 ? Math.exp(-power) : 1);
    a += term;
    byDelta += term * (i - l * power);
    byTau += term * t;
  }
  for (const [n, i, t, phi, beta, gamma] of CRITICAL) {
    const term = n * delta ** i * tau ** t * Math.exp(-phi * (delta - 1) ** 2 - beta * (tau - gamma) ** 2);
    a += term;
    byDelta += term * (i - 2 * phi * delta * (delta - 1));
    byTau += term * (t - 2 * beta * tau * (tau - gamma));
  }
  return { a, byDelta, byTau };
}

/** Pressure, MPa absolute, at density (kg/m3) and temperature (K). */
export function nitrogenPressure(density: number, temperature: number): number {
  const molar = density / MOLAR_MASS / 1000;
  return molar * R * temperature * (1 + residual(molar / RHO_C, T_C / temperature).byDelta) * 1e-3;
}

/** Entropy, J/(mol K) (zero of the reference equation), at density (kg/m3) and temperature (K). */
export function nitrogenEntropy(density: number, temperature: number): number {
  const delta = density / MOLAR_MASS / 1000 / RHO_C;
  const tau = T_C / temperature;
  const { a, byTau } = residual(delta, tau);
  const e = Math.exp(-26.65788 * tau);
  const ideal =
    Math.log(delta) +
    2.5 * Math.log(tau) -
    12.76952708 -
    0.00784163 * tau -
    1.934819e-4 / tau -
    1.247742e-5 / tau ** 2 +
    6.678326e-8 / tau ** 3 +
    1.012941 * Math.log(1 - e);
  const idealByTau =
    2.5 -
    0.00784163 * tau +
    1.934819e-4 / tau +
    (2 * 1.247742e-5) / tau ** 2 -
    (3 * 6.678326e-8) / tau ** 3 +
    (1.012941 * 26.65788 * tau * e) / (1 - e);
  return R * (idealByTau + byTau - ideal - a);
}

/** Root of a rising function between two bounds, to 1e-12 relative (bisection with secant steps). */
function rootOf(f: (x: number) => number, from: number, to: number): number {
  let low = from;
  let high = to;
  let atLow = f(low);
  let atHigh = f(high);
  for (let k = 0; k < 200 && high - low > 1e-12 * Math.abs(high); k++) {
    let x = k % 3 === 2 ? 0.5 * (low + high) : low - (atLow * (high - low)) / (atHigh - atLow);
    if (!(x > low && x < high)) x = 0.5 * (low + high);
    const at = f(x);
    if (at === 0) return x;
    if (at < 0) {
      low = x;
      atLow = at;
    } else {
      high = x;
      atHigh = at;
    }
  }
  return 0.5 * (low + high);
}

/** Density, kg/m3, at pressure (MPa absolute) and temperature (K), for the gas above its critical temperature. */
export function nitrogenDensity(pressure: number, temperature: number): number {
  return rootOf((density) => nitrogenPressure(density, temperature) - pressure, 1e-4, 900);
}

/** Highest pressure of a curve, MPa, its thinnest state as a share of the filling density, and its points (log-linear between them). */
const CURVE_TOP = 120;
const THINNEST = 0.5;
const CURVE_POINTS = 120;

/**
 * Pressure over gas volume of a charge: `volume` L at `precharge` MPa absolute and `temperature` K. Isothermal; or isentropic through the point
 * reached by filling it slowly (isothermally) to `base` MPa absolute.
 */
export function nitrogenCurve(volume: number, precharge: number, temperature: number, base?: number): GasCurve {
  const filling = nitrogenDensity(precharge, temperature);
  const entropy = base === undefined ? 0 : nitrogenEntropy(nitrogenDensity(base, temperature), temperature);
  const densest = nitrogenDensity(CURVE_TOP, temperature);
  const pressure: number[] = [];
  const volumes: number[] = [];
  let t = temperature;
  for (let i = 0; i < CURVE_POINTS; i++) {
    const density = filling * THINNEST * (densest / (filling * THINNEST)) ** (i / (CURVE_POINTS - 1));
    // Along an isentrope: the temperature with the same entropy at this density (entropy rises with temperature).
    if (base !== undefined) t = rootOf((at) => nitrogenEntropy(density, at) - entropy, 70, 1500);
    const p = nitrogenPressure(density, t);
    if (!(p > (pressure[pressure.length - 1] ?? 0))) continue;
    pressure.push(p);
    volumes.push((filling * volume) / density);
  }
  return { pressure, volume: volumes };
}
