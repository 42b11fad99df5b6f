/** Workings on demand: every figure of a component at a point, of a cycle, of the oil, each with formula, inputs, sources. Solves nothing. */
import { oilOf } from '../../fluid/oil.ts';
import type { Circuit, Component } from '../../model/circuit.ts';
import { si } from '../read.ts';
import type { CycleResult, Figure, Point, StepResult, Study } from '../study.ts';
import { cylinderForce, cylinderSpeed, margin, motorSpeed, motorTorque, outputPower } from './actuators.ts';
import { storedBetween } from './gas.ts';
import type { Reader } from './inputs.ts';
import { driveOf, pumpFlow, shaftPower } from './pumps.ts';
import { drop, lossPower, metered, orificeFlow, reliefPressure } from './valves.ts';

export interface Explained extends Figure {
  /** "force", "speed", "drop", "shaft power". */
  readonly name: string;
}

export type ExplainRequest =
  /** All figures of a component at a point of the study. */
  | { readonly of: 'component'; readonly id: string; readonly point: Point }
  /** Loading of a drive over a cycle. */
  | { readonly of: 'loading'; readonly drive: string; readonly cycle: string }
  /** Steady oil temperature by the key of `Study.heat`. */
  | { readonly of: 'temperature'; readonly place: string }
  /** Oil of an accumulator between the lowest and highest pressure of a cycle: ideal gas and real nitrogen. */
  | { readonly of: 'accumulator'; readonly id: string; readonly cycle: string }
  /** Mean speed and time of a step. */
  | { readonly of: 'step'; readonly id: string };

export function explain(circuit: Circuit, study: Study, request: ExplainRequest): readonly Explained[] {
  switch (request.of) {
    case 'component': {
      const component = circuit.components.find((one) => one.id === request.id);
      return component ? componentFigures(circuit, component, request.point) : [];
    }
    case 'loading': {
      const drive = circuit.components.find((one) => one.id === request.drive);
      const cycle = study.cycles.find((one) => one.id === request.cycle);
      return drive && cycle ? loading(drive, cycle) : [];
    }
    case 'temperature': {
      const found = study.heat[request.place];
      return found ? [{ name: 'oil temperature', ...found.temperature }] : [];
    }
    case 'accumulator': {
      const accumulator = circuit.components.find((one) => one.id === request.id);
      const run = study.cycles.find((one) => one.id === request.cycle)?.run;
      const net = circuit.nets.find((one) => one.ports.some((port) => port.component === request.id && port.port === 'P'));
      const pressures = net ? run?.pressures[net.id] : undefined;
      if (!accumulator || !pressures || pressures.length === 0) return [];
      const found = storedBetween(accumulator, Math.min(...pressures), Math.max(...pressures), oilOf(circuit).oil.temperature);
      return found
        ? [
            { name: 'oil, ideal gas', ...found.ideal },
            { name: 'oil, real nitrogen', ...found.real },
          ]
        : [];
    }
    case 'step': {
      const step = study.steps.find((one) => one.id === request.id);
      const cycle = study.cycles.find((one) => one.id === step?.cycle);
      return step ? stepFigures(circuit, step, cycle) : [];
    }
  }
}

/** Pressures at a component's own height need `heads`; a circuit on one level needs none. */
export function readerOf(circuit: Circuit, point: Point): Reader {
  const nets = new Map<string, string>();
  for (const net of circuit.nets)
    for (const port of net.ports) if (!nets.has(`${port.component}.${port.port}`)) nets.set(`${port.component}.${port.port}`, net.id);
  return {
    point,
    pressure(component, port) {
      const net = nets.get(`${component}.${port}`);
      return net === undefined || point.undetermined[net] !== undefined ? undefined : point.pressures[net];
    },
    flow: (component, port) => point.flows[`${component}.${port}`],
  };
}

function componentFigures(circuit: Circuit, component: Component, point: Point): readonly Explained[] {
  const read = readerOf(circuit, point);
  const found: Explained[] = [];
  const add = (name: string, figure: Figure | undefined) => {
    if (figure) found.push({ name, ...figure });
  };
  const ports = circuit.nets.flatMap((net) => net.ports.filter((one) => one.component === component.id).map((one) => one.port));
  switch (component.kind) {
    case 'cylinder':
      add('force', cylinderForce(component, read));
      add('speed', cylinderSpeed(component, read));
      add('margin', margin(component, read));
      add('power', outputPower(component, read));
      break;
    case 'motor':
    case 'rotary':
      add('torque', motorTorque(component, read));
      add('speed', motorSpeed(component, read));
      add('margin', margin(component, read));
      add('power', outputPower(component, read));
      break;
    case 'pump': {
      const drive = driveOf(component, circuit.components);
      add('flow', pumpFlow(component, drive, read));
      add('shaft power', shaftPower(component, drive, read));
      break;
    }
    case 'relief':
      add('pressure', reliefPressure(component, read));
      add('loss', lossPower(component, read, ['P', 'T']));
      break;
    case 'throttle':
      add(
        'flow',
        metered(component, read) ??
          orificeFlow(
            component,
            circuit.components.find((one) => one.kind === 'fluid'),
            read,
          ),
      );
      add('drop', drop(component, circuit, read));
      add('loss', lossPower(component, read, ports));
      break;
    default:
      add('drop', drop(component, circuit, read));
      if (!['switch', 'sensor', 'gauge', 'accumulator', 'brake'].includes(component.kind)) add('loss', lossPower(component, read, ports));
  }
  return found;
}

function loading(drive: Component, cycle: CycleResult): readonly Explained[] {
  const duty = cycle.duty[drive.id];
  const power = si(drive, 'power');
  if (!duty || power === undefined || !(power > 0)) return [];
  const peak = si(drive, 'peak');
  const byRms = duty.rms / power;
  const byPeak = duty.highest / (power * (peak ?? 1));
  const rms = byRms >= byPeak;
  return [
    {
      name: 'loading',
      value: Math.max(byRms, byPeak),
      dimension: 'ratio',
      working: {
        formula: rms ? 'loading = P rms / power' : 'loading = P highest / (power x peak)',
        inputs: [
          {
            symbol: rms ? 'P rms' : 'P highest',
            value: rms ? duty.rms : duty.highest,
            dimension: 'power',
            source: rms ? `root of the mean square over ${cycle.id}` : `highest in ${cycle.id}, shifting of valves not counted`,
          },
          { symbol: 'power', value: power, dimension: 'power', source: `${drive.id} power`, origin: drive.origin },
          ...(rms
            ? []
            : [
                {
                  symbol: 'peak',
                  value: peak ?? 1,
                  dimension: 'ratio' as const,
                  source: peak === undefined ? 'default: 100 %' : `${drive.id} peak`,
                },
              ]),
        ],
        result: Math.max(byRms, byPeak),
        dimension: 'ratio',
        source: 'rms duty of an electric motor: P rms = sqrt(sum P^2 t / sum t) (common practice, no source)',
      },
    },
  ];
}

function stepFigures(circuit: Circuit, step: StepResult, cycle: CycleResult | undefined): readonly Explained[] {
  const found: Explained[] = [];
  const run = cycle?.run;
  const span = run?.steps.find((one) => one.id === step.id);
  if (span && step.time !== undefined) {
    found.push({
      name: 'time',
      value: step.time,
      dimension: 'time',
      working: {
        formula: 't = t end - t entry',
        inputs: [
          { symbol: 't entry', value: span.from, dimension: 'time', source: `run of ${step.cycle}` },
          { symbol: 't end', value: span.to, dimension: 'time', source: `run of ${step.cycle}` },
        ],
        result: span.to - span.from,
        dimension: 'time',
        source: 'run over time',
      },
    });
  }
  for (const [id, speed] of Object.entries(step.speeds)) {
    const xs = run?.positions[id];
    if (!run || !span || !xs || speed.mean === undefined) continue;
    const at = (time: number) => xs[run.times.findIndex((one) => one >= time - 1e-9)];
    const [from, to] = [at(span.from), at(span.to)];
    if (from === undefined || to === undefined) continue;
    const way = Math.abs(to - from);
    const rotating = circuit.components.find((one) => one.id === id)?.kind !== 'cylinder';
    const result = way / (way / speed.mean);
    found.push({
      name: `mean speed of ${id}`,
      value: speed.mean,
      dimension: rotating ? 'rotation' : 'velocity',
      working: {
        formula: 'v = way / time in motion',
        inputs: [
          { symbol: 'way', value: way, dimension: rotating ? 'angle' : 'length', source: `run of ${step.cycle}` },
          { symbol: 'time in motion', value: way / speed.mean, dimension: 'time', source: `run of ${step.cycle}` },
        ],
        result,
        dimension: rotating ? 'rotation' : 'velocity',
        source: 'run over time',
      },
    });
  }
  return found;
}
