/** The sample circuits through text, circuit and study: every cycle ends, every point is solved, every requirement is decided. */
import { readdirSync, readFileSync } from 'node:fs';
import { type Circuit, explain, study, type Study } from '@oilway/circuit';
import { beforeAll, describe, expect, it } from 'vitest';
import { circuitOf } from './support/circuits.ts';

const folder = new URL('../../../samples/', import.meta.url);
const files = readdirSync(folder).filter((one) => one.endsWith('.oilway'));

/** The statements of a text, each with the lines of its braces. */
function statements(text: string): string[] {
  const found: string[] = [];
  let depth = 0;
  for (const line of text.split('\n')) {
    if (depth > 0) found[found.length - 1] += `\n${line}`;
    else found.push(line);
    depth += line.split('{').length - line.split('}').length;
  }
  return found;
}

describe.each(files)('%s', (file) => {
  let circuit: Circuit;
  let result: Study;
  beforeAll(() => {
    circuit = circuitOf(readFileSync(new URL(file, folder), 'utf8'));
    result = study(circuit);
  });
  it('ends every cycle without a fault', () => {
    expect(result.cycles.length).toBeGreaterThan(0);
    for (const cycle of result.cycles) {
      expect(cycle.faults).toEqual([]);
      expect(cycle.completed).toBe(true);
      expect(cycle.settled).toBe(true);
    }
    for (const step of result.steps) expect(step.time).toBeGreaterThanOrEqual(0);
  });
  it('finds an equilibrium in every state and at every point', () => {
    const points = [
      ...result.steps.flatMap((one) => one.points),
      ...result.states.flatMap((one) => one.variants.map((variant) => variant.point)),
    ];
    // Each step has its entry and its end, each state at least one variant.
    expect(points.length).toBeGreaterThanOrEqual(2 * result.steps.length + result.states.length);
    expect(points.filter((one) => !one.solved).map((one) => one.label)).toEqual([]);
  });
  it('decides and meets every requirement', () => {
    expect(result.requirements.map((one) => [one.verdict, one.words])).toEqual(result.requirements.map((one) => ['met', one.words]));
    expect(result.requirements.length).toBe(circuit.requirements.length);
  });
  it('studies the states that are always studied, and every coil', () => {
    const ids = result.states.map((one) => one.id);
    expect(ids).toEqual(expect.arrayContaining(['REST', 'OFF', 'STOP', ...circuit.coils.map((one) => `coil ${one.id}`)]));
    for (const step of circuit.cycles.flatMap((one) => one.steps)) expect(ids).toContain(`STOP from ${step.id}`);
  });
  it('has no figure that is no number', () => {
    const seen: string[] = [];
    const walk = (value: unknown, path: string): void => {
      if (typeof value === 'number' && Number.isNaN(value)) seen.push(path);
      else if (value !== null && typeof value === 'object') for (const [key, one] of Object.entries(value)) walk(one, `${path}.${key}`);
    };
    walk(result, 'study');
    expect(seen).toEqual([]);
  });
  it('says the same whatever the order of its statements', () => {
    const text = readFileSync(new URL(file, folder), 'utf8');
    const turned = study(circuitOf(statements(text).reverse().join('\n')));
    const of = (one: Study) => one.requirements.map((requirement) => [requirement.verdict, requirement.worst?.value.toPrecision(3)]);
    expect(of(turned).reverse()).toEqual(of(result));
    const times = (one: Study) => Object.fromEntries(one.cycles.map((cycle) => [cycle.id, cycle.time?.toFixed(3)]));
    expect(times(turned)).toEqual(times(result));
  });
  it('crosses a worker boundary', () => {
    expect(structuredClone(result)).toEqual(result);
  });
  it('gives the oil as heat what the shafts take and the loads do not get', () => {
    for (const cycle of result.cycles) {
      const shafts = Object.values(cycle.duty).reduce((sum, one) => sum + one.mean, 0);
      expect(cycle.heat! + cycle.work!).toBeCloseTo(shafts, 3);
    }
  });
  it('keeps the balance of oil at every net of every steady point', () => {
    for (const point of result.steps.flatMap((one) => one.points)) {
      for (const net of circuit.nets) {
        if (net.reservoir !== undefined || circuit.pieces.some((one) => one.nets[0] !== one.nets[1] && one.nets.includes(net.id))) continue;
        if (point.diagnosis.some((one) => 'nets' in one && one.nets.includes(net.id))) continue;
        const sum = net.ports.reduce((total, one) => total + (point.flows[`${one.component}.${one.port}`] ?? 0), 0);
        // 0.01 L/min: what the engine's leakage floor passes.
        expect(Math.abs(sum) * 60000).toBeLessThan(0.01);
      }
    }
  });
  it('explains its figures so that the working gives the figure', () => {
    let shown = 0;
    for (const point of result.steps.flatMap((one) => one.points)) {
      for (const component of circuit.components) {
        for (const one of explain(circuit, result, { of: 'component', id: component.id, point })) {
          shown += 1;
          expect(Number.isFinite(one.working!.result)).toBe(true);
          expect(Math.abs(one.working!.result - one.value)).toBeLessThanOrEqual(0.02 * Math.abs(one.value) + 5000);
        }
      }
    }
    expect(shown).toBeGreaterThan(50);
  });
});

describe('a circuit that is not whole', () => {
  const broken = readFileSync(new URL(files.find((one) => one.startsWith('05'))!, folder), 'utf8');
  it('is computed where it can be; the rest says why', () => {
    // The relief of the rod side loses its `passes`: only that part is unknown.
    const circuit = circuitOf(broken.replace(/relief( +)RV2 \([^)]*\)/, 'relief$1RV2 (set 240 bar)'), true);
    const result = study(circuit);
    expect(Object.keys(circuit.unknown)).toEqual(['RV2']);
    expect(Object.values(result.notComputed).length).toBeGreaterThan(0);
    expect(result.states.find((one) => one.id === 'REST')!.variants.length).toBeGreaterThan(0);
  });
  it('does not decide what rests on the unknown part, and decides the rest', () => {
    const circuit = circuitOf(
      broken.replace(
        /directional( +)V1 \([^)]*\(?[^)]*\)?[^)]*\)/,
        'directional$1V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2)',
      ),
      true,
    );
    expect(Object.keys(circuit.unknown)).toEqual(['V1']);
    const result = study(circuit);
    const byWords = result.requirements.map((one) => `${one.verdict} ${one.words}`);
    expect(byWords.filter((one) => one.startsWith('met') && /C1/.test(one))).toEqual([]);
    expect(byWords.filter((one) => /cannot be decided: .*V1/.test(one)).length).toBeGreaterThan(0);
  });
  it('an empty one gives an empty study', () => {
    const result = study(circuitOf('circuit Empty\n', true));
    expect(result.steps).toEqual([]);
    expect(result.requirements).toEqual([]);
  });
});
