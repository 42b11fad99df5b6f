/** What an accumulator takes in during a run it gives back: energy of the gas by the closed form, oil by the flow at its port, and the balance of the pump. */
import { study } from '@oilway/circuit';
import { describe, expect, it } from 'vitest';
import { circuitOf } from '../support/text.ts';

const TEXT = `circuit Bench
fluid HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 100 L)
drive M1 (power 15 kW, speed 1450 rpm)
pump P1 (displacement 16 cm3/rev, driven by M1, volumetric 100 %, mechanical 100 %)
relief RV1 (set 180 bar, passes 40 L/min at 4 bar)
directional V1 (2/2, normally closed, coil SOL1, passes 60 L/min at 5 bar)
throttle OR1 (orifice 4 mm)
accumulator AC1 (volume 10 L, precharge 50 bar at 45 degC, bladder, gas nitrogen)
switch PS1 (rises 110 bar, falls 60 bar)
suction R1 to P1
working pressure: P1 to RV1, V1.P, AC1, PS1
working V1.A to OR1
return OR1, RV1 to R1
cycle Go repeat {
  step Fill until PS1 on, at most 30 s
  step Empty energise SOL1 until PS1 off, at most 30 s
}
`;
const ATMOSPHERE = 101325;
const VOLUME = 10e-3;

describe('an accumulator filled and emptied by turns', () => {
  const result = study(circuitOf(TEXT));
  const cycle = result.cycles[0]!;
  const run = cycle.run!;
  const [oil, pressure, flow] = [run.oil.AC1!, run.pressures.pressure!, run.flows['AC1.P']!];
  const spans = run.steps.map(({ from, to }) => ({
    // Inside the step, off the moments in which a valve shifts: there the line's own stiffness still stirs.
    at: run.times
      .map((time, index) => ({ time, index }))
      .filter(({ time }) => time > from + 0.1 && time < to - 0.01)
      .map(({ index }) => index),
  }));

  it('comes to an end that repeats', () => {
    expect(cycle.faults).toEqual([]);
    expect(cycle.settled).toBe(true);
    expect(spans.map((one) => one.at.length > 2)).toEqual([true, true]);
  });
  it('takes up energy as its gas is pressed together: (p2 V2 - p1 V1) / (n - 1) less the air it pushes aside, n = 1.4', () => {
    // Adiabatic work of an ideal gas (any textbook of thermodynamics); within a minute of filling the gas exponent is 1.4.
    for (const { at } of spans) {
      const [first, last] = [at[0]!, at.at(-1)!];
      const absolute = (i: number): number => pressure[i]! + ATMOSPHERE;
      const gas = (i: number): number => VOLUME - oil[i]!;
      expect(Math.abs(oil[last]! - oil[first]!)).toBeGreaterThan(0.5e-3);
      const closed = (absolute(last) * gas(last) - absolute(first) * gas(first)) / 0.4 - ATMOSPHERE * (oil[last]! - oil[first]!);
      let given = 0;
      let litres = 0;
      for (let k = 0; k + 1 < at.length; k += 1) {
        const [i, j] = [at[k]!, at[k + 1]!];
        given += ((pressure[i]! + pressure[j]!) / 2) * (oil[j]! - oil[i]!);
        litres += ((flow[i]! + flow[j]!) / 2) * (run.times[j]! - run.times[i]!);
      }
      // Trapezoids over the kept samples: the curve bends by less than 1 % of itself between two of them.
      expect(Math.abs(given - closed)).toBeLessThan(0.01 * Math.abs(closed));
      expect(Math.abs(litres - (oil[last]! - oil[first]!))).toBeLessThan(0.01 * Math.abs(litres));
    }
  });
  it('while it fills, all the pump gives goes into it; over a whole turn, all of it becomes heat', () => {
    const { at } = spans[0]!;
    let [shaft, stored] = [0, 0];
    for (let k = 0; k + 1 < at.length; k += 1) {
      const [i, j] = [at[k]!, at[k + 1]!];
      shaft += ((run.power.M1![i]! + run.power.M1![j]!) / 2) * (run.times[j]! - run.times[i]!);
      stored += ((pressure[i]! + pressure[j]!) / 2) * (oil[j]! - oil[i]!);
    }
    // The oil in the line takes a little: 0.1 L of it in 14000 bar.
    expect(Math.abs(shaft - stored)).toBeLessThan(0.01 * shaft);
    // No load: what the shaft takes is heat. Stored energy is the same at both ends of a settled turn, to 0.5 % of the volume.
    expect(cycle.work).toBe(0);
    expect(Math.abs(cycle.heat! - cycle.duty.M1!.mean)).toBeLessThan(1e-9 * cycle.heat!);
    expect(Math.abs(oil.at(-1)! - oil[0]!)).toBeLessThan(0.005 * VOLUME);
  });
});
