/** The working of a figure: formula, numbers with units, result, source. Computed from one point of the study, nothing solved anew. */
import { areasOf, read, type Circuit, type Component, type Point, type Working } from '@oilway/circuit';
import { componentOf, flowInto, pressureAt, STILL } from './places.ts';
import type { Show } from './show.ts';

/** The working as Markdown: the formula, then each input with where it comes from, then the published ground. */
export function workingText(working: Working, show: Show, title: string): string {
  // A ratio above one is a gear or an area ratio: told as the text writes it.
  const value = (si: number, dimension: Working['dimension']): string =>
    dimension === 'ratio' && si > 1 ? `${Number(si.toPrecision(3))}:1` : show.figure(si, dimension);
  const inputs = working.inputs.map((one) => `- ${one.symbol} = ${value(one.value, one.dimension)} (${one.source})`);
  return [
    `${title}: \`${working.formula}\` = **${show.figure(working.result, working.dimension)}**`,
    ...inputs,
    `- ${working.source}`,
  ].join('\n');
}

/** Seal friction as a pressure on the bore area where none is declared, Pa (common practice, no source). */
const SEAL = 3e5;
/** Overall mechanical share of a motor where none is declared (common practice, no source). */
const MOTOR_MECHANICAL = 0.9;
/** Figures of the study and of the formula agree within this share, or the working is not shown. */
const AGREES = 0.02;

const near = (a: number, b: number): boolean => Math.abs(a - b) <= AGREES * Math.max(Math.abs(a), Math.abs(b), 1);

/** Force pressed on the load by a cylinder; undefined where it has parts this formula does not have (spring, stages, a stop that takes force). */
export function forceWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const cylinder = componentOf(circuit, id);
  const actuator = point.actuators.find((one) => one.id === id);
  if (cylinder?.kind !== 'cylinder' || !actuator) return undefined;
  const areas = areasOf(cylinder);
  if (!areas || read.has(cylinder, 'spring') || read.has(cylinder, 'telescopic')) return undefined;
  const cap = areas.cap === undefined ? 0 : pressureAt(circuit, point, id, 'cap');
  const rod = areas.rod === undefined ? 0 : pressureAt(circuit, point, id, 'rod');
  if (cap === undefined || rod === undefined) return undefined;
  const said = read.si(cylinder, 'seal');
  const moving = Math.sign(actuator.velocity) || actuator.direction;
  const seal = (said ?? SEAL) * areas.bore;
  const result = cap * (areas.cap ?? 0) - rod * (areas.rod ?? 0) - moving * seal;
  if ((actuator.atStop !== undefined && (actuator.stopForce ?? 0) !== 0) || !near(result, actuator.force)) return undefined;
  const side = (port: 'cap' | 'rod', pressure: number, area: number | undefined): Working['inputs'] =>
    area === undefined
      ? []
      : [
          { symbol: `p ${port}`, value: pressure, dimension: 'pressure', source: 'solved' },
          { symbol: `A ${port}`, value: area, dimension: 'area', source: sizesOf(cylinder, port) },
        ];
  const terms = [areas.cap === undefined ? '' : 'p cap x A cap', areas.rod === undefined ? '' : '- p rod x A rod']
    .filter(Boolean)
    .join(' ');
  return {
    formula: `F = ${terms} ${moving < 0 ? '+' : '-'} seal friction`,
    inputs: [
      ...side('cap', cap, areas.cap),
      ...side('rod', rod, areas.rod),
      {
        symbol: 'seal friction',
        value: seal,
        dimension: 'force',
        source: said !== undefined ? `${id} seal x bore area` : 'default: 3 bar x bore area (common practice, no source)',
      },
    ],
    result,
    dimension: 'force',
    source: 'balance of forces at the piston (Esposito, Fluid Power with Applications, example 6-1)',
  };
}

/** Speed from the oil that enters; undefined where the flow does not explain it (oil is being compressed, a stop holds). */
export function speedWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const cylinder = componentOf(circuit, id);
  const actuator = point.actuators.find((one) => one.id === id);
  if (cylinder?.kind !== 'cylinder' || !actuator || Math.abs(actuator.velocity) <= STILL.velocity || read.has(cylinder, 'telescopic'))
    return undefined;
  const areas = areasOf(cylinder);
  if (!areas) return undefined;
  // The side whose oil is metered or pumped in: cap when extending, rod when retracting; the other where that one is not joined.
  const out = actuator.velocity > 0;
  const entering = out ? 'cap' : 'rod';
  const leaving = out ? 'rod' : 'cap';
  const port = flowInto(point, id, entering) !== undefined ? entering : leaving;
  const flow = flowInto(point, id, port);
  const area = areas[port];
  if (flow === undefined || area === undefined || area <= 0) return undefined;
  const result = Math.abs(flow) / area;
  if (Math.abs(result - Math.abs(actuator.velocity)) > AGREES * Math.abs(actuator.velocity)) return undefined;
  return {
    formula: `v = q ${port} / A ${port}`,
    inputs: [
      { symbol: `q ${port}`, value: Math.abs(flow), dimension: 'flow', source: port === entering ? 'solved, entering' : 'solved, leaving' },
      { symbol: `A ${port}`, value: area, dimension: 'area', source: sizesOf(cylinder, port) },
    ],
    result,
    dimension: 'velocity',
    source: 'continuity (Esposito, Fluid Power with Applications, example 6-1)',
  };
}

/** The sizes an area comes from. */
function sizesOf(cylinder: Component, port: 'cap' | 'rod'): string {
  const rod = read.si(cylinder, 'rod') !== undefined && (port === 'rod' || read.has(cylinder, 'through'));
  return `${cylinder.id} bore${rod ? ' and rod' : ''}`;
}

/** Torque at a motor's gear output while it drives; undefined where the figures do not agree (it brakes, or the casing takes part). */
export function torqueWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const motor = componentOf(circuit, id);
  const actuator = point.actuators.find((one) => one.id === id);
  if (motor?.kind !== 'motor' || !actuator) return undefined;
  const displacement = read.si(motor, 'displacement');
  const a = pressureAt(circuit, point, id, 'A');
  const b = pressureAt(circuit, point, id, 'B');
  if (displacement === undefined || a === undefined || b === undefined) return undefined;
  const said = read.si(motor, 'mechanical');
  const mechanical = said ?? MOTOR_MECHANICAL;
  const gear = read.si(motor, 'gear') ?? 1;
  const result = displacement * (a - b) * mechanical * gear;
  if (Math.abs(result - actuator.force) > AGREES * Math.abs(actuator.force)) return undefined;
  return {
    formula: gear === 1 ? 'T = V x (p A - p B) x mechanical' : 'T = V x (p A - p B) x mechanical x gear',
    inputs: [
      { symbol: 'V', value: displacement, dimension: 'displacement', source: `${id} displacement` },
      { symbol: 'p A', value: a, dimension: 'pressure', source: 'solved' },
      { symbol: 'p B', value: b, dimension: 'pressure', source: 'solved' },
      {
        symbol: 'mechanical',
        value: mechanical,
        dimension: 'ratio',
        source: said === undefined ? 'default: 90 % (common practice, no source)' : `${id} mechanical`,
      },
      ...(gear === 1 ? [] : [{ symbol: 'gear', value: gear, dimension: 'ratio' as const, source: `${id} gear` }]),
    ],
    result,
    dimension: 'torque',
    source: 'motor torque (Esposito, Fluid Power with Applications, example 7-5)',
  };
}
