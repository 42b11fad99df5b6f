/** Workings of what oil passes: pressure at a relief, drop of a path, orifice or check, flow of a regulator. */
import { positionsOf, type Side } from '../../kinds/directional-positions.ts';
import type { Circuit, Component } from '../../model/circuit.ts';
import { flag, flowAt } from '../read.ts';
import type { Figure } from '../study.ts';
import { agrees, given, type Input, passes, type Reader, solved } from './inputs.ts';

/** delta of the path law, Pa: where a drop is this small the root turns into a line. */
const DELTA = 1e4;

/** Drop at which a path passes a flow: the exact law q = K dp / (dp2 + delta2)^(1/4), K through the declared point. */
export function pathDrop(flow: number, qN: number, dpN: number): number {
  const k = (qN * (dpN * dpN + DELTA * DELTA) ** 0.25) / dpN;
  // q2 sqrt(d2 + delta2) = K2 d2, a quadratic in d2.
  const r = (flow / k) ** 4;
  return Math.sqrt((r + Math.sqrt(r * r + 4 * r * DELTA * DELTA)) / 2);
}

export function reliefPressure(relief: Component, read: Reader): Figure | undefined {
  const p = read.pressure(relief.id, 'P');
  const flow = read.flow(relief.id, 'P');
  const set = given(relief, 'set', 'set', 'pressure');
  const nominal = flowAt(relief, 'passes');
  if (p === undefined || flow === undefined || !(flow > 1e-7) || !set || !nominal || flag(relief, 'coil')) return undefined;
  const override = given(relief, 'override', 'override', 'ratio', {
    value: 0.1,
    words: '10 % at the flow of `passes` (common practice, no source)',
  })!;
  const back = read.pressure(relief.id, 'Y') ?? read.pressure(relief.id, 'T') ?? 0;
  const vent = read.pressure(relief.id, 'X');
  const vented = given(relief, 'vented', 'vented', 'pressure', { value: 3e5, words: '3 bar (common practice, no source)' })!;
  const byVent = vent !== undefined && vent + vented.value < set.value + back;
  const opening = byVent ? vent + vented.value : set.value + back;
  const effective = byVent ? vent + vented.value : set.value;
  const result = opening + (Math.max(override.value * effective, 5e4) * flow) / nominal.flow;
  const inputs: readonly Input[] = byVent ? [solved('p X', vent, 'pressure'), vented] : [set, solved('p back', back, 'pressure')];
  if (agrees(p, result)) {
    return {
      value: p,
      dimension: 'pressure',
      working: {
        formula: byVent ? 'p = p X + vented + override x (p X + vented) x q / q N' : 'p = set + p back + override x set x q / q N',
        inputs: [...inputs, override, solved('q', flow, 'flow'), ...passes(relief, nominal.flow, nominal.drop).slice(0, 1)],
        result,
        dimension: 'pressure',
        source: 'relief valve as a line from opening to full flow (Esposito, Fluid Power with Applications, example 8-1)',
      },
    };
  }
  const floor = back + pathDrop(flow, nominal.flow, nominal.drop);
  if (!agrees(p, floor)) return undefined;
  return {
    value: p,
    dimension: 'pressure',
    working: {
      formula: 'p = p back + dp N x (q / q N)^2, the fully open body',
      inputs: [solved('p back', back, 'pressure'), solved('q', flow, 'flow'), ...passes(relief, nominal.flow, nominal.drop)],
      result: floor,
      dimension: 'pressure',
      source: 'turbulent path (DOE-HDBK-1012/3-92: pressure drop in proportion to the square of flow)',
    },
  };
}

/** Drop of a component along the path its oil takes. */
export function drop(component: Component, circuit: Circuit, read: Reader): Figure | undefined {
  const ports = [
    ...new Set(circuit.nets.flatMap((net) => net.ports.filter((one) => one.component === component.id).map((one) => one.port))),
  ];
  const byFlow = ports.map((port) => ({ port, flow: read.flow(component.id, port) ?? 0 })).sort((a, b) => b.flow - a.flow);
  const entry = byFlow[0];
  const exit = byFlow.at(-1);
  if (!entry || !exit || entry === exit || !(entry.flow > 1e-8)) return undefined;
  const [p, q] = [read.pressure(component.id, entry.port), read.pressure(component.id, exit.port)];
  if (p === undefined || q === undefined) return undefined;
  const nominal = nominalOf(component, entry.port, exit.port, read);
  if (!nominal) return undefined;
  const opening = read.point.openings[component.id] ?? 1;
  const y = nominal.crack === undefined && opening > 0 && opening < 1 ? opening : 1;
  const crack = nominal.crack?.value ?? 0;
  const result = crack + pathDrop(entry.flow / y, nominal.flow, nominal.drop - crack);
  if (!agrees(p - q, result, 2e3)) return undefined;
  return {
    value: p - q,
    dimension: 'pressure',
    working: {
      formula: nominal.crack
        ? 'dp = crack + (dp N - crack) x (q / q N)^2'
        : y < 1
          ? 'dp = dp N x (q / (opening x q N))^2'
          : 'dp = dp N x (q / q N)^2',
      inputs: [
        ...passes(component, nominal.flow, nominal.drop),
        ...(nominal.crack ? [nominal.crack] : []),
        ...(y < 1 ? [solved('opening', y, 'ratio')] : []),
        { ...solved('q', entry.flow, 'flow'), source: `solved, ${entry.port} to ${exit.port}` },
      ],
      result,
      dimension: 'pressure',
      source: 'turbulent path through the declared point (Esposito, Fluid Power with Applications, equation of the orifice)',
    },
  };
}

interface Nominal {
  readonly flow: number;
  readonly drop: number;
  readonly crack?: Input;
}
function nominalOf(component: Component, entry: string, exit: string, read: Reader): Nominal | undefined {
  if (component.kind === 'directional') {
    const words = read.point.positions[component.id]?.split(' ')[0];
    const side = words === 'a' || words === 'b' || words === 'centre' ? words : undefined;
    const { paths } = positionsOf(component);
    const sides: readonly Side[] = side ? [side] : ['a', 'b', 'centre'];
    for (const one of sides) {
      const path = paths[one].find((way) => (way.from === entry && way.to === exit) || (way.from === exit && way.to === entry));
      if (path?.passes) return { flow: path.passes.flow, drop: path.passes.drop };
    }
    return undefined;
  }
  const general = flowAt(component, 'passes');
  if (!general) return undefined;
  if (component.kind === 'check') {
    const crack = given(component, 'crack', 'crack', 'pressure', { value: 5e4, words: '0.5 bar (common practice, no source)' })!;
    return { flow: general.flow, drop: general.drop, crack };
  }
  return { flow: general.flow, drop: general.drop };
}

/** Flow of a compensated throttle: its setting, or the orifice it is below `needs`; of an orifice: by its bore. */
export function metered(throttle: Component, read: Reader): Figure | undefined {
  const flow = read.flow(throttle.id, 'in');
  const [p, q] = [read.pressure(throttle.id, 'in'), read.pressure(throttle.id, 'out')];
  const set = given(throttle, 'set', 'set', 'flow');
  if (flow === undefined || p === undefined || q === undefined || !set || !(flow > 0)) return undefined;
  const needs = given(throttle, 'needs', 'needs', 'pressure', { value: 6e5, words: '6 bar (common practice, no source)' })!;
  const full = flag(throttle, 'compensated') && p - q >= needs.value;
  const result = full ? set.value : set.value * Math.sqrt(Math.max(0, p - q) / needs.value);
  if (!agrees(flow, result)) return undefined;
  return {
    value: flow,
    dimension: 'flow',
    working: {
      formula: full ? 'q = set, as long as dp is at least needs' : 'q = set x sqrt(dp / needs)',
      inputs: [set, needs, solved('dp', p - q, 'pressure')],
      result,
      dimension: 'flow',
      source: full
        ? 'pressure-compensated flow control keeps its setting'
        : 'orifice law (Esposito, Fluid Power with Applications, example 8-4)',
    },
  };
}

/** Setting of an orifice by its bore: q = Cd A sqrt(2 dp / rho). */
export function orificeFlow(throttle: Component, fluid: Component | undefined, read: Reader): Figure | undefined {
  const bore = given(throttle, 'orifice', 'd', 'length');
  const flow = read.flow(throttle.id, 'in');
  const [p, q] = [read.pressure(throttle.id, 'in'), read.pressure(throttle.id, 'out')];
  if (!bore || flow === undefined || p === undefined || q === undefined) return undefined;
  const density = (fluid ? given(fluid, 'density', 'rho', 'density', { value: 870, words: '870 kg/m3' }) : undefined) ?? {
    symbol: 'rho',
    value: 870,
    dimension: 'density' as const,
    source: 'default: 870 kg/m3',
  };
  const result = Math.sign(p - q) * 0.62 * (Math.PI / 4) * bore.value ** 2 * Math.sqrt((2 * Math.abs(p - q)) / density.value);
  if (!agrees(flow, result)) return undefined;
  return {
    value: flow,
    dimension: 'flow',
    working: {
      formula: 'q = Cd x pi/4 d^2 x sqrt(2 dp / rho)',
      inputs: [
        { symbol: 'Cd', value: 0.62, dimension: 'ratio', source: 'sharp-edged orifice (0.60 to 0.64)' },
        bore,
        solved('dp', p - q, 'pressure'),
        density,
      ],
      result,
      dimension: 'flow',
      source: 'orifice law (Esposito, Fluid Power with Applications, example 8-4)',
    },
  };
}

/** Loss of a component: drop times flow, summed over its ports. */
export function lossPower(component: Component, read: Reader, ports: readonly string[]): Figure | undefined {
  const terms = ports.map((port) => ({ port, p: read.pressure(component.id, port), q: read.flow(component.id, port) }));
  if (terms.length < 2 || terms.some((one) => one.p === undefined || one.q === undefined)) return undefined;
  const result = terms.reduce((sum, one) => sum + one.p! * one.q!, 0);
  if (Math.abs(result) < 1) return undefined;
  return {
    value: result,
    dimension: 'power',
    working: {
      formula: 'P = sum of p x q into the component',
      inputs: terms.flatMap((one) => [solved(`p ${one.port}`, one.p!, 'pressure'), solved(`q ${one.port}`, one.q!, 'flow')]),
      result,
      dimension: 'power',
      source: 'power of a flow, p x q (600 bar L/min = 1 kW)',
    },
  };
}
