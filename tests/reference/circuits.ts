/** Which published values a small circuit shows, and where in its study each stands. Figures are SI of their unit's dimension. */
import { type Bench, bothWays, supply } from './bench.ts';
import type { PublishedId } from './published-values.ts';

export interface Shown {
  /** SI (a plain number where the published value is one). */
  read(bench: Bench): number;
  /** Wider than the printed figures, with the reason. */
  readonly within?: readonly [relative: number, why: string];
}
export interface BenchCircuit {
  readonly about: string;
  readonly text: string;
  readonly shows: Partial<Record<PublishedId, Shown>>;
}

const velocity = (step: string, id = 'C1'): Shown => ({ read: (bench) => Math.abs(bench.actuator(step, id).velocity) });
const pressure = (step: string, place: string, id = 'C1'): Shown => ({ read: (bench) => bench.pressure(step, place, id) });
const flow = (step: string, port: string, id = 'C1'): Shown => ({ read: (bench) => bench.flow(step, port, id) });
/** What it would press with, held still. */
const available = (step: string, id = 'C1'): Shown => ({ read: (bench) => Math.abs(bench.actuator(step, id).available ?? Number.NaN) });
const shaft = (bench: Bench): number => bench.state('REST').power.P1 ?? Number.NaN;
const worst = (index: number): Shown => ({ read: (bench) => bench.requirement(index).worst?.value ?? Number.NaN });

/** Work given to the load each second, W. */
const delivered =
  (step: string, id = 'C1') =>
  (bench: Bench): number =>
    Math.abs(bench.actuator(step, id).velocity * bench.actuator(step, id).needed);

/** Diameter of a circle of an area, as an expression of the notation. */
const round = (area: string) => `sqrt(4 * ${area} / 3.14159265358979)`;
const IDEAL = 'seal 0 bar';

/** A motor turned one way by a lossless supply. */
function motor(options: { flow: string; set: string; motor: string; load?: string; more?: string; pump?: string }): string {
  return `circuit Bench
${options.pump ?? supply(options.flow, options.set, ', V1.P')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
motor HM1 (${options.motor})
working V1.A to HM1.A
return HM1.B, V1.T to R1
${options.load === undefined ? '' : `load HM1 (${options.load})`}
cycle T {
  step Turn energise SOL1 for 2 s
}
${options.more ?? ''}
`;
}

/** Cap and rod chambers on the pump while it extends. */
function regeneration(options: { flow: string; set: string; cylinder: string; more?: string }): string {
  return `circuit Bench
${supply(options.flow, options.set, ', V1.P, C1.rod')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (${options.cylinder}, attitude level)
working V1.A to C1.cap
return V1.T to R1
cycle T {
  step Out energise SOL1 until C1 extended
  step Back until C1 retracted
}
${options.more ?? ''}
`;
}

export const CIRCUITS: readonly BenchCircuit[] = [
  {
    about: 'cylinder 2 in / 1 in against 1000 lbf both ways with 20 gpm',
    text: bothWays({
      flow: '20 gpm',
      set: '3000 psi',
      cylinder: `bore 2 in, rod 1 in, stroke 40 in, ${IDEAL}`,
      load: 'resist 1000 lbf',
      more: 'require C1 power in Out at most 20 hp',
    }),
    shows: {
      'cyl-01': pressure('Out', 'C1.cap'),
      'cyl-02': velocity('Out'),
      'cyl-03': pressure('Back', 'C1.rod'),
      'cyl-04': velocity('Back'),
      'cyl-05': worst(0),
    },
  },
  {
    about: 'cylinder 200 mm / 140 mm with 157 L/min at 100 bar; a tenth of the force is lost in its seals',
    text: bothWays({ flow: '157 L/min', set: '100 bar', cylinder: 'bore 200 mm, rod 140 mm, stroke 500 mm, seal 10 bar' }),
    shows: {
      'cyl-06': { read: (bench) => bench.flow('Out', 'C1.cap', 'C1') },
      'cyl-07': flow('Out', 'C1.rod'),
      'cyl-08': velocity('Back'),
      'cyl-09': flow('Back', 'C1.cap'),
      'cyl-10': available('Out'),
    },
  },
  {
    about: 'the bore found for 80 000 lbf at 1600 psi presses with that force',
    text: bothWays({
      flow: '20 gpm',
      set: '1600 psi',
      cylinder: `bore 7.979 in, rod 3 in, stroke 10 in, ${IDEAL}`,
      load: 'resist 80000 lbf extending',
    }),
    shows: {
      'cyl-11': {
        read: (bench) => Math.sqrt((4 * (bench.actuator('Out', 'C1').needed / bench.pressure('Out', 'C1.cap', 'C1'))) / Math.PI),
      },
    },
  },
  {
    about: 'cylinder 100 mm / 70 mm, 40 L/min at 200 bar',
    text: bothWays({ flow: '40 L/min', set: '200 bar', cylinder: `bore 100 mm, rod 70 mm, stroke 500 mm, ${IDEAL}` }),
    shows: { 'cyl-22': available('Out'), 'cyl-23': velocity('Out'), 'cyl-24': flow('Out', 'C1.rod') },
  },
  {
    about: 'the same moving the load of 200 bar',
    text: bothWays({
      flow: '40 L/min',
      set: '300 bar',
      cylinder: `bore 100 mm, rod 70 mm, stroke 500 mm, ${IDEAL}`,
      load: 'resist 157.08 kN extending',
    }),
    shows: { 'cyl-25': { read: delivered('Out') } },
  },
  {
    about: 'regeneration: 25 in2 and 7 in2, 20 gpm at 1000 psi',
    text: regeneration({
      flow: '20 gpm',
      set: '1000 psi',
      cylinder: `bore ${round('25 in2')}, rod ${round('7 in2')}, stroke 20 in, ${IDEAL}`,
    }),
    shows: { 'reg-01': velocity('Out'), 'reg-02': available('Out'), 'reg-03': velocity('Back'), 'reg-04': available('Back') },
  },
  {
    about: 'the same moving the load of 1000 psi',
    text: regeneration({
      flow: '20 gpm',
      set: '2000 psi',
      cylinder: `bore ${round('25 in2')}, rod ${round('7 in2')}, stroke 20 in, ${IDEAL}`,
      more: 'load C1 (resist 7000 lbf extending)',
    }),
    shows: { 'reg-05': { read: delivered('Out') } },
  },
  {
    about: 'regeneration with an area ratio of two: the same speed both ways',
    text: regeneration({
      flow: '20 L/min',
      set: '80 bar',
      cylinder: `bore ${round('4 cm2')}, rod ${round('2 cm2')}, stroke 500 mm, ${IDEAL}`,
    }),
    shows: { 'reg-06': velocity('Out') },
  },
  {
    about: 'meter-out through a needle valve of Cv 0.37 from 3.14 in2 - 0.79 in2 against 1000 lbf, 500 psi at the cap',
    // Cv is the flow in gpm of water at 1 psi: 0.37 gpm at 0.9 psi of this oil, at 90 psi ten times that.
    text: `circuit Bench
${supply('20 gpm', '500 psi', ', V1.P')}
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore ${round('3.14 in2')}, rod ${round('0.79 in2')}, stroke 10 in, ${IDEAL}, attitude level)
throttle FC1 (passes 3.7 gpm at 90 psi)
working V1.A to C1.cap
working C1.rod to FC1 to V1.B
return V1.T to R1
load C1 (resist 1000 lbf)
cycle T {
  step Out energise SOL1 until C1 extended
}
`,
    shows: {
      'int-01': pressure('Out', 'C1.rod'),
      'int-02': {
        // The example asks for the Cv that gives 10 in/s: Cv is in proportion to the speed.
        read: (bench) => (0.37 * 10 * 0.0254) / bench.actuator('Out', 'C1').velocity,
      },
    },
  },
  {
    about: 'the same without a load',
    text: `circuit Bench
${supply('20 gpm', '500 psi', ', V1.P')}
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore ${round('3.14 in2')}, rod ${round('0.79 in2')}, stroke 10 in, ${IDEAL}, attitude level)
throttle FC1 (set 2 gpm, compensated)
working V1.A to C1.cap
working C1.rod to FC1 to V1.B
return V1.T to R1
cycle T {
  step Out energise SOL1 until C1 extended
}
`,
    shows: { 'int-03': pressure('Out', 'C1.rod') },
  },
  ...(
    [
      ['int-04', '3000 psi', `bore 4 in, rod ${round('6.28318530718 in2')}`],
      ['int-07', '2000 psi', 'bore 3 in, rod 2 in'],
    ] as const
  ).map(
    ([id, set, sizes]): BenchCircuit => ({
      about: `rod port blocked, ${set} on the cap`,
      text: `circuit Bench
${supply('5 gpm', set, ', V1.P')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (${sizes}, stroke 10 in, begins 5 in, ${IDEAL}, attitude level)
shutoff BV1 (closed)
working V1.A to C1.cap
working C1.rod to BV1 to R1
return V1.T to R1
cycle T {
  step Push energise SOL1 for 2 s
}
`,
      shows: { [id]: pressure('Push', 'C1.rod') },
    }),
  ),
  {
    about: 'intensifier 5:1 at 500 psi against a cylinder at its stop',
    text: `circuit Bench
${supply('20 gpm', '500 psi', ', V1.P')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
intensifier I1 (ratio 5:1)
cylinder C1 (bore 2 in, stroke 4 in, begins extended, single cap, spring 1 N to 2 N, ${IDEAL}, attitude level)
working V1.A to I1.P
working I1.A to C1.cap
return I1.T, V1.T to R1
cycle T {
  step Push energise SOL1 for 2 s
}
`,
    shows: { 'int-05': { read: (bench) => bench.pressure('Push', 'I1.A'), within: [0.001, 'the relief adds its override'] } },
  },
  ...(
    [
      ['pmp-01', '5 in3/rev', '20 gpm', '1000 psi', '900 lbf.in'],
      ['pmp-03', '100 cm3/rev', '0.0015 m3/s', '70 bar', '120 N.m'],
    ] as const
  ).map(
    ([id, displacement, delivered, pressure, torque]): BenchCircuit => ({
      about: `pump of ${displacement} at 1000 rpm that delivers ${delivered} at ${pressure} for ${torque}`,
      text: `circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement ${displacement}, driven by M1, volumetric ${delivered} / (${displacement} * 1000 rpm), mechanical ${displacement} * ${pressure} / ${torque}, rated ${pressure})
relief RV1 (set ${pressure}, passes 10000 L/min at 1 bar, override 1 %)
suction R1 to P1
working P1 to RV1
return RV1 to R1
`,
      shows: {
        [id]: {
          // Hydraulic power delivered over the power at the shaft.
          read: (bench: Bench): number => {
            const rest = bench.state('REST');
            const outlet = Object.entries(rest.pressures).find(([net]) => net === 'P1.P')?.[1] ?? Number.NaN;
            return (Math.abs(rest.flows['P1.P'] ?? Number.NaN) * outlet) / (rest.power.P1 ?? Number.NaN);
          },
        },
      },
    }),
  ),
  {
    about: 'pump of five pistons of 1.125 in x 1 in',
    text: `circuit Bench\n${supply('5 * 0.78539816 * 1.125 in * 1.125 in * 1 in / 1 rev * 1000 rpm', '100 psi')}`,
    shows: { 'pmp-05': { read: (bench) => Math.abs(bench.state('REST').flows['P1.P'] ?? Number.NaN) / ((1000 * Math.PI) / 30) } },
  },
  {
    about: 'force multiplied five times at 25 psi: 50 lbf on 2 in2 carry 250 lbf on 10 in2',
    text: `circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 10 cm3/rev, driven by M1)
relief RV1 (set 100 psi, passes 10000 L/min at 1 bar)
cylinder C1 (bore ${round('2 in2')}, stroke 10 in, begins 5 in, ${IDEAL}, attitude level)
cylinder C2 (bore ${round('10 in2')}, stroke 10 in, begins 5 in, ${IDEAL}, attitude level)
directional V1 (2/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
suction R1 to P1
working P1 to RV1
return RV1 to R1
working C1.cap to V1 to C2.cap
load C1 (inward 50 lbf)
load C2 (inward 240 lbf)
cycle T {
  step Push energise SOL1 for 0.2 s
}
`,
    shows: { 'cyl-16': available('Push', 'C2') },
  },
  {
    about: 'pump over its relief at 2000 psi',
    text: `circuit Bench\n${supply('5 gpm', '2000 psi')}`,
    shows: { 'pow-01': { read: shaft } },
  },
  {
    about: 'pump over its relief at 13 793 kPa',
    text: `circuit Bench\n${supply('18.9 L/min', '13793 kPa')}`,
    shows: { 'pow-02': { read: shaft } },
  },
  {
    about: 'loss over a relief at 1000 psi and 20 gpm',
    text: `circuit Bench\n${supply('20 gpm', '1000 psi')}\nrequire RV1 power in REST at most 20 hp\n`,
    shows: { 'pow-05': worst(0) },
  },
  {
    about: 'loss over an unloading valve at 25 psi and 20 gpm, held open by a second pump',
    text: `circuit Bench
fluid F1 (grade 46, temperature 40 degC, density 900 kg/m3)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 20 gpm / 1000 rpm, driven by M1, volumetric 100 %)
pump P2 (displacement 2 gpm / 1000 rpm, driven by M1, volumetric 100 %)
relief RV2 (set 1000 psi, passes 20 gpm at 50 psi)
unloading UV1 (set 200 psi, passes 20 gpm at 25 psi)
suction R1 to P1, P2
working P1 to UV1
working high: P2 to RV2
pilot high to UV1.X
return UV1, RV2 to R1
require UV1 power in REST at most 5 hp
`,
    shows: { 'pow-06': worst(0) },
  },
  {
    about: 'pump of 5 in3 a revolution at 1000 psi, 1000 rpm',
    text: `circuit Bench\n${supply('5 in3/rev * 1000 rpm', '1000 psi')}`,
    shows: { 'pmp-02': { read: (bench) => shaft(bench) / ((1000 * Math.PI) / 30) } },
  },
  {
    about: 'pump of 100 cm3 a revolution at 70 bar, 1000 rpm',
    text: `circuit Bench\n${supply('100 cm3/rev * 1000 rpm', '70 bar')}`,
    shows: { 'pmp-04': { read: (bench) => shaft(bench) / ((1000 * Math.PI) / 30) } },
  },
  {
    about: 'motor that turns 5.83 hp at 500 rpm',
    text: motor({
      flow: '5 gpm',
      set: '2000 psi',
      motor: 'displacement 5 gpm / 500 rpm, volumetric 100 %, mechanical 100 %',
      load: 'resist 61.27 lbf.ft',
    }),
    shows: { 'pow-07': available('Turn', 'HM1') },
  },
  {
    about: 'motor of 82 cm3 a revolution, 0.6 L/s at 70 bar',
    text: motor({
      flow: '0.6 L/s',
      set: '70 bar',
      motor: 'displacement 82 cm3/rev, volumetric 100 %, mechanical 100 %',
      load: 'resist 91 N.m',
    }),
    shows: {
      'mot-01': velocity('Turn', 'HM1'),
      'mot-02': available('Turn', 'HM1'),
      'mot-03': { read: delivered('Turn', 'HM1'), within: [0.006, 'turned against 91 N.m, not the 91.4 N.m at which it would stand'] },
    },
  },
  {
    about: 'motor of 164 cm3 a revolution, 0.006 m3/s, 91.2 % and 93.0 %',
    text: motor({
      flow: '0.006 m3/s',
      set: '90 bar',
      motor: 'displacement 164 cm3/rev, volumetric 91.2 %, mechanical 93.0 %, fastest 2000 rpm, rated 70 bar',
      load: 'resist 170 N.m',
    }),
    shows: {
      'mot-06': {
        read: (bench) => delivered('Turn', 'HM1')(bench) / (bench.pressure('Turn', 'HM1.A', 'HM1') * bench.flow('Turn', 'HM1.A', 'HM1')),
      },
    },
  },
  {
    about: 'motor of 164 cm3 a revolution at 2000 rpm against 170 N.m',
    text: motor({
      flow: '164 cm3/rev * 2000 rpm',
      set: '100 bar',
      motor: 'displacement 164 cm3/rev, volumetric 100 %, mechanical 100 %',
      load: 'resist 170 N.m',
      more: 'require HM1 power in Turn at most 100 kW',
    }),
    shows: { 'mot-07': worst(0) },
  },
  {
    about: 'motor of 0.5 in3 a revolution at 2000 psi',
    text: motor({
      flow: '5 gpm',
      set: '2000 psi',
      motor: 'displacement 0.5 in3/rev, volumetric 100 %, mechanical 100 %',
      load: 'resist 150 lbf.in',
    }),
    shows: { 'mot-08': available('Turn', 'HM1') },
  },
  {
    about: 'motor of 2 in3 a revolution with 7.5 gpm',
    text: motor({
      flow: '7.5 gpm',
      set: '2000 psi',
      motor: 'displacement 2 in3/rev, volumetric 100 %, mechanical 100 %',
      load: 'resist 150 lbf.in',
    }),
    shows: { 'mot-09': { ...velocity('Turn', 'HM1'), within: [1e-4, 'the lossless valve and the closed relief still take a trace'] } },
  },
  {
    about: 'hydrostatic drive: pump 82 cm3 at 500 rpm and 82 %, motor 92 % and 90 %, 70 bar',
    text: motor({
      flow: '',
      set: '',
      pump: `
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 500 rpm)
pump P1 (displacement 82 cm3/rev, driven by M1, volumetric 82 %, rated 70 bar)
relief RV1 (set 200 bar, passes 1000 L/min at 1 bar)
suction R1 to P1
working pressure: P1 to RV1, V1.P
return RV1 to R1
`,
      motor: 'displacement 77.3 cm3/rev, volumetric 92 %, mechanical 90 %, fastest 400 rpm, rated 70 bar',
      load: 'resist 77.5 N.m',
    }),
    shows: {
      'hst-01': { read: (bench) => (77.3e-6 / (2 * Math.PI)) * (bench.actuator('Turn', 'HM1').velocity / ((400 * Math.PI) / 30)) },
      'hst-02': {
        // The torque that stands against 70 bar: in proportion to the pressure found.
        read: (bench) => bench.actuator('Turn', 'HM1').needed * (70e5 / bench.pressure('Turn', 'HM1.A', 'HM1')),
      },
    },
  },
  {
    about: 'whole line: pump 10 in3 at 94 %, 50 ft of 1.040 in pipe with two elbows and a check, 20 ft up, motor 8 in3 at 500 psi and 90 %',
    // The return falls 20 ft back to the reservoir, 7.8 psi: with 507.8 psi over it the motor has 500 psi at its inlet. The check's K of 4 at 40.7 gpm in 1.040 in: 4 x 900/2 x (4.69 m/s)^2 = 0.396 bar.
    text: `circuit Bench
fluid F1 (grade 125, temperature 40 degC, density 900 kg/m3)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 10 in3/rev, driven by M1, volumetric 94 %, rated 569 psi)
relief RV1 (set 2000 psi, passes 1000 L/min at 1 bar)
check CV1 (crack 0 bar, passes 40.7 gpm at 0.396 bar)
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms, elevation 20 ft)
motor HM1 (displacement 8 in3/rev, volumetric 90 %, mechanical 100 %, fastest 1057 rpm, rated 500 psi, elevation 20 ft)
suction R1 to P1
working P1 to CV1
working P1.P to RV1
working CV1 to V1.P (tube, bore 1.040 in, length 50 ft, bends 2)
working V1.A to HM1.A
return HM1.B, V1.T, RV1 to R1
load HM1 (resist 507.8 psi * 8 in3/rev)
cycle T {
  step Turn energise SOL1 for 2 s
}
`,
    shows: {
      'sys-01': flow('Turn', 'P1.P', 'HM1'),
      'sys-02': pressure('Turn', 'P1.P', 'HM1'),
      'sys-03': velocity('Turn', 'HM1'),
    },
  },
];
