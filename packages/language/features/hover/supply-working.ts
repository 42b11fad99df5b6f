/** The working of figures of the supply: a pump's flow and shaft power, a relief's pressure. Computed from one point of the study. */
import { read, type Circuit, type Component, type Point, type Working } from '@oilway/circuit';
import { componentOf, flowInto, pressureAt } from './places.ts';

/** Where nothing is declared (common practice, no source). */
const VOLUMETRIC = 0.92;
const MECHANICAL = 0.92;
/** Pressure at which `volumetric` holds where no rating is declared, Pa. */
const RATED = 2.1e7;
/** Figures of the study and of the formula agree within this share, or the working is not shown. */
const AGREES = 0.02;

interface Running {
  readonly pump: Component;
  readonly drive: Component;
  /** m3/rad */
  readonly displacement: number;
  /** rad/s */
  readonly speed: number;
  /** Outlet less inlet, Pa. */
  readonly rise: number;
  /** 1 for fixed displacement. */
  readonly stroke: number;
}

function running(circuit: Circuit, id: string, point: Point): Running | undefined {
  const pump = componentOf(circuit, id);
  const drive = pump ? componentOf(circuit, read.reference(pump, 'driven')?.id ?? '') : undefined;
  if (pump?.kind !== 'pump' || !drive) return undefined;
  const displacement = read.si(pump, 'displacement');
  const speed = read.si(drive, 'speed');
  const outlet = pressureAt(circuit, point, id, 'P');
  if (displacement === undefined || speed === undefined || outlet === undefined) return undefined;
  return {
    pump,
    drive,
    displacement,
    speed,
    rise: outlet - (pressureAt(circuit, point, id, 'S') ?? 0),
    stroke: Math.min(1, point.openings[id] ?? 1),
  };
}

const sizes = ({ pump, drive, displacement, speed, stroke }: Running): Working['inputs'] => [
  { symbol: 'V', value: displacement, dimension: 'displacement', source: `${pump.id} displacement` },
  { symbol: 'n', value: speed, dimension: 'rotation', source: `${drive.id} speed` },
  ...(stroke < 1 ? [{ symbol: 'stroke', value: stroke, dimension: 'ratio' as const, source: 'solved' }] : []),
];
const share = (pump: Component, name: string, otherwise: number): { readonly value: number; readonly source: string } => {
  const said = read.si(pump, name);
  return said === undefined
    ? { value: otherwise, source: `default: ${otherwise * 100} % (common practice, no source)` }
    : { value: said, source: `${pump.id} ${name}` };
};

/** Shaft power of a pump from its displacement, speed and pressure rise; undefined where the figures do not agree with it. */
export function shaftWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const pump = running(circuit, id, point);
  const shaft = point.power[id];
  if (!pump || shaft === undefined || shaft <= 0) return undefined;
  const mechanical = share(pump.pump, 'mechanical', MECHANICAL);
  const rise = Math.max(0, pump.rise);
  const result = (pump.displacement * pump.speed * pump.stroke * rise) / mechanical.value;
  if (Math.abs(result - shaft) > AGREES * shaft) return undefined;
  return {
    formula: `P = V x n${pump.stroke < 1 ? ' x stroke' : ''} x dp / mechanical`,
    inputs: [
      ...sizes(pump),
      { symbol: 'dp', value: rise, dimension: 'pressure', source: 'solved, outlet less inlet' },
      { symbol: 'mechanical', value: mechanical.value, dimension: 'ratio', source: mechanical.source },
    ],
    result,
    dimension: 'power',
    source: 'pump torque and power (Esposito, Fluid Power with Applications, example 5-8)',
  };
}

/** Flow a pump delivers: what it displaces less its leakage, which grows with the pressure; undefined where the figures do not agree (another oil temperature). */
export function flowWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const pump = running(circuit, id, point);
  const into = flowInto(point, id, 'P');
  if (!pump || into === undefined) return undefined;
  const volumetric = share(pump.pump, 'volumetric', VOLUMETRIC);
  const rated = read.ratedAt(pump.pump, 'P');
  const full = pump.displacement * pump.speed;
  const result = full * pump.stroke - (1 - volumetric.value) * full * (pump.rise / (rated ?? RATED));
  if (result <= 0 || Math.abs(result + into) > AGREES * result) return undefined;
  return {
    formula: `q = V x n${pump.stroke < 1 ? ' x stroke' : ''} - (1 - volumetric) x V x n x dp / rated`,
    inputs: [
      ...sizes(pump),
      { symbol: 'volumetric', value: volumetric.value, dimension: 'ratio', source: volumetric.source },
      { symbol: 'dp', value: pump.rise, dimension: 'pressure', source: 'solved, outlet less inlet' },
      {
        symbol: 'rated',
        value: rated ?? RATED,
        dimension: 'pressure',
        source: rated === undefined ? 'default: 210 bar (common practice, no source)' : `${id} rated`,
      },
    ],
    result,
    dimension: 'flow',
    source: 'pump flow (Esposito, Fluid Power with Applications, chapter 5); leakage linear in the pressure (common practice, no source)',
  };
}

/** Pressure a relief holds: setting, back pressure and override at the flow; undefined where it is vented, commanded, or its body is the floor. */
export function reliefWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const relief = componentOf(circuit, id);
  const flow = flowInto(point, id, 'P');
  const inlet = pressureAt(circuit, point, id, 'P');
  if (relief?.kind !== 'relief' || flow === undefined || inlet === undefined || !point.lifting.includes(id)) return undefined;
  const set = read.si(relief, 'set');
  const passes = read.flowAt(relief, 'passes');
  const back = pressureAt(circuit, point, id, 'Y') ?? pressureAt(circuit, point, id, 'T') ?? 0;
  if (set === undefined || passes === undefined) return undefined;
  const said = read.si(relief, 'override');
  const override = said ?? 0.1;
  const result = set + back + (override * set * flow) / passes.flow;
  if (Math.abs(result - inlet) > AGREES * inlet) return undefined;
  return {
    formula: 'p = set + p back + override x set x q / q passes',
    inputs: [
      { symbol: 'set', value: set, dimension: 'pressure', source: `${id} set` },
      { symbol: 'p back', value: back, dimension: 'pressure', source: 'solved' },
      {
        symbol: 'override',
        value: override,
        dimension: 'ratio',
        source: said === undefined ? 'default: 10 % (common practice, no source)' : `${id} override`,
      },
      { symbol: 'q', value: flow, dimension: 'flow', source: 'solved' },
      { symbol: 'q passes', value: passes.flow, dimension: 'flow', source: `${id} passes` },
    ],
    result,
    dimension: 'pressure',
    source: 'override linear in the flow (common practice, no source)',
  };
}
