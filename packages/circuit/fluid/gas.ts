/** Nitrogen charge of an accumulator. Ideal gas, absolute pressures in Pa, volumes in m3, temperatures in K. */
import { ATMOSPHERE } from './density.ts';

/** Precharge pressure, Pa absolute, at another gas temperature: constant volume, p/T constant. `gauge` in Pa at `t0` K. */
export const prechargeAt = (gauge: number, t0: number, t: number): number => ((gauge + ATMOSPHERE) * t) / t0;

/** Oil held at the absolute pressure p: V0 (1 - (p0/p)^(1/n)); none below precharge. */
export const oilAt = (volume: number, p0: number, p: number, n: number): number => (p <= p0 ? 0 : volume * (1 - (p0 / p) ** (1 / n)));

/** Absolute pressure with this much oil in. */
export const pressureWith = (volume: number, p0: number, oil: number, n: number): number =>
  p0 * (volume / Math.max(volume - oil, volume * 1e-6)) ** n;
