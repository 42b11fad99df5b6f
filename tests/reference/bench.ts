/** Writes small circuits in the notation, has them analysed as the editor and the command do, and reads figures off the study. */
import { analyse } from '@oilway/language';
import { engines } from '../../packages/cli/engines.ts';
import type { ActuatorPoint, Circuit, Point, RequirementResult, StepResult, Study } from '@oilway/circuit';
import { fromSi, unitOf } from '@oilway/quantity';

export interface Bench {
  readonly text: string;
  readonly circuit: Circuit;
  readonly study: Study;
  step(name: string): StepResult;
  /** The first steady point of a step in which the actuator is not at its stop (absent actuator: the first point). */
  point(step: string, actuator?: string): Point;
  actuator(step: string, actuator: string): ActuatorPoint;
  /** Pa gauge, of the net that holds this port (or has this name), at the actuator's moving point of the step. */
  pressure(step: string, place: string, actuator?: string): number;
  /** Pa gauge, highest of the whole step. */
  peak(step: string, place: string): number;
  /** m3/s, magnitude. */
  flow(step: string, port: string, actuator?: string): number;
  /** A point of a machine state's first variant. */
  state(name: string): Point;
  requirement(index: number): RequirementResult;
}

const BENCH_URI = 'file:///bench.oilway';

/** Analyses a circuit; text errors end the test: a bench circuit must be sound. */
export async function bench(text: string): Promise<Bench> {
  const failures: string[] = [];
  const document = analyse([{ uri: BENCH_URI, text }], engines(failures)).documents[0];
  if (document?.failed !== undefined) failures.push(document.failed);
  if (failures.length > 0) throw new Error(failures.join('\n'));
  const broken =
    document?.findings.filter((finding) => finding.severity === 'error' && /^(SYNTAX|NAME|PORT|CHAIN|VALUE|M\d\d)$/.test(finding.code)) ??
    [];
  if (broken.length > 0)
    throw new Error(
      broken.map((finding) => `${finding.code}: ${finding.what} (${text.slice(finding.origin.start, finding.origin.end)})`).join('\n'),
    );
  const { circuit, study } = document ?? {};
  if (circuit === undefined || study === undefined) throw new Error('the circuit was not computed');
  const must = <T>(value: T | undefined, what: string): T => {
    if (value === undefined) throw new Error(`${what}; study says ${JSON.stringify(study.notComputed)}`);
    return value;
  };
  const step = (name: string) =>
    must(
      study.steps.find((one) => one.id === name || one.id.endsWith(`.${name}`)),
      `no step ${name}`,
    );
  const moving = (point: Point, id: string) => point.actuators.some((one) => one.id === id && one.atStop === undefined);
  const point = (name: string, id?: string) =>
    must(
      step(name).points.find((one) => one.solved && (id === undefined || moving(one, id))),
      `no solved point of ${name}`,
    );
  const netOf = (place: string) =>
    must(
      circuit.nets.find(
        (net) => net.name === place || net.id === place || net.ports.some((port) => `${port.component}.${port.port}` === place),
      ),
      `no net ${place}`,
    ).id;
  return {
    text,
    circuit,
    study,
    step,
    point,
    actuator: (name, id) =>
      must(
        point(name, id).actuators.find((one) => one.id === id),
        `no ${id} in ${name}`,
      ),
    pressure: (name, place, id) => must(point(name, id).pressures[netOf(place)], `no pressure at ${place}`),
    peak: (name, place) => must(step(name).peaks[netOf(place)], `no pressure at ${place}`),
    flow: (name, port, id) => Math.abs(must(point(name, id).flows[port], `no flow at ${port}`)),
    state: (name) => must(study.states.find((one) => one.id === name)?.variants[0]?.point, `no state ${name}`),
    requirement: (index) => must(study.requirements[index], `no requirement ${index}`),
  };
}

/** The figure in a unit, unrounded. */
export function inUnits(si: number, unit: string): number {
  const known = unitOf(unit);
  return known === undefined ? si : fromSi(si, known);
}

/** A lossless supply: pump, relief that holds `set` within a hair, oil of 900 kg/m3 (0.9 of water) at 40 degC that hardly gives way. */
export function supply(flow: string, set: string, extra = ''): string {
  return `
fluid F1 (grade 46, temperature 40 degC, density 900 kg/m3, bulk 100 GPa, air 0 %)
reservoir R1 (volume 400 L)
drive M1 (power 500 kW, speed 1000 rpm)
pump P1 (displacement ${flow} / 1000 rpm, driven by M1, volumetric 100 %, mechanical 100 %, rated 700 bar)
relief RV1 (set ${set}, passes 10000 L/min at 1 bar, override 1 %)
suction R1 to P1
working pressure: P1 to RV1${extra}
return RV1 to R1
`;
}

/** A cylinder moved both ways by a lossless 4/3 valve, with one step each way. */
export function bothWays(options: {
  readonly flow: string;
  readonly set: string;
  readonly cylinder: string;
  readonly load?: string;
  readonly more?: string;
}): string {
  return `circuit Bench
${supply(options.flow, options.set, ', V1.P')}
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (${options.cylinder}, attitude level)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T to R1
${options.load === undefined ? '' : `load C1 (${options.load})`}
cycle T {
  step Out energise SOL1 until C1 extended
  step Back energise SOL2 until C1 retracted
}
${options.more ?? ''}
`;
}
