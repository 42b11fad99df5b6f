/** Published values of pipes and oil: velocities, Reynolds numbers, losses, friction factors, viscosities. */
import type { Bench } from './bench.ts';
import type { BenchCircuit, Shown } from './circuits.ts';
import { lineFigures } from './hover.ts';
import type { PublishedId } from './published-values.ts';

/** A pump that sends `flow` through one pipe to the reservoir. */
function pipe(options: { readonly flow: string; readonly fluid: string; readonly line: string }): string {
  return `circuit Bench
fluid F1 (${options.fluid})
reservoir R1 (volume 400 L)
drive M1 (power 500 kW, speed 1000 rpm)
pump P1 (displacement ${options.flow} / 1000 rpm, driven by M1, volumetric 100 %, mechanical 100 %, rated 700 bar)
relief RV1 (set 690 bar, passes 10000 L/min at 1 bar)
gauge G1 (range 0 bar to 1000 bar)
suction R1 to P1
working P1.P to RV1
working P1 to G1 (${options.line})
return G1.P to R1
return RV1 to R1
`;
}

/** Loss of the pipe, Pa. The far end lies at the reservoir. */
const loss = (bench: Bench): number => {
  const point = bench.state('REST');
  const net = bench.circuit.nets.find((one) => one.ports.some((port) => port.component === 'P1' && port.port === 'P'));
  const far = bench.circuit.nets.find((one) => one.ports.some((port) => port.component === 'G1'));
  return (point.pressures[net?.id ?? ''] ?? Number.NaN) - (point.pressures[far?.id ?? ''] ?? Number.NaN);
};

/** Velocity that hover shows for the pipe, m/s (shown to 0.01 m/s). */
const velocityOf = (bench: Bench): number => lineFigures(bench, 'working P1 to G1', 'REST').velocity;

const OIL = 'grade 46, temperature 40 degC, density 900 kg/m3';

/** The bore asked for is the one at which the velocity allowed is just reached. */
const boreAt = (bore: number, allowed: number): Shown => ({ read: (bench) => bore * Math.sqrt(velocityOf(bench) / allowed) });

const velocities: readonly (readonly [PublishedId, string, string, number, number])[] = [
  ['vel-01', '30 gpm', '0.783 in', 0.783 * 0.0254, 20 * 0.3048],
  ['vel-02', '120 L/min', '20.4 mm', 0.0204, 6.1],
  ['vel-04', '20 L/min', '29 mm', 0.029, 0.5],
  ['vel-05', '20 L/min', '17 mm', 0.017, 1.5],
  ['vel-06', '20 L/min', '15 mm', 0.015, 2],
  ['vel-07', '20 L/min', '7 mm', 0.007, 10],
];

const kelvin = (celsius: string) => `temperature ${celsius} degC`;

/** Kinematic viscosity, m2/s, from the laminar loss of a 10 mm pipe of 10 m at 2 L/min (Hagen-Poiseuille). */
const viscosity: Shown = {
  read: (bench) => (loss(bench) * Math.PI * 0.01 ** 4) / (128 * 900 * 10 * (2e-3 / 60)),
};
const oils: readonly (readonly [PublishedId, grade: string, celsius: string, index?: string])[] = [
  ['vis-vg15-100', '15', '100'],
  ['vis-vg22-100', '22', '100'],
  ['vis-vg32-100', '32', '100'],
  ['vis-vg46-100', '46', '100'],
  ['vis-vg68-100', '68', '100'],
  ['vis-vg100-100', '100', '100'],
  ['vis-vg150-100', '150', '100'],
  ['vis-vg32-20C', '32', '20'],
  ['vis-vg32-50C', '32', '50'],
  ['vis-vg46-0C', '46', '0'],
  ['vis-vg46-20C', '46', '20'],
  ['vis-vg46-50C', '46', '50'],
  ['vis-vg46-60C', '46', '60'],
  ['vis-vg46-80C', '46', '80'],
  ['vis-vg68-20C', '68', '20'],
  ['vis-vg68-50C', '68', '50'],
  ['vis-vg68-60C', '68', '60'],
  // 5.4 mm2/s at 100 degC of a grade 32 oil is a viscosity index of 102.
  ['vis-03', '32', '80', '102'],
];

/** Darcy friction factor from the loss over 10 m at a velocity, m/s. */
const friction = (bore: number, velocity: number, within?: Shown['within']): Shown => ({
  read: (bench) => (loss(bench) * 2 * bore) / (10 * 900 * velocity ** 2),
  ...(within === undefined ? {} : { within }),
});
const CHURCHILL: Shown['within'] = [0.03, 'the product uses Churchill (1977), an explicit form that keeps to Colebrook within 3 %'];

/**
 * A pipe at a Reynolds number with a relative roughness: hose is 0.02 mm rough, tube 0.0015 mm. The viscosity is 10 mm2/s, so the velocity follows from
 * the Reynolds number; the bore from the roughness.
 */
const rough: readonly (readonly [PublishedId, reynolds: number, bore: number, kind: 'hose' | 'tube', within?: Shown['within']])[] = [
  ['fri-col-5000-0.001', 5e3, 0.02, 'hose', [0.06, 'transition: Churchill lies up to 6 % below Colebrook at a Reynolds number of 5000']],
  ['fri-col-10000-0.001', 1e4, 0.02, 'hose', CHURCHILL],
  ['fri-col-100000-0.001', 1e5, 0.02, 'hose', CHURCHILL],
  ['fri-col-5000-0.01', 5e3, 0.002, 'hose', [0.06, 'transition: Churchill lies up to 6 % off Colebrook at a Reynolds number of 5000']],
  ['fri-col-10000-0.01', 1e4, 0.002, 'hose', CHURCHILL],
  ['fri-chu-10000-0.001', 1e4, 0.02, 'hose'],
  ['fri-chu-100000-0.0001', 1e5, 0.2, 'hose'],
];

export const LINE_CIRCUITS: readonly BenchCircuit[] = [
  ...velocities.map(
    ([id, flow, bore, metres, allowed]): BenchCircuit => ({
      about: `${flow} through ${bore}`,
      text: pipe({ flow, fluid: OIL, line: `tube, bore ${bore}, length 1 m` }),
      shows: { [id]: boreAt(metres, allowed) },
    }),
  ),
  {
    about: '53.9 gpm through 1 in schedule 40 pipe',
    text: pipe({ flow: '53.9 gpm', fluid: OIL, line: 'tube, bore 1.049 in, length 1 m' }),
    shows: {
      // Flow in proportion to velocity: at exactly 20 ft/s.
      'vel-08': { read: (bench) => (lineFigures(bench, 'working P1 to G1', 'REST').flow * 20 * 0.3048) / velocityOf(bench) },
    },
  },
  {
    about: 'oil of 1000 mm2/s at 5 m/s through 50 m of 50 mm',
    text: pipe({
      flow: '5 m/s * 1963.4954 mm2',
      fluid: 'grade 1000, temperature 40 degC, density 900 kg/m3',
      line: 'tube, bore 50 mm, length 50 m',
    }),
    shows: {
      'fri-01': { read: (bench) => lineFigures(bench, 'working P1 to G1', 'REST').reynolds },
      'fri-03': { read: (bench) => loss(bench) / (900 * 9.80665) },
    },
  },
  {
    about: 'oil of 100 mm2/s at 10 ft/s through 100 ft of 1 in',
    text: pipe({
      flow: '10 ft/s * 0.785398 in2',
      fluid: 'grade 100, temperature 40 degC, density 900 kg/m3',
      line: 'tube, bore 1 in, length 100 ft',
    }),
    shows: { 'fri-02': { read: loss } },
  },
  {
    about: 'water of 1.133 mm2/s, 0.2 ft3/s through 200 ft of 2 in',
    text: pipe({
      flow: '0.2 ft3/s',
      // A viscosity that hardly changes between 40 and 100 degC is no oil; only the value at 40 degC is used.
      fluid: 'grade 1.133, index 100, temperature 40 degC, density 62.36 lb/ft3',
      line: 'tube, bore 2 in, length 200 ft',
    }),
    shows: { 'fri-08': { read: loss } },
  },
  {
    about: 'laminar friction at a Reynolds number of 500',
    text: pipe({
      flow: '0.5 m/s * 78.5398163 mm2',
      fluid: 'grade 10, temperature 40 degC, density 900 kg/m3',
      line: 'tube, bore 10 mm, length 10 m',
    }),
    shows: { 'fri-chu-500-0': friction(0.01, 0.5) },
  },
  ...rough.map(([id, reynolds, bore, kind, within]): BenchCircuit => {
    // The grade that makes the loss of a 10 m pipe stay within what a pump can give.
    const grade = bore < 0.01 ? 1 : 10;
    const velocity = (reynolds * grade * 1e-6) / bore;
    return {
      about: `friction in a ${kind} of ${bore * 1000} mm at a Reynolds number of ${reynolds}`,
      text: pipe({
        flow: `${velocity} m/s * ${(Math.PI / 4) * bore ** 2 * 1e6} mm2`,
        fluid: `grade ${grade}, temperature 40 degC, density 900 kg/m3`,
        line: `${kind}, bore ${bore * 1000} mm, length 10 m`,
      }),
      shows: { [id]: friction(bore, velocity, within) },
    };
  }),
  ...oils.map(
    ([id, grade, celsius, index = '100']): BenchCircuit => ({
      about: `grade ${grade}, index ${index} at ${celsius} degC`,
      text: pipe({
        flow: '2 L/min',
        fluid: `grade ${grade}, index ${index}, ${kelvin(celsius)}, density 900 kg/m3`,
        line: 'tube, bore 10 mm, length 10 m',
      }),
      shows: { [id]: viscosity },
    }),
  ),
];
