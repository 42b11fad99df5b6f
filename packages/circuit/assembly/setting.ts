/** From a setting in SI to what the engine is asked: parameters, positions, loads, charges. */
import type { ForceTable, GasState, LoadState, SteadyRequest } from '@oilway/engine';
import { pressureWith } from '../fluid/gas.ts';
import type { Assembled, BodyNote, GasNote } from './assembled.ts';
import type { BodyLoad, ForceOverPosition, Setting } from './machine.ts';
import { toKilo, toLitres, toMPa } from './units.ts';

/** Writes all parameters as the setting has them. */
export function applySetting(assembled: Assembled, setting: Setting, parameters: Float64Array): void {
  parameters.set(assembled.parameters);
  for (const apply of assembled.apply) {
    apply(setting, (parameter, value) => {
      parameters[parameter] = value;
    });
  }
}

/** The entry of a record under the body's or any of its actuators' names. */
export function ofBody<T>(record: Readonly<Record<string, T>>, body: BodyNote): T | undefined {
  for (const id of [body.id, ...body.actuators]) if (record[id] !== undefined) return record[id];
  return undefined;
}

/** Floor across closable elements while leakage is counted, L/s/MPa: 0.0006 cm3/min at 100 bar. */
export const LEAKAGE_FLOOR = 1e-9;

const inList = (list: readonly string[] | undefined, body: BodyNote): boolean =>
  list !== undefined && (list.includes(body.id) || body.actuators.some((id) => list.includes(id)));

/** Value of a piecewise linear force; at a jump the side above. */
export function forceAt(table: { readonly at: readonly number[]; readonly force: readonly number[] }, x: number): number {
  const { at, force } = table;
  let i = 0;
  while (i < at.length && (at[i] ?? 0) <= x) i++;
  if (i === 0) return force[0] ?? 0;
  if (i === at.length) return force[at.length - 1] ?? 0;
  const [x0, x1, f0, f1] = [at[i - 1] ?? 0, at[i] ?? 0, force[i - 1] ?? 0, force[i] ?? 0];
  return f0 + ((f1 - f0) * (x - x0)) / (x1 - x0);
}

export function positionOf(body: BodyNote, setting: Setting): number {
  const given = ofBody(setting.positions, body);
  const x = given === undefined || !Number.isFinite(given) ? body.begins : given;
  return body.stroke === Number.POSITIVE_INFINITY ? x : Math.min(Math.max(x, 0), body.stroke);
}

/** Oil in a charge, m3, and its absolute gas pressure, Pa: as stated, else as after filling slowly (isothermal). */
export function chargeIn(gas: GasNote, setting: Setting): { readonly oil: number; readonly pressure: number } {
  const oil = setting.oil[gas.component];
  if (oil === undefined || oil === 'empty' || !(oil > 0)) return { oil: 0, pressure: gas.precharge };
  return { oil, pressure: setting.gasPressures?.[gas.component] ?? pressureWith(gas.volume, gas.precharge, oil, 1) };
}

const kilo = (t: ForceOverPosition): ForceTable => ({ at: t.at, force: t.force.map(toKilo) });
const constant = (newton: number): ForceTable => ({ at: [0], force: [toKilo(newton)] });

/** Loads with seal friction, in the engine's form. */
export function loadState(body: BodyNote, load: BodyLoad | undefined, setting: Setting, x: number): LoadState {
  const fixed = (load?.fixed ?? []).map(kilo);
  const resistOut = (load?.resistOut ?? []).map(kilo);
  const resistIn = (load?.resistIn ?? []).map(kilo);
  let friction = toKilo(load?.friction ?? 0);
  const pushes = setting.sealFriction === 'not with load' ? fixed.reduce((sum, t) => sum + forceAt(t, x), 0) : 0;
  if (Math.abs(pushes) > 1e-3) (pushes > 0 ? resistIn : resistOut).push(constant(body.sealFriction));
  else friction += toKilo(body.sealFriction);
  return { fixed, resistOut, resistIn, friction };
}

export function requestOf(assembled: Assembled, setting: Setting): Omit<SteadyRequest, 'start'> {
  const { bodies } = assembled;
  const positions = bodies.map((b) => positionOf(b, setting));
  const gas = assembled.gases.map((g): GasState => {
    const { oil, pressure } = chargeIn(g, setting);
    return oil > 0 ? { oil: toLitres(oil), pressure: toMPa(pressure) } : 'empty';
  });
  return {
    positions,
    loads: bodies.map((b, i) => loadState(b, ofBody(setting.loads, b), setting, positions[i] ?? 0)),
    locked: bodies.map((b) => inList(setting.locked, b)),
    freeStops: bodies.map((b) => inList(setting.free, b)),
    gas,
    gasExponent: setting.gasExponent ?? 1.4,
    // Where leakage is counted the core's own floor (0.6 cm3/min at 100 bar) must not drown it.
    ...(setting.leakage === true ? { floor: LEAKAGE_FLOOR } : {}),
  };
}
