/** Workings of pumps: flow delivered and shaft power. */
import type { Component } from '../../model/circuit.ts';
import { reference, si } from '../read.ts';
import type { Figure } from '../study.ts';
import { agrees, given, type Input, type Reader, solved } from './inputs.ts';

const RATED = { value: 210e5, words: '210 bar where no `rated` is said' };
const EFFICIENCY = { value: 0.92, words: '92 % (common practice, no source)' };

interface PumpFacts {
  readonly displacement: Input;
  readonly speed: Input;
  readonly volumetric: Input;
  readonly mechanical: Input;
  readonly rated: Input;
  readonly stroke: number;
  /** p P - p S, Pa. */
  readonly dp: number;
  readonly outlet: number;
  readonly inlet: number;
}

function factsOf(pump: Component, drive: Component | undefined, read: Reader): PumpFacts | undefined {
  const displacement = given(pump, 'displacement', 'V', 'displacement');
  const speed = drive ? given(drive, 'speed', 'n', 'rotation') : undefined;
  const outlet = read.pressure(pump.id, 'P');
  if (!displacement || !speed || outlet === undefined) return undefined;
  const inlet = read.pressure(pump.id, 'S') ?? 0;
  return {
    displacement,
    speed,
    volumetric: given(pump, 'volumetric', 'volumetric', 'ratio', {
      ...EFFICIENCY,
      words: '92 % at rated pressure (common practice, no source)',
    })!,
    mechanical: given(pump, 'mechanical', 'mechanical', 'ratio', EFFICIENCY)!,
    rated: given(pump, 'rated', 'p rated', 'pressure', RATED)!,
    stroke: read.point.openings[pump.id] ?? 1,
    dp: outlet - inlet,
    outlet,
    inlet,
  };
}

export function driveOf(pump: Component, components: readonly Component[]): Component | undefined {
  const id = reference(pump, 'driven')?.id;
  return components.find((one) => one.id === id);
}

/** Q = V n stroke - (1 - volumetric) V n (p P - p S) / p rated. */
export function pumpFlow(pump: Component, drive: Component | undefined, read: Reader): Figure | undefined {
  const facts = factsOf(pump, drive, read);
  const flow = read.flow(pump.id, 'P');
  if (!facts || flow === undefined) return undefined;
  const full = facts.displacement.value * facts.speed.value;
  const result = full * facts.stroke - (1 - facts.volumetric.value) * full * (facts.dp / facts.rated.value);
  if (!agrees(-flow, result, 0.05 * full)) return undefined;
  const variable = si(pump, 'compensator') !== undefined;
  return {
    value: -flow,
    dimension: 'flow',
    working: {
      formula: `Q = V x n${variable ? ' x stroke' : ''} - (1 - volumetric) x V x n x (p P - p S) / p rated`,
      inputs: [
        facts.displacement,
        facts.speed,
        ...(variable ? [solved('stroke', facts.stroke, 'ratio')] : []),
        facts.volumetric,
        solved('p P', facts.outlet, 'pressure'),
        solved('p S', facts.inlet, 'pressure'),
        facts.rated,
      ],
      result,
      dimension: 'flow',
      source: 'displacement and leakage in proportion to pressure (Esposito, Fluid Power with Applications, example 5-9)',
    },
  };
}

/** P = V n stroke (p P - p S) / mechanical. */
export function shaftPower(pump: Component, drive: Component | undefined, read: Reader): Figure | undefined {
  const facts = factsOf(pump, drive, read);
  const power = read.point.power[pump.id];
  if (!facts || power === undefined) return undefined;
  const result = (facts.displacement.value * facts.speed.value * facts.stroke * Math.max(0, facts.dp)) / facts.mechanical.value;
  if (!agrees(power, result, 1)) return undefined;
  const variable = si(pump, 'compensator') !== undefined;
  return {
    value: power,
    dimension: 'power',
    working: {
      formula: `P = V x n${variable ? ' x stroke' : ''} x (p P - p S) / mechanical`,
      inputs: [
        facts.displacement,
        facts.speed,
        ...(variable ? [solved('stroke', facts.stroke, 'ratio')] : []),
        solved('p P', facts.outlet, 'pressure'),
        solved('p S', facts.inlet, 'pressure'),
        facts.mechanical,
      ],
      result,
      dimension: 'power',
      source: 'pump torque (Esposito, Fluid Power with Applications, example 5-9)',
    },
  };
}
