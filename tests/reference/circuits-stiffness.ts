/** Published stiffness of oil, with and without air, worked back from how far a piston gives against trapped oil. */
import { type Bench, supply } from './bench.ts';
import type { PublishedId } from './published-values.ts';

/** Oil that 1000 mm of a through-rod cylinder trap: its annulus, m2, and what besides the stroke takes part: 5 % of the chamber dead, 0.2 L of net. */
const AREA = (Math.PI / 4) * (0.2 ** 2 - 0.05 ** 2);
const TRAPPED = 1.05 * AREA * 1 + 0.2e-3;
const ATMOSPHERE = 101325;

/** `marks`: gauge pressures of the trapped oil, bar, at which a pressure switch turns, so that the run has a sample there. */
function pressed(pressure: string, bulk: string, air: string, marks: readonly number[] = []): string {
  return `circuit Bench
${supply('20 L/min', pressure, ', V1.P').replace('bulk 100 GPa, air 0 %', `bulk ${bulk}, air ${air}`)}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore 200 mm, rod 50 mm, through, stroke 1000 mm, begins 0 mm, seal 0 bar, attitude level)
shutoff BV1 (closed)
working V1.A to C1.cap
working C1.rod to BV1 to R1
${marks.map((bar, i) => `switch PS${i} (rises ${bar.toFixed(6)} bar, falls 1 bar)\nworking C1.rod to PS${i}\n`).join('')}return V1.T to R1
cycle T {
  step Push energise SOL1 for 12 s
}
`;
}

/** Pressure of the trapped oil, Pa absolute, and what is left of its volume, m3: at the end of the run, or when a pressure switch turned. */
function end(bench: Bench, turned?: string): { readonly pressure: number; readonly volume: number } {
  const run = bench.study.cycles[0]?.run;
  const time = run?.events.find((event) => event.words === `${turned} on`)?.time ?? Number.NaN;
  const at = turned === undefined ? (run?.times.length ?? 0) - 1 : (run?.times.findIndex((one) => one >= time - 1e-9) ?? -1);
  const net = bench.circuit.nets.find((one) => one.ports.some(({ component, port }) => component === 'C1' && port === 'rod'));
  const position = run?.positions.C1?.[at] ?? Number.NaN;
  return { pressure: (run?.pressures[net?.id ?? '']?.[at] ?? Number.NaN) + ATMOSPHERE, volume: TRAPPED - AREA * position };
}

export const STIFFNESS: readonly {
  readonly id: PublishedId;
  readonly circuits: readonly string[];
  /** SI */
  readonly read: (benches: readonly Bench[]) => number;
}[] = [
  { id: 'blk-01', circuits: [pressed('1000 psi', '350000 psi', '0 %')], read: ([bench]) => 1 - end(bench as Bench).volume / TRAPPED },
  // Tangent stiffness at a pressure, bar absolute: dp over dV/V between two pressures about it, passed in one run.
  ...(
    [
      ['blk-air-0.01-50', 0.01, 50],
      ['blk-air-0.01-100', 0.01, 100],
      ['blk-air-0.05-50', 0.05, 50],
      ['blk-air-0.05-100', 0.05, 100],
      ['blk-air-0.005-50', 0.005, 50],
    ] as const
  ).map(([id, air, absolute]) => ({
    id,
    circuits: [
      pressed(
        `${absolute * 1.2} bar`,
        '1.5 GPa',
        `${air * 100} %`,
        [0.97, 1.03].map((share) => absolute * share - 1.01325),
      ),
    ],
    read: ([bench]: readonly Bench[]) => {
      const [low, high] = [end(bench as Bench, 'PS0'), end(bench as Bench, 'PS1')];
      return (high.pressure - low.pressure) / Math.log(low.volume / high.volume);
    },
  })),
];
