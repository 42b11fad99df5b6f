/** Published values of orifices, valves, accumulators, heat and times of strokes. */
import { bothWays, supply } from './bench.ts';
import type { BenchCircuit, Shown } from './circuits.ts';

const IDEAL = 'seal 0 bar';
const round = (area: string) => `sqrt(4 * ${area} / 3.14159265358979)`;
const time = (step: string): Shown => ({
  read: (bench) => bench.step(step).time ?? Number.NaN,
  within: [0.004, 'the run includes the shifting of the valve and the compression of the oil'],
});
const available = (step: string, id = 'C1'): Shown => ({ read: (bench) => Math.abs(bench.actuator(step, id).available ?? Number.NaN) });

/** A plunger that sinks through a holding valve whose pilot has its own supply of `pilot` bar. */
function lowering(options: { readonly valve: string; readonly load: string; readonly pilot: string; readonly back?: string }): string {
  return `circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 2 cm3/rev, driven by M1, volumetric 100 %)
relief RV1 (set ${options.pilot}, passes 10000 L/min at 1 bar, override 1 %)
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
${options.valve}
cylinder C1 (bore ${round('100 cm2')}, stroke 2000 mm, begins extended, ${IDEAL}, attitude level)
suction R1 to P1
working P1 to RV1, V1.P
pilot V1.A to H1.X
working H1.C to C1.cap
return H1.V to ${options.back === undefined ? 'R1' : 'CV1 to R1'}
return RV1, V1.T to R1
${options.back ?? ''}
load C1 (inward ${options.load})
cycle T {
  step Down energise SOL1 for 1 s
}
`;
}

export const VALVE_CIRCUITS: readonly BenchCircuit[] = [
  {
    about: 'meter-in through Cv 1 at 1400 psi against 4000 lbf on 3.14 in2',
    // Cv 1 passes 1 gpm of water at 1 psi, so 10 gpm of oil of 0.9 of its density at 90 psi.
    text: `circuit Bench
${supply('40 gpm', '1400 psi', ', V1.P')}
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore ${round('3.14 in2')}, rod 0.5 in, stroke 40 in, ${IDEAL}, attitude level)
throttle FC1 (passes 10 gpm at 90 psi)
working V1.A to FC1 to C1.cap
working C1.rod to V1.B
return V1.T to R1
load C1 (resist 4000 lbf extending)
cycle T {
  step Out energise SOL1 until C1 extended
}
`,
    shows: { 'ori-04': { read: (bench) => bench.actuator('Out', 'C1').velocity } },
  },
  {
    about: 'orifice of 2 mm at 50 bar',
    text: `circuit Bench
fluid F1 (grade 46, temperature 40 degC, density 870 kg/m3)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 40 cm3/rev, driven by M1, volumetric 100 %)
relief RV1 (set 50 bar, passes 10000 L/min at 1 bar, override 0.1 %)
throttle FC1 (orifice 2 mm)
suction R1 to P1
working P1 to RV1, FC1
return FC1, RV1 to R1
`,
    shows: { 'ori-05': { read: (bench) => Math.abs(bench.state('REST').flows['FC1.in'] ?? Number.NaN) } },
  },
  {
    about: 'high-low unit: rapid advance against 100 psi in the supply and 50 psi in the return',
    text: `circuit Bench
${supply('9 gpm', '3000 psi', ', V1.P')}
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 6000 L/min at 0.1 bar, takes 1 ms)
throttle FC1 (passes 9 gpm at 100 psi)
throttle FC2 (passes 8 gpm at 50 psi)
cylinder C1 (bore 1.5 in, rod 0.5 in, stroke 40 in, ${IDEAL}, attitude level)
working V1.A to FC1 to C1.cap
working C1.rod to FC2 to V1.B
return V1.T to R1
cycle T {
  step Out energise SOL1 until C1 extended
}
`,
    shows: { 'hl-01': { read: (bench) => 1.5 * bench.pressure('Out', 'P1.P', 'C1') } },
  },
  {
    about: 'high-low unit: punching 2000 lbf with a bore of 1.5 in',
    text: bothWays({
      flow: '2 gpm',
      set: '3000 psi',
      cylinder: `bore 1.5 in, rod 0.5 in, stroke 10 in, ${IDEAL}`,
      load: 'resist 2000 lbf extending',
    }),
    shows: { 'hl-02': { read: (bench) => 1.5 * bench.pressure('Out', 'C1.cap', 'C1') } },
  },
  {
    about: 'cylinder 2.5 in / 1 in, 24 in, 2.3 gpm at 400 psi',
    text: bothWays({ flow: '2.3 gpm', set: '400 psi', cylinder: `bore 2.5 in, rod 1 in, stroke 24 in, ${IDEAL}` }),
    shows: { 'oo-01': time('Out'), 'oo-02': time('Back'), 'oo-04': available('Out') },
  },
  ...(
    [
      ['oo-03', 'oo-05', '2.3 gpm', '400 psi', 'bore 2.5 in, rod 1 in, stroke 24 in'],
      ['oo-07', undefined, '1.8 gpm', '500 psi', 'bore 3 in, rod 1.25 in, stroke 16 in'],
    ] as const
  ).map(
    ([seconds, force, flow, set, sizes]): BenchCircuit => ({
      about: `regenerative stroke, ${sizes}`,
      text: `circuit Bench
${supply(flow, set, ', V1.P, C1.rod')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (${sizes}, ${IDEAL}, attitude level)
working V1.A to C1.cap
return V1.T to R1
cycle T {
  step Out energise SOL1 until C1 extended
}
`,
      shows: { [seconds]: time('Out'), ...(force === undefined ? {} : { [force]: available('Out') }) },
    }),
  ),
  {
    about: 'cylinder 3 in, 16 in, 1.8 gpm',
    text: bothWays({ flow: '1.8 gpm', set: '500 psi', cylinder: `bore 3 in, rod 1.25 in, stroke 16 in, ${IDEAL}` }),
    shows: { 'oo-06': time('Out') },
  },
  {
    about: 'counterbalance set 195 bar, ratio 3, under 150 bar: opened by its pilot from 15 bar on',
    text: lowering({ valve: 'counterbalance H1 (set 195 bar, ratio 3:1, passes 200 L/min at 5 bar)', load: '150 kN', pilot: '15.4 bar' }),
    shows: {
      'cbv-01': {
        // The opening grows over a band of a tenth of the setting from the pilot pressure that just opens it.
        read: (bench) => bench.pressure('Down', 'H1.X', 'C1') - ((bench.point('Down', 'C1').openings.H1 ?? Number.NaN) * 19.5e5) / 3,
        within: [0.01, 'the pilot has its own relief, which holds it to 0.1 bar'],
      },
    },
  },
  {
    about: 'pilot-operated check valve of ratio 3 under 120 bar, 5 bar behind it',
    text: lowering({
      valve: 'pilotcheck H1 (ratio 3:1, crack 0 bar, passes 200 L/min at 5 bar)',
      load: '120 kN',
      pilot: '43.8 bar',
      back: 'check CV1 (crack 5 bar, passes 1000 L/min at 5.5 bar)',
    }),
    shows: {
      'po-01': {
        // Opening over 5 bar; the oil that then flows lifts the 5 bar behind it a little.
        read: (bench) => {
          const behind = bench.pressure('Down', 'H1.V', 'C1') - 5e5;
          const opening = bench.point('Down', 'C1').openings.H1 ?? Number.NaN;
          return bench.pressure('Down', 'H1.X', 'C1') - (opening * 5e5) / 3 - (behind * 2) / 3;
        },
        within: [0.01, 'the pilot has its own relief, which holds it to 0.1 bar'],
      },
    },
  },
  {
    about: 'oil settles at 158.33 degF: 1.25 hp, 15 ft2, 75 degF around',
    // The example takes 14.45 W/m2K (0.001 hp/ft2/degF), the product 12: the surface makes up for it.
    text: `circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 400 L, surface 15 ft2 * 14.45 / 12, ambient 75 degF)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 1.25 hp / 100 bar / 1000 rpm, driven by M1, volumetric 100 %, mechanical 100 %)
relief RV1 (set 100 bar, passes 10000 L/min at 1 bar, override 1 %)
suction R1 to P1
working P1 to RV1
return RV1 to R1
require R1 temperature in REST at most 200 degF
`,
    shows: {
      'hea-07': { read: (bench) => bench.requirement(0).worst?.value ?? Number.NaN, within: [0.001, 'the relief adds its override'] },
    },
  },
];
