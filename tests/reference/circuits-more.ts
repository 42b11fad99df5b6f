/** Circuits that show published values of oils, pipes, orifices, cylinders in a row, heat. */
import type { Bench } from './bench.ts';
import { supply } from './bench.ts';
import type { BenchCircuit } from './circuits.ts';
import { friction, loss, pipe, viscosity } from './circuits-lines.ts';
import { fluidViscosity } from './hover.ts';
import { type GradeId, MIDPOINTS } from './published-more.ts';
import type { PublishedId } from './published-values.ts';

const round = (area: string) => `sqrt(4 * ${area} / 3.14159265358979)`;
const IDEAL = 'seal 0 bar';
const GPM = (231 * 0.0254 ** 3) / 60;
const PSI = 6894.757293168;
const HP = 745.6998715822702;
/** m2/s to mm2/s */
const MM2 = 1e6;

/** A pipe whose friction factor is read; hose is 0.02 mm rough, tube 0.0015 mm: the bore, m, gives the relative roughness. */
const pipeAt = (reynolds: number, bore: number, nu: number, kind: 'hose' | 'tube', length: number) => {
  const velocity = (reynolds * nu * 1e-6) / bore;
  return {
    velocity,
    text: pipe({
      flow: `${velocity} m/s * ${(Math.PI / 4) * bore ** 2 * 1e6} mm2`,
      fluid: `grade ${nu}, temperature 40 degC, density 900 kg/m3`,
      line: `${kind}, bore ${bore * 1000} mm, length ${length} m`,
    }),
  };
};
const frictions = (
  [
    ['fri-04', 1548, 0.02, 10, 'hose', 10],
    // Relative roughness 0.0023, 4.2e-5, 0.01.
    ['fri-06', 60000, 2e-5 / 0.0023, 1, 'hose', 10],
    ['fri-07', 126400, 1.5e-6 / 4.2e-5, 1, 'tube', 10],
    ['fri-col-1e+06-0.01', 1e6, 0.002, 0.1, 'hose', 0.1],
  ] as const
).map(([id, reynolds, bore, nu, kind, length]): BenchCircuit => {
  const { velocity, text } = pipeAt(reynolds, bore, nu, kind, length);
  return { about: `friction at a Reynolds number of ${reynolds} (${id})`, text, shows: { [id]: friction(bore, velocity, length) } };
});

/** White's pipe of cast iron, 0.26 mm rough, as a hose 0.02 mm rough: every length of it smaller in that proportion, Reynolds number and velocity kept. */
const SMALLER = 0.02 / 0.26;
const ironVelocity = 0.2 / ((Math.PI / 4) * 0.2 ** 2);
const ironReynolds = (ironVelocity * 0.2) / 1e-5;
const iron = pipeAt(ironReynolds, 0.2 * SMALLER, 10 * SMALLER, 'hose', 500 * SMALLER);

/** A pump that sends `flow` through one throttle. */
const through = (flow: string, throttle: string): string => `circuit Bench
${supply(flow, '3000 psi', ', FC1.in')}
throttle FC1 (${throttle})
return FC1.out to R1
`;
const drop = (bench: Bench): number => {
  const net = bench.circuit.nets.find((one) => one.ports.some(({ component, port }) => component === 'P1' && port === 'P'));
  return bench.state('REST').pressures[net?.id ?? ''] ?? Number.NaN;
};
const shaft = (bench: Bench): number => bench.state('REST').power.P1 ?? Number.NaN;
const delivered = (bench: Bench): number => Math.abs(bench.state('REST').flows['P1.P'] ?? Number.NaN);

/** A drive that turns a motor; steady heat of the cycle, W. */
const heat = (bench: Bench): number => Object.entries(bench.study.heat).find(([id]) => id.startsWith('T'))?.[1].heat ?? Number.NaN;

export const MORE_CIRCUITS: readonly BenchCircuit[] = [
  ...(Object.keys(MIDPOINTS) as unknown as (keyof typeof MIDPOINTS)[]).map((grade): BenchCircuit => {
    const id: GradeId = `vg-${grade}`;
    return {
      about: `oil of ISO VG ${grade} at 40 degC`,
      text: pipe({ flow: '1 L/min', fluid: `grade ${grade}, temperature 40 degC`, line: 'tube, bore 20 mm, length 1 m' }),
      shows: { [id]: { read: fluidViscosity, within: [1e-12, 'binary rounding of a decimal figure'] } },
    };
  }),
  ...frictions,
  {
    about: "White's pipe of cast iron in proportion",
    text: iron.text,
    shows: { 'fri-09': { read: (bench) => loss(bench) / (900 * 9.80665) } },
  },
  {
    about: 'orifice of 1 in with a coefficient of 0.8 at 100 psi: as wide as 0.62 needs to pass the same',
    text: through('252 gpm', `orifice 1 in * sqrt(0.8 / 0.62)`),
    // Flow goes with the root of the drop: at exactly 100 psi.
    shows: { 'ori-01': { read: (bench) => delivered(bench) * Math.sqrt((100 * PSI) / drop(bench)) } },
  },
  {
    about: 'throttle of Cv 2.37 with 25 gpm of 0.9 of the density of water',
    // Cv is the flow in gpm of water at 1 psi: of this oil 2.37 gpm at 0.9 psi, at 90 psi ten times that.
    text: through('25 gpm', 'passes 23.7 gpm at 90 psi'),
    // The Cv asked for is the one that drops 100 psi; Cv goes with one over the root of the drop.
    shows: { 'ori-02': { read: (bench) => 2.37 * Math.sqrt(drop(bench) / (100 * PSI)) } },
  },
  {
    about: 'throttle of 3.43 L/min at 1 kPa of water with 94.8 L/min of 0.9 of its density',
    text: through('94.8 L/min', 'passes 34.3 L/min at 90 kPa'),
    shows: { 'ori-03': { read: (bench) => 3.43 * Math.sqrt(drop(bench) / 687e3) } },
  },
  {
    about: 'power of 1 bar and 600 L/min, and the constant between psi, gpm and hp',
    text: `circuit Bench\n${supply('600 L/min', '1 bar')}`,
    shows: {
      'pow-03': { read: (bench) => ((drop(bench) / PSI) * (delivered(bench) / GPM)) / (shaft(bench) / HP) },
      // At exactly 1 bar and 600 L/min.
      'pow-04': { read: (bench) => shaft(bench) * (1e5 / drop(bench)) * (0.01 / delivered(bench)) },
    },
  },
  {
    about: '40 lbf on 4 in2 hold 800 lbf on 80 in2',
    text: `circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 10 cm3/rev, driven by M1)
relief RV1 (set 100 psi, passes 10000 L/min at 1 bar)
cylinder C1 (bore ${round('4 in2')}, stroke 10 in, begins 5 in, ${IDEAL}, attitude level)
cylinder C2 (bore ${round('80 in2')}, stroke 10 in, begins 5 in, ${IDEAL}, attitude level)
directional V1 (2/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
suction R1 to P1
working P1 to RV1
return RV1 to R1
working C1.cap to V1 to C2.cap
load C1 (inward 40 lbf)
load C2 (inward 780 lbf)
cycle T {
  step Push energise SOL1 for 0.2 s
}
`,
    // 80 in2 press with the force found: the area that presses with 800 lbf.
    shows: {
      'cyl-17': { read: (bench) => (80 * 0.0254 ** 2 * 800 * 4.4482216152605) / (bench.actuator('Push', 'C2').available ?? Number.NaN) },
    },
  },
  {
    about: 'a cylinder that displaces 4 in2 on its rod side drives one of 80 in2',
    text: `circuit Bench
${supply('20 gpm', '1000 psi', ', V1.P')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore ${round('8 in2')}, rod ${round('4 in2')}, stroke 250 in, ${IDEAL}, attitude level)
cylinder C2 (bore ${round('80 in2')}, stroke 20 in, single cap, ${IDEAL}, attitude level)
working V1.A to C1.cap
working C1.rod to C2.cap
return V1.T to R1
load C2 (resist 800 lbf extending)
cycle T {
  step Out energise SOL1 for 2 s
}
`,
    // 10 in of the large one take as many times the way of the small one as their speeds differ.
    shows: { 'cyl-18': { read: (bench) => (10 * 0.0254 * bench.actuator('Out', 'C1').velocity) / bench.actuator('Out', 'C2').velocity } },
  },
  {
    about: '8 hp into the pump, 5 hp out of the motor, four hours long',
    text: `circuit Bench
${supply('10 gpm', '3000 psi', ', V1.P').replace('mechanical 100 %', 'mechanical 62.5 %')}
directional V1 (3/2, normally open, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
motor HM1 (displacement 10 gpm / 500 rpm, volumetric 100 %, mechanical 100 %)
working V1.A to HM1.A
return HM1.B, V1.T to R1
load HM1 (resist 5 hp / 500 rpm)
cycle T {
  step Turn for 20 s
}
`,
    shows: {
      'hea-01': {
        read: (bench) => heat(bench) * 4 * 3600,
        within: [3e-4, 'the example takes 2544 Btu/h a horsepower (2544.43), and the run includes the start'],
      },
    },
  },
  {
    about: '20 gpm at 1000 psi by a pump of 85 %: half over the relief, a tenth of that loss in the lines, the rest does work',
    // At 10 gpm a tenth of the relief's loss is a drop of 100 psi: the flow control takes it, the motor has 900 psi.
    text: `circuit Bench
${supply('20 gpm', '1000 psi', ', V1.P').replace('mechanical 100 %', 'mechanical 85 %')}
directional V1 (3/2, normally open, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
throttle FC1 (set 10 gpm, compensated)
motor HM1 (displacement 10 gpm / 500 rpm, volumetric 100 %, mechanical 100 %)
working V1.A to FC1 to HM1.A
return HM1.B, V1.T to R1
load HM1 (resist 900 psi * 10 gpm / 500 rpm)
cycle T {
  step Turn for 20 s
}
`,
    shows: { 'hea-05': { read: heat } },
  },
];

/** Grade at which an oil of this index has `target` mm2/s at 100 degC, from two grades on either side. */
const between =
  (low: number, high: number, target: number) =>
  ([a, b]: readonly Bench[]): number => {
    const [x, y] = [viscosity.read(a as Bench) * MM2, viscosity.read(b as Bench) * MM2];
    return low + ((high - low) * (target - x)) / (y - x);
  };
const hot = (grade: number, index: number): string =>
  pipe({
    flow: '2 L/min',
    fluid: `grade ${grade}, index ${index}, temperature 100 degC, density 900 kg/m3`,
    line: 'tube, bore 10 mm, length 10 m',
  });

/** Figures worked back from two circuits. SI. */
export const COMPARED_CIRCUITS: readonly {
  readonly id: PublishedId;
  readonly circuits: readonly string[];
  readonly read: (benches: readonly Bench[]) => number;
}[] = [
  // The index, rounded to a whole number as the standard does, at which the oil has the viscosity of the example at 100 degC.
  ...(
    [
      ['vis-04', 73.3, 8.86, 92],
      ['vis-05', 22.83, 5.05, 156],
      ['vis-06', 53.47, 7.8, 111],
    ] as const
  ).map(([id, at40, at100, index]) => ({
    id,
    circuits: [hot(at40, index - 2), hot(at40, index + 2)],
    read: (benches: readonly Bench[]) => Math.round(between(index - 2, index + 2, at100)(benches)),
  })),
  // The viscosity at 40 degC of the oil of index 0, and 100, that has 8.86 mm2/s at 100 degC.
  { id: 'vis-07', circuits: [hot(119, 0), hot(121, 0)], read: (benches) => between(119, 121, 8.86)(benches) / MM2 },
  { id: 'vis-08', circuits: [hot(69, 100), hot(70, 100)], read: (benches) => between(69, 70, 8.86)(benches) / MM2 },
];
