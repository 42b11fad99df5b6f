/** Nitrogen charges in a run: the ideal law, and real gas where the charge stands too high for it. */
import type { GasCurve, Transient } from '@oilway/engine';
import { type GasPoint, massAt, realCurve, temperatureAt } from '../fluid/nitrogen.ts';
import type { Assembled } from './assembled.ts';
import { BAR, fromLitres, fromMPa, toLitres, toMPa } from './units.ts';

/** Absolute pressure above which a quick change follows the real gas, and above which any does, Pa. */
const QUICK = 101 * BAR;
const ANY = 151 * BAR;

/** Many runs of one circuit start from the same charge. */
const curves = new WeakMap<Assembled, Map<string, GasCurve>>();

export class Charges {
  readonly #assembled: Assembled;
  /** Mass of gas by accumulator, kg; once a charge is real it stays so, as its ideal base is gone. */
  readonly #mass = new Map<number, number>();

  constructor(assembled: Assembled) {
    this.#assembled = assembled;
  }

  #curve(point: GasPoint, largest: number, n: number): GasCurve {
    let known = curves.get(this.#assembled);
    if (known === undefined) {
      known = new Map();
      curves.set(this.#assembled, known);
    }
    const key = [point.volume, point.pressure, point.temperature, largest, n].map((x) => x.toPrecision(10)).join(' ');
    const there = known.get(key);
    if (there !== undefined) return there;
    const { volumes, pressures } = realCurve(point, largest, n);
    const curve = { pressure: pressures.map(toMPa), volume: volumes.map(toLitres) };
    known.set(key, curve);
    return curve;
  }

  /** From now on n, from where each charge stands. */
  exponent(engine: Transient, n: number): void {
    const states = engine.gas();
    engine.setGasExponent(n);
    this.#assembled.gases.forEach((gas, i) => {
      const state = states[i];
      const filled = state !== undefined && state !== 'empty';
      const point = {
        volume: filled ? gas.volume - fromLitres(state.oil) : gas.volume,
        pressure: filled ? fromMPa(state.pressure) : gas.precharge,
      };
      const known = this.#mass.get(i);
      if (known === undefined && !(point.pressure > ANY || (point.pressure > QUICK && n > 1))) return;
      const temperature = known === undefined ? this.#assembled.oil.temperature : temperatureAt(known, point.volume, point.pressure);
      if (known === undefined) this.#mass.set(i, massAt({ ...point, temperature }));
      engine.setGasCurve(i, this.#curve({ ...point, temperature }, gas.volume, n));
    });
  }
}
