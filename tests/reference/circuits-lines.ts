/** Published values of pipes and oil: velocities, Reynolds numbers, losses, friction factors, viscosities. */
import type { Bench } from './bench.ts';
import type { BenchCircuit, Shown } from './circuits.ts';
import { lineFigures } from './hover.ts';
import type { PublishedId } from './published-values.ts';

/** A pump that sends `flow` through one pipe to the reservoir. */
export function pipe(options: { readonly flow: string; readonly fluid: string; readonly line: string }): string {
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
export const loss = (bench: Bench): number => {
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
export const viscosity: Shown = {
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

/** Darcy friction factor from the loss over a length, m, at a velocity, m/s. */
export const friction = (bore: number, velocity: number, length = 10, within?: Shown['within']): Shown => ({
  read: (bench) => (loss(bench) * 2 * bore) / (length * 900 * velocity ** 2),
  ...(within === undefined ? {} : { within }),
});
const CHURCHILL: Shown['within'] = [0.03, 'the product uses Churchill (1977), an explicit form that keeps to Colebrook within 3 %'];

interface Rough {
  readonly id: PublishedId;
  readonly reynolds: number;
  /** m; with it goes the relative roughness: hose is 0.02 mm rough, tube 0.0015 mm. */
  readonly bore: number;
  readonly kind: 'hose' | 'tube';
  /** mm2/s: the velocity follows from the Reynolds number. */
  readonly grade: number;
  /** m */
  readonly length?: number;
  readonly within?: Shown['within'];
}
/** 500 mm tube is smooth: relative roughness 3e-6. */
const SMOOTH = { bore: 0.5, kind: 'tube', length: 100 } as const;
const rough: readonly Rough[] = [
  {
    id: 'fri-col-5000-0.001',
    reynolds: 5e3,
    bore: 0.02,
    kind: 'hose',
    grade: 10,
    within: [0.06, 'transition: Churchill lies up to 6 % off Colebrook at a Reynolds number of 5000'],
  },
  { id: 'fri-col-10000-0.001', reynolds: 1e4, bore: 0.02, kind: 'hose', grade: 10, within: CHURCHILL },
  { id: 'fri-col-100000-0.001', reynolds: 1e5, bore: 0.02, kind: 'hose', grade: 10, within: CHURCHILL },
  { id: 'fri-col-1e+06-0.001', reynolds: 1e6, bore: 0.02, kind: 'hose', grade: 1, within: CHURCHILL },
  {
    id: 'fri-col-5000-0.01',
    reynolds: 5e3,
    bore: 0.002,
    kind: 'hose',
    grade: 1,
    within: [0.06, 'transition: Churchill lies up to 6 % off Colebrook at a Reynolds number of 5000'],
  },
  { id: 'fri-col-10000-0.01', reynolds: 1e4, bore: 0.002, kind: 'hose', grade: 1, within: CHURCHILL },
  { id: 'fri-col-100000-0.01', reynolds: 1e5, bore: 0.002, kind: 'hose', grade: 1, length: 1, within: CHURCHILL },
  { id: 'fri-chu-10000-0.001', reynolds: 1e4, bore: 0.02, kind: 'hose', grade: 10 },
  { id: 'fri-chu-100000-0.0001', reynolds: 1e5, bore: 0.2, kind: 'hose', grade: 10 },
  { id: 'fri-chu-2000-0', reynolds: 2e3, ...SMOOTH, grade: 1000 },
  { id: 'fri-chu-3000-0', reynolds: 3e3, ...SMOOTH, grade: 1000 },
  { id: 'fri-chu-4000-0', reynolds: 4e3, ...SMOOTH, grade: 1000 },
  { id: 'fri-chu-10000-0', reynolds: 1e4, ...SMOOTH, grade: 1000, within: [5e-4, 'tube is not quite smooth'] },
  { id: 'fri-chu-100000-0', reynolds: 1e5, ...SMOOTH, grade: 100, within: [2e-3, 'tube is not quite smooth'] },
  { id: 'fri-10', reynolds: 1e4, ...SMOOTH, grade: 1000, within: CHURCHILL },
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
  ...rough.map(({ id, reynolds, bore, kind, grade, length = 10, within }): BenchCircuit => {
    const velocity = (reynolds * grade * 1e-6) / bore;
    return {
      about: `friction in a ${kind} of ${bore * 1000} mm at a Reynolds number of ${reynolds} (${id})`,
      text: pipe({
        flow: `${velocity} m/s * ${(Math.PI / 4) * bore ** 2 * 1e6} mm2`,
        fluid: `grade ${grade}, temperature 40 degC, density 900 kg/m3`,
        line: `${kind}, bore ${bore * 1000} mm, length ${length} m`,
      }),
      shows: { [id]: friction(bore, velocity, length, within) },
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
