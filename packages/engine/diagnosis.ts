/** Why a state is not a plain working one: flow without outlet, missing flow, pressures that nothing fixes. Groups of nodes joined by open elements. */
import type { Reported } from './report.ts';
import type { System } from './residual.ts';
import type { EngineDiagnosis } from './results.ts';
import { OPEN_CONDUCTANCE, STARVED_NOISE } from './tolerances.ts';

/** Flow into the fictitious outlet below which it is the floor of a part that stands alone, L/s. */
const OVER_NOISE = 1e-4;
/** Pressure apart below which flow over pressure says nothing about openness, MPa. */
const LEAST_APART = 1e-6;

export function diagnose(sys: System, result: Reported): EngineDiagnosis[] {
  const { net } = sys;
  const nodes = net.spec.nodes.length;
  const parent = Int32Array.from({ length: nodes }, (_, i) => i);
  const find = (i: number): number => {
    let root = i;
    while (parent[root] !== root) root = parent[root]!;
    parent[i] = root;
    return root;
  };
  // Pairs of terminals that do not conduct now: [element, one node, other node].
  const shut: [number, number, number][] = [];
  const sources: [number, number][] = [];
  net.laws.forEach((law, e) => {
    const first = net.flowStart[e]!;
    if (!law.joins) {
      for (let t = 0; t < law.terminals; t++) if (result.flows[first + t]! < -OPEN_CONDUCTANCE) sources.push([e, law.nodes[t]!]);
      return;
    }
    for (let t = 0; t < law.terminals; t++) {
      for (let o = t + 1; o < law.terminals; o++) {
        if (conducts(sys, result, e, t, o)) parent[find(law.nodes[t]!)] = find(law.nodes[o]!);
        else shut.push([e, law.nodes[t]!, law.nodes[o]!]);
      }
    }
  });
  const members = new Map<number, number[]>();
  for (let i = 0; i < nodes; i++) {
    const root = find(i);
    const list = members.get(root);
    if (list) list.push(i);
    else members.set(root, [i]);
  }
  const tagOf = (e: number): number => net.spec.elements[e]!.tag;
  const closedAround = (root: number): number[] => [
    ...new Set(shut.filter(([, a, b]) => (find(a) === root) !== (find(b) === root)).map(([e]) => tagOf(e))),
  ];
  const found: EngineDiagnosis[] = [];
  const explained = new Set<number>();
  for (const [root, group] of members) {
    let over = 0;
    let missing = 0;
    for (const node of group) {
      const flow = result.fictitious[node]!;
      if (flow < 0) over -= flow;
      else missing += flow;
    }
    for (const kind of ['OVERPRESSURE', 'STARVED'] as const) {
      const flow = kind === 'OVERPRESSURE' ? over : missing;
      if (kind === 'OVERPRESSURE' ? flow <= OVER_NOISE : flow <= STARVED_NOISE) continue;
      explained.add(root);
      const pressing: number[] = [];
      net.spec.actuators.forEach((actuator, a) => {
        const v = result.velocities[a]!;
        const wanted = kind === 'OVERPRESSURE' ? -1 : 1;
        actuator.chambers.forEach((chamber, c) => {
          const into = sys.area[net.chamberStart[a]! + c]! * v * wanted;
          if (find(chamber.node) === root && into > 1e-9 && !pressing.includes(a)) pressing.push(a);
        });
      });
      const wants = kind === 'OVERPRESSURE' ? sources.filter(([, node]) => find(node) === root) : drawers(sys, result, root, find);
      found.push({
        kind,
        nodes: group,
        flow,
        closed: closedAround(root),
        sources: [...new Set(wants.map(([e]) => tagOf(e)))],
        actuators: pressing,
      });
    }
  }
  const fixed = determined(sys, result, find, sources);
  for (const [root, group] of members) {
    if (fixed.has(root) || explained.has(root)) continue;
    found.push({ kind: 'CLOSED VOLUME', nodes: group, closed: closedAround(root) });
  }
  return found;
}

/** Pumps that draw from a group. */
function drawers(sys: System, result: Reported, root: number, find: (i: number) => number): [number, number][] {
  const found: [number, number][] = [];
  sys.net.laws.forEach((law, e) => {
    if (law.joins) return;
    for (let t = 0; t < law.terminals; t++) {
      if (result.flows[sys.net.flowStart[e]! + t]! > OPEN_CONDUCTANCE && find(law.nodes[t]!) === root) found.push([e, law.nodes[t]!]);
    }
  });
  return found;
}

/** Whether two terminals of an element conduct now: by its slopes, or by the flow that passes (a regulator has no slope). */
function conducts(sys: System, result: Reported, e: number, t: number, o: number): boolean {
  const { net } = sys;
  const law = net.laws[e]!;
  const first = net.flowStart[e]!;
  const qt = result.flows[first + t]!;
  const qo = result.flows[first + o]!;
  const apart = Math.abs(sys.p[law.nodes[t]!]! - law.heads[t]! - sys.p[law.nodes[o]!]! + law.heads[o]!);
  if (qt * qo < 0 && Math.min(Math.abs(qt), Math.abs(qo)) > OPEN_CONDUCTANCE * Math.max(apart, LEAST_APART)) return true;
  // A line or divider joins by its own unknown, whatever flows.
  if (law.own) return law.terminals === 2 || Math.abs(qt) > OPEN_CONDUCTANCE || Math.abs(qo) > OPEN_CONDUCTANCE || apart < LEAST_APART;
  return sys.conductance(e, t, o) > OPEN_CONDUCTANCE;
}

/**
 * Groups whose pressure something fixes: a fixed node, a running pump, a gas charge, or the balance of a moving or freely
 * standing body all of whose other chambers are fixed.
 */
function determined(sys: System, result: Reported, find: (i: number) => number, sources: readonly [number, number][]): Set<number> {
  const { net } = sys;
  const fixed = new Set<number>();
  net.spec.nodes.forEach((_, i) => {
    if (net.unknownOf[i]! < 0 || !Number.isNaN(sys.pinned[net.unknownOf[i]!]!)) fixed.add(find(i));
  });
  for (const [, node] of sources) fixed.add(find(node));
  for (let changed = true; changed; ) {
    changed = false;
    net.spec.actuators.forEach((actuator, a) => {
      if (result.contacts[a] !== 'free') return;
      const open = new Set<number>();
      for (const chamber of actuator.chambers) if (chamber.area !== 0 && !fixed.has(find(chamber.node))) open.add(find(chamber.node));
      if (open.size !== 1) return;
      for (const root of open) fixed.add(root);
      changed = true;
    });
  }
  return fixed;
}
