/** Published values of charges: what an accumulator holds at rest and gives between two pressures of a run. */
import { explain } from '@oilway/circuit';
import { type Bench, supply } from './bench.ts';
import type { PublishedId } from './published-values.ts';

const GALLON = 231 * 0.0254 ** 3;

/** An accumulator on a pump that its relief holds at `pressure`. */
function charged(accumulator: string, pressure: string, temperature: string): string {
  return `circuit Bench
fluid F1 (grade 46, temperature ${temperature})
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 10 cm3/rev, driven by M1, volumetric 100 %)
relief RV1 (set ${pressure}, passes 10000 L/min at 1 bar, override 1 %)
accumulator ACC1 (bladder, ${accumulator}, gas nitrogen)
suction R1 to P1
working P1 to RV1, ACC1
return RV1 to R1
`;
}

/** m3 of oil in the accumulator at rest, charged to its relief. */
const oil = (bench: Bench): number => {
  const variant = bench.study.states.find((one) => one.id === 'REST')?.variants.find((one) => one.accumulators === 'charged');
  return variant?.point.oil.ACC1 ?? Number.NaN;
};

/** A run that fills to `high`, the relief's pressure, and gives down to `low`, where a switch ends the step. */
function given(accumulator: string, low: string, high: string): string {
  return `circuit Bench
${supply('40 L/min', high, ', V1.P').replace('40 degC', '20 degC')}
directional V1 (2/2, normally closed, coil a SOL1, passes 6000 L/min at 1 bar, takes 1 ms)
throttle FC1 (set 20 L/min, compensated)
accumulator ACC1 (bladder, ${accumulator} at 20 degC, gas nitrogen)
switch PS1 (rises ${high} * 0.99, falls ${low})
working V1.A to FC1.in, ACC1, PS1
return FC1.out to R1
cycle T {
  step Fill energise SOL1 for 400 s
  step Give until PS1 off
}
`;
}

/** An accumulator charged slowly to 200 bar that pushes, within a minute (no heat gets in), a load that needs 100 bar. */
const PUSHES = `circuit Bench
fluid F1 (grade 46, temperature 20 degC, density 900 kg/m3, bulk 100 GPa, air 0 %)
reservoir R1 (volume 400 L)
relief RV1 (set 200 bar, passes 10000 L/min at 1 bar, override 1 %)
throttle FC1 (set 4 L/min, compensated)
accumulator ACC1 (bladder, volume 10 L, precharge 90 bar at 20 degC, gas nitrogen)
cylinder C1 (bore 50 mm, stroke 2000 mm, single cap, seal 0 bar, attitude level)
working ACC1 to FC1.in, RV1
working FC1.out to C1.cap
return RV1 to R1
load C1 (inward 100 bar * 3.14159265358979 / 4 * 50 mm * 50 mm)
require C1 drift in REST at most 2 m for 45 s
`;

/** Oil between the lowest and highest pressure of the run, m3, filled slowly. */
const between =
  (gas: 'ideal gas' | 'real nitrogen') =>
  (bench: Bench): number =>
    explain(bench.circuit, bench.study, { of: 'accumulator', id: 'ACC1', cycle: 'T' }).find((one) => one.name === `oil, ${gas}`)?.value ??
    Number.NaN;

/** Figures of accumulators: each compares circuits, or works back from one. */
export const ACCUMULATORS: readonly {
  readonly id: PublishedId;
  readonly circuits: readonly string[];
  /** SI */
  readonly read: (benches: readonly Bench[]) => number;
}[] = [
  {
    id: 'acc-01',
    // The volume asked for, in proportion to the 5 gal that a bottle of 20 gal is found to give.
    circuits: [given('volume 20 gal, precharge 1500 psi', '2000 psi', '3000 psi')],
    read: ([run]) => (20 * 5 * GALLON * GALLON) / between('ideal gas')(run as Bench),
  },
  {
    id: 'acc-06',
    circuits: [given('volume 10 L, precharge 90 bar', '100 bar', '200 bar')],
    read: ([run]) => between('ideal gas')(run as Bench),
  },
  {
    id: 'acc-08',
    circuits: [given('volume 10 L, precharge 90 bar', '100 bar', '200 bar')],
    read: ([run]) => between('real nitrogen')(run as Bench),
  },
  {
    id: 'acc-09',
    circuits: [PUSHES],
    // Drift counts from the end of the first second; in that the flow control let 4 L/min pass.
    read: ([run]) => ((run as Bench).requirement(0).worst?.value ?? Number.NaN) * (Math.PI / 4) * 0.05 ** 2 + (4e-3 / 60) * 1,
  },
  {
    id: 'acc-10',
    // At 120 bar the gas has the share of its volume that its precharge is of the pressure (both absolute).
    circuits: [charged('volume 10 L, precharge 90 bar at 20 degC', '120 bar', '50 degC')],
    read: ([warm]) => (1 - oil(warm as Bench) / 0.01) * (120e5 + 101325) - 101325,
  },
  {
    id: 'acc-11',
    // The precharge at 50 degC, between two on either side, that holds as much oil at 200 bar as 90 bar filled at 20 degC.
    circuits: ['90 bar at 20 degC', '100 bar at 50 degC', '102 bar at 50 degC'].map((precharge) =>
      charged(`volume 10 L, precharge ${precharge}`, '200 bar', '50 degC'),
    ),
    read: (benches) => {
      const [cold, low, high] = benches.map(oil) as [number, number, number];
      return (100 + (2 * (low - cold)) / (low - high)) * 1e5;
    },
  },
];
