/**
 * What a nitrogen charge holds and gives as a real gas (Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361). Absolute pressures in Pa,
 * volumes in m3, temperatures in K.
 */
import { nitrogenDensity, nitrogenEntropy, nitrogenPressure } from '@oilway/engine';

/** kg/m3 at Pa and K. */
const densityAt = (p: number, t: number): number => nitrogenDensity(p * 1e-6, t);

/** Oil in a charge of gas volume `volume` and precharge p0 at pressure p, filled slowly at t. */
export const realOilAt = (volume: number, p0: number, p: number, t: number): number =>
  p <= p0 ? 0 : volume * (1 - densityAt(p0, t) / densityAt(p, t));

/** Precharge at another gas temperature: constant volume. */
export const realPrechargeAt = (p0: number, t0: number, t: number): number => nitrogenPressure(densityAt(p0, t0), t) * 1e6;

/** Root of a rising function between two positive bounds, to 1e-10: false position, halving the end that stays (Illinois). */
function rising(from: number, to: number, excess: (x: number) => number): number {
  let [low, high] = [from, to];
  let [atLow, atHigh] = [excess(low), excess(high)];
  if (atLow >= 0) return low;
  if (atHigh <= 0) return high;
  let last = 0;
  for (let i = 0; i < 100 && high - low > 1e-10 * high; i++) {
    const guess = low - (atLow * (high - low)) / (atHigh - atLow);
    const x = i % 8 === 7 ? (low + high) / 2 : guess;
    const at = excess(x);
    if (Math.abs(at) < 1e-12) return x;
    if (at < 0) {
      if (last < 0) atHigh /= 2;
      [low, atLow, last] = [x, at, -1];
    } else {
      if (last > 0) atLow /= 2;
      [high, atHigh, last] = [x, at, 1];
    }
  }
  return (low + high) / 2;
}

/** Temperature at which nitrogen of this density (kg/m3) has this entropy (J/(mol K)). */
const temperatureOf = (density: number, entropy: number): number => rising(70, 1200, (t) => nitrogenEntropy(density, t) - entropy);

/** The same from a near guess: secant steps, the bracket only where they fail. */
function temperatureNear(density: number, entropy: number, guess: number): number {
  let [t0, t1] = [guess, guess * 1.01];
  let s0 = nitrogenEntropy(density, t0) - entropy;
  for (let i = 0; i < 8; i++) {
    const s1 = nitrogenEntropy(density, t1) - entropy;
    if (Math.abs(s1) < 1e-9) return t1;
    const next = t1 - (s1 * (t1 - t0)) / (s1 - s0);
    if (!(next > 70 && next < 1200)) break;
    [t0, s0, t1] = [t1, s1, next];
    if (Math.abs(t1 - t0) < 1e-9 * t1) return t1;
  }
  return temperatureOf(density, entropy);
}

/**
 * Oil given quickly (no heat exchanged) between pressures `from` and `to`, after filling slowly to `from` at t; and the gas temperature at the end.
 */
export function realYield(
  volume: number,
  p0: number,
  from: number,
  to: number,
  t: number,
): { readonly oil: number; readonly temperature: number } {
  const filled = densityAt(from, t);
  const entropy = nitrogenEntropy(filled, t);
  // Along the isentrope pressure rises with density.
  const density = rising(1e-2, filled, (d) => nitrogenPressure(d, temperatureOf(d, entropy)) * 1e6 - to);
  const gas = (volume * densityAt(p0, t)) / filled;
  return { oil: gas * (filled / density - 1), temperature: temperatureOf(density, entropy) };
}

/** A charge at one instant. */
export interface GasPoint {
  /** Gas volume, m3. */
  readonly volume: number;
  /** Pa absolute */
  readonly pressure: number;
  /** K */
  readonly temperature: number;
}

const POINTS = 24;
/** Density beyond which the equation is not asked, kg/m3. */
const DENSEST = 850;

/**
 * Pressure over gas volume through a point, for a heat exchange given as a polytropic exponent: 1.4 none (isentrope), 1 full (isotherm of the
 * point), between them in proportion of log p. Volumes from `largest` down, m3; pressures Pa absolute, rising.
 */
export function realCurve(
  point: GasPoint,
  largest: number,
  n: number,
): { readonly volumes: readonly number[]; readonly pressures: readonly number[] } {
  const share = Math.min(1, Math.max(0, (n - 1) / 0.4));
  const density = densityAt(point.pressure, point.temperature);
  const mass = density * point.volume;
  const entropy = nitrogenEntropy(density, point.temperature);
  const smallest = Math.max(mass / DENSEST, 0.3 * Math.min(point.volume, largest));
  const volumes: number[] = [];
  const pressures: number[] = [];
  let t = point.temperature;
  let before = largest;
  for (let i = 0; i < POINTS; i++) {
    const volume = largest * (smallest / largest) ** (i / (POINTS - 1));
    const d = mass / volume;
    const slow = nitrogenPressure(d, point.temperature);
    if (share > 0)
      t = temperatureNear(d, entropy, i === 0 ? point.temperature * (point.volume / volume) ** 0.4 : t * (before / volume) ** 0.4);
    before = volume;
    const quick = share === 0 ? slow : nitrogenPressure(d, t);
    volumes.push(volume);
    pressures.push(Math.exp(share * Math.log(quick) + (1 - share) * Math.log(slow)) * 1e6);
  }
  return { volumes, pressures };
}

/** Temperature of a charge of this mass (kg) at a volume and pressure. */
export function temperatureAt(mass: number, volume: number, pressure: number): number {
  return rising(70, 1200, (t) => nitrogenPressure(mass / volume, t) * 1e6 - pressure);
}
/** Mass of the gas at a point, kg. */
export const massAt = (point: GasPoint): number => densityAt(point.pressure, point.temperature) * point.volume;
