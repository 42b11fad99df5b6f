/** Gas charges: pressure from oil volume and back. Ideal p V^n = const from a base point, or a tabulated real gas. */
import type { GasCurve, GasSpec } from './network.ts';
import type { GasState } from './results.ts';

export const GAS_EXPONENT = 1.4;

/** Absolute pressure (MPa) at a gas volume (L) on a tabulated curve; between points log p is linear in log V, ends run on with the last slope. */
export function curvePressure(curve: GasCurve, volume: number): number {
  const { pressure, volume: volumes } = curve;
  const i = segment(volumes.length, (k) => volumes[k]! > volume);
  const a = Math.log(volumes[i]!);
  const b = Math.log(volumes[i + 1]!);
  const share = (Math.log(volume) - a) / (b - a);
  return Math.exp(Math.log(pressure[i]!) * (1 - share) + Math.log(pressure[i + 1]!) * share);
}

/** Gas volume (L) at an absolute pressure (MPa), and dV/dp, on a tabulated curve. */
export function curveVolume(curve: GasCurve, absolute: number): { volume: number; slope: number } {
  const { pressure, volume: volumes } = curve;
  const i = segment(pressure.length, (k) => pressure[k]! < absolute);
  const a = Math.log(pressure[i]!);
  const b = Math.log(pressure[i + 1]!);
  const n = (Math.log(volumes[i + 1]!) - Math.log(volumes[i]!)) / (b - a);
  const volume = Math.exp(Math.log(volumes[i]!) + n * (Math.log(absolute) - a));
  return { volume, slope: (n * volume) / absolute };
}

function segment(count: number, before: (k: number) => boolean): number {
  let i = 0;
  while (i < count - 2 && before(i + 1)) i++;
  return i;
}

/** Absolute pressure (MPa) of a charge holding `oil` (L), by p0 (V0/(V0 - oil))^n or its curve. Oil is kept below 99.9 % of the volume. */
export function gasPressure(spec: GasSpec, oil: number, exponent = GAS_EXPONENT): number {
  const volume = Math.max(spec.volume - oil, 1e-3 * spec.volume);
  return spec.curve ? curvePressure(spec.curve, volume) : spec.precharge * (spec.volume / volume) ** exponent;
}

/** Oil (L) in a charge at an absolute pressure (MPa); 0 where the gas fills it. */
export function gasOil(spec: GasSpec, absolute: number, exponent = GAS_EXPONENT): number {
  if (absolute <= spec.precharge) return 0;
  return (
    spec.volume - (spec.curve ? curveVolume(spec.curve, absolute).volume : spec.volume * (spec.precharge / absolute) ** (1 / exponent))
  );
}

/** Oil and absolute pressure of a stated charge; undefined when it holds no oil. */
export function chargeOf(spec: GasSpec, state: GasState | undefined, exponent: number): { oil: number; pressure: number } | undefined {
  if (state === undefined || state === 'empty') return undefined;
  const oil = typeof state === 'number' ? state : state.oil;
  if (!(oil > 0)) return undefined;
  return { oil, pressure: typeof state === 'number' ? gasPressure(spec, oil, exponent) : state.pressure };
}
