/** The working of a figure: formula, numbers with units, result, source. Computed from one point of the study, nothing solved anew. */
import type { Circuit, Component, Point, Working } from '@oilway/circuit';
import { read } from '@oilway/circuit';
import { componentOf, flowInto, pressureAt } from './places.ts';
import type { Show } from './show.ts';

/** The working as Markdown: the formula, then each input with where it comes from, then the published ground. */
export function workingText(working: Working, show: Show, title: string): string {
  const inputs = working.inputs.map((one) => `- ${one.symbol} = ${show.figure(one.value, one.dimension)} (${one.source})`);
  return [`${title}: \`${working.formula}\` = **${show.figure(working.result, working.dimension)}**`, ...inputs, `- ${working.source}`].join('\n');
}

/** Piston areas, m2. `through`: annulus at both sides. Undefined where a size is missing. */
export function areasOf(cylinder: Component): { readonly cap: number; readonly rod: number } | undefined {
  const bore = read.si(cylinder, 'bore');
  if (bore === undefined) return undefined;
  const rod = read.si(cylinder, 'rod');
  const full = (Math.PI / 4) * bore * bore;
  const annulus = full - (Math.PI / 4) * (rod ?? bore) ** 2;
  return { cap: read.has(cylinder, 'through') ? annulus : full, rod: annulus };
}

const near = (a: number, b: number): boolean => Math.abs(a - b) <= 0.02 * Math.max(Math.abs(a), Math.abs(b), 1);

/** Force pressed on the load by a cylinder; undefined where it has parts this formula does not have (spring, stages, a stop that takes force). */
export function forceWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const cylinder = componentOf(circuit, id);
  const actuator = point.actuators.find((one) => one.id === id);
  if (cylinder?.kind !== 'cylinder' || !actuator) return undefined;
  const areas = areasOf(cylinder);
  const single = read.word(cylinder, 'single');
  const cap = single === 'rod' ? 0 : pressureAt(circuit, point, id, 'cap');
  const rod = single === 'cap' || read.si(cylinder, 'rod') === undefined ? 0 : pressureAt(circuit, point, id, 'rod');
  if (!areas || cap === undefined || rod === undefined || read.has(cylinder, 'spring') || read.has(cylinder, 'telescopic')) return undefined;
  const sealPressure = read.si(cylinder, 'seal') ?? 3e5;
  const moving = Math.sign(actuator.velocity) || actuator.direction;
  const seal = sealPressure * areas.cap;
  const pressed = cap * areas.cap - rod * areas.rod;
  const result = pressed - moving * seal;
  const taken = actuator.atStop !== undefined ? (actuator.stopForce ?? 0) : 0;
  if (taken !== 0 || !near(result, actuator.force)) return undefined;
  const said = read.si(cylinder, 'seal') !== undefined;
  return {
    formula: `F = p cap x A cap - p rod x A rod ${moving < 0 ? '+' : '-'} seal friction`,
    inputs: [
      { symbol: 'p cap', value: cap, dimension: 'pressure', source: 'solved' },
      { symbol: 'A cap', value: areas.cap, dimension: 'area', source: `${id} bore` },
      { symbol: 'p rod', value: rod, dimension: 'pressure', source: 'solved' },
      { symbol: 'A rod', value: areas.rod, dimension: 'area', source: `${id} bore and rod` },
      { symbol: 'seal friction', value: seal, dimension: 'force', source: said ? `${id} seal x A cap` : 'default: 3 bar x A cap (common practice, no source)' },
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
  if (cylinder?.kind !== 'cylinder' || !actuator || actuator.velocity === 0 || read.has(cylinder, 'telescopic')) return undefined;
  const areas = areasOf(cylinder);
  if (!areas) return undefined;
  // The side whose oil is metered or pumped in: cap when extending, rod when retracting; the other where that one is not joined.
  const out = actuator.velocity > 0;
  const entering = out ? 'cap' : 'rod';
  const leaving = out ? 'rod' : 'cap';
  const port = flowInto(point, id, entering) !== undefined ? entering : leaving;
  const flow = flowInto(point, id, port);
  const area = areas[port];
  if (flow === undefined || area <= 0) return undefined;
  const result = Math.abs(flow) / area;
  if (Math.abs(result - Math.abs(actuator.velocity)) > 0.02 * Math.abs(actuator.velocity)) return undefined;
  return {
    formula: `v = q ${port} / A ${port}`,
    inputs: [
      { symbol: `q ${port}`, value: Math.abs(flow), dimension: 'flow', source: port === entering ? 'solved, entering' : 'solved, leaving' },
      { symbol: `A ${port}`, value: area, dimension: 'area', source: port === 'cap' ? `${id} bore` : `${id} bore and rod` },
    ],
    result,
    dimension: 'velocity',
    source: 'continuity (Esposito, Fluid Power with Applications, example 6-1)',
  };
}

/** Shaft power of a pump from its theoretical flow and pressure rise; undefined where the figures do not agree with it. */
export function shaftWorking(circuit: Circuit, id: string, point: Point): Working | undefined {
  const pump = componentOf(circuit, id);
  const drive = pump ? componentOf(circuit, read.reference(pump, 'driven')?.id ?? '') : undefined;
  const shaft = point.power[id];
  if (pump?.kind !== 'pump' || !drive || shaft === undefined || shaft === 0) return undefined;
  const displacement = read.si(pump, 'displacement');
  const speed = read.si(drive, 'speed');
  const outlet = pressureAt(circuit, point, id, 'P');
  const inlet = pressureAt(circuit, point, id, 'S') ?? 0;
  if (displacement === undefined || speed === undefined || outlet === undefined) return undefined;
  const mechanical = read.si(pump, 'mechanical') ?? 0.92;
  const rise = Math.max(0, outlet - inlet);
  const full = (displacement * speed * rise) / mechanical;
  const stroke = Math.min(1, point.openings[id] ?? 1);
  const result = full * stroke;
  if (Math.abs(result - shaft) > 0.02 * shaft) return undefined;
  return {
    formula: stroke < 1 ? 'P = V x n x stroke x dp / mechanical' : 'P = V x n x dp / mechanical',
    inputs: [
      { symbol: 'V', value: displacement, dimension: 'displacement', source: `${id} displacement` },
      { symbol: 'n', value: speed, dimension: 'rotation', source: `${drive.id} speed` },
      ...(stroke < 1 ? [{ symbol: 'stroke', value: stroke, dimension: 'ratio' as const, source: 'solved' }] : []),
      { symbol: 'dp', value: rise, dimension: 'pressure', source: 'solved, outlet less inlet' },
      { symbol: 'mechanical', value: mechanical, dimension: 'ratio', source: read.si(pump, 'mechanical') === undefined ? 'default: 92 % (common practice, no source)' : `${id} mechanical` },
    ],
    result,
    dimension: 'power',
    source: 'pump torque and power (Esposito, Fluid Power with Applications, example 5-8)',
  };
}
