/** What must hold for every network: balance, monotony, mirror, order, dead ends. On random networks of nets.ts. */
import {
  compile,
  type ElementSpec,
  type Network,
  type NetworkSpec,
  solveSteady,
  type SteadyRequest,
  type SteadyResult,
} from '@oilway/engine';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Net, nastyNet } from './nets.ts';

const seed = fc.integer({ min: 1, max: 1_000_000 });

function solved(net: Net, spec: NetworkSpec = net.spec): { network: Network; result: SteadyResult; request: SteadyRequest } {
  const network = compile(spec);
  network.parameters.set(net.parameters);
  const request: SteadyRequest = { positions: net.positions, loads: net.loads, gas: net.gas, locked: net.locked };
  return { network, request, result: solveSteady(network, request) };
}

/** Seeds at which steep passages once left a balance open behind converged pressures. */
const STEEP = [335, 1648, 2135, 4415];

describe('every network', () => {
  it('balances at every node to a billionth of its largest flow', () => {
    fc.assert(
      fc.property(seed, (s) => {
        const { network, result } = solved(nastyNet(s));
        if (!result.converged) return;
        const { spec } = network;
        const inflow = Float64Array.from(result.fictitious);
        let largest = 1e-3;
        network.laws.forEach((law, e) => {
          for (let t = 0; t < law.terminals; t++) {
            const q = result.flows[result.elementStart[e]! + t]!;
            inflow[law.nodes[t]!]! -= q;
            largest = Math.max(largest, Math.abs(q));
          }
        });
        spec.actuators.forEach((actuator, a) => {
          for (const chamber of actuator.chambers) {
            inflow[chamber.node]! -= chamber.area * result.velocities[a]!;
            largest = Math.max(largest, Math.abs(chamber.area * result.velocities[a]!));
          }
        });
        spec.gas.forEach((gas, g) => {
          inflow[gas.node]! -= result.gasFlows[g]!;
        });
        spec.nodes.forEach((node, i) => {
          if (i > 0 && node.fixed === undefined) expect(Math.abs(inflow[i]!), `node ${i} of net ${s}`).toBeLessThan(1e-9 * largest + 1e-9);
        });
      }),
      { numRuns: 150, examples: STEEP.map((s): [number] => [s]) },
    );
  });

  it('gives the same answer whatever the order of elements', () => {
    fc.assert(
      fc.property(seed, (s) => {
        const net = nastyNet(s);
        const straight = solved(net);
        const turned = solved(net, { ...net.spec, elements: [...net.spec.elements].reverse() });
        if (!settled(straight.result) || !settled(turned.result)) return;
        straight.result.pressures.forEach((p, i) => {
          expect(Math.abs(turned.result.pressures[i]! - p), `node ${i} of net ${s}`).toBeLessThan(1e-6 * (1 + Math.abs(p)));
        });
      }),
      { numRuns: 100 },
    );
  });

  it('does not notice a dead-ended node', () => {
    fc.assert(
      fc.property(seed, (s) => {
        const net = nastyNet(s);
        const plain = solved(net);
        const at = 1 + (s % (net.spec.nodes.length - 1));
        const more: NetworkSpec = {
          ...net.spec,
          nodes: [...net.spec.nodes, { storage: 1e-4 }],
          elements: [...net.spec.elements, { type: 'path', tag: 9, a: at, b: net.spec.nodes.length, k: 0.5 }],
        };
        const extended = solved(net, more);
        if (!settled(plain.result) || !settled(extended.result)) return;
        plain.result.pressures.forEach((p, i) => {
          expect(Math.abs(extended.result.pressures[i]! - p), `node ${i} of net ${s}`).toBeLessThan(1e-6 * (1 + Math.abs(p)));
        });
        expect(Math.abs(extended.result.pressures[net.spec.nodes.length]! - extended.result.pressures[at]!)).toBeLessThan(1e-6);
      }),
      { numRuns: 100 },
    );
  });
});

/** Networks of passive elements have one answer; nets with closed volumes or pressure-opened valves may have several, or an undetermined one. */
function settled(result: SteadyResult): boolean {
  return result.converged && result.how === 'newton' && result.diagnosis.length === 0;
}

const tank = { storage: 1, fixed: 0 };
const node = { storage: 1e-3 };

describe('a cylinder between two relieved lines', () => {
  const circuit = (mirrored: boolean): NetworkSpec => {
    const [a, b] = mirrored ? [3, 2] : [2, 3];
    const elements: ElementSpec[] = [
      { type: 'pump', tag: 1, s: 0, p: 1, qth: 0.6, leak: 0.002, running: 0 },
      { type: 'relief', tag: 2, p: 1, t: 0, ref: 0, set: 1, vented: 0.4, override: 0.1, qN: 1, k: 3 },
      { type: 'path', tag: 3, a: 1, b: a, k: 0.6 },
      { type: 'path', tag: 4, a: b, b: 0, k: 0.6, opening: 2 },
    ];
    return {
      nodes: [tank, node, node, node],
      elements,
      actuators: [
        {
          tag: 5,
          chambers: [
            { node: 2, area: 3 },
            { node: 3, area: -3 },
          ],
          low: -0.2,
          high: 0.2,
          mass: 1,
        },
      ],
      gas: [],
      parameters: 3,
    };
  };
  const run = (mirrored: boolean, force: number, set: number, opening = 1): SteadyResult => {
    const net = compile(circuit(mirrored));
    net.parameters.set([1, set, opening]);
    return solveSteady(net, {
      positions: [0],
      loads: [{ fixed: [{ at: [0], force: [force] }], resistOut: [], resistIn: [], friction: 1.5 }],
    });
  };
  it('answers a mirrored network with the mirrored state', () => {
    fc.assert(
      fc.property(fc.double({ min: -40, max: 40, noNaN: true }), fc.double({ min: 1, max: 25, noNaN: true }), (force, set) => {
        const one = run(false, force, set);
        const other = run(true, -force, set);
        expect(one.converged && other.converged).toBe(true);
        expect(Math.abs(one.velocities[0]! + other.velocities[0]!)).toBeLessThan(1e-7);
        expect(Math.abs(one.pressures[2]! - other.pressures[3]!)).toBeLessThan(1e-6);
      }),
      { numRuns: 60 },
    );
  });
  it('is no slower and presses no less with a higher relief setting, a wider passage, less load', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -40, max: 40, noNaN: true }),
        fc.double({ min: 1, max: 20, noNaN: true }),
        fc.double({ min: 0.05, max: 0.9, noNaN: true }),
        fc.double({ min: 0, max: 5, noNaN: true }),
        (force, set, opening, more) => {
          const base = run(false, force, set, opening);
          const higher = run(false, force, set + more, opening);
          const wider = run(false, force, set, opening + 0.1);
          const lighter = run(false, force + more, set, opening);
          for (const after of [higher, lighter]) expect(after.velocities[0]!).toBeGreaterThanOrEqual(base.velocities[0]! - 1e-8);
          // A wider passage is quicker in whichever direction it moves.
          expect(wider.velocities[0]! * Math.sign(base.velocities[0]!)).toBeGreaterThanOrEqual(Math.abs(base.velocities[0]!) - 1e-8);
          expect(higher.pressures[1]!).toBeGreaterThanOrEqual(base.pressures[1]! - 1e-7);
        },
      ),
      { numRuns: 60 },
    );
  });
});
