/** From a spec to what the residual runs over: laws, numbering of unknowns, the Jacobian's pattern and where each derivative goes in it. */
import type { Law } from './laws/law.ts';
import { inputsOf, outputsOf } from './laws/law.ts';
import { lawOf } from './laws/index.ts';
import { Batch } from './laws/batch.ts';
import type { CheckSpec, NetworkSpec, PathSpec } from './network.ts';
import { minimumDegree } from './sparse/order.ts';
import { sortedKnots } from './tables.ts';
import { CEILING, CREEP } from './tolerances.ts';

/** Immutable but for `parameters`. Everything else is for the core's own files. */
export interface Network {
  readonly spec: NetworkSpec;
  /** Values of the parameters in force; set between solves. */
  readonly parameters: Float64Array;
  readonly laws: readonly Law[];
  /** Number of unknowns: pressures, then velocities, then own unknowns of elements. */
  readonly size: number;
  /** Node -> unknown, -1 where fixed. */
  readonly unknownOf: Int32Array;
  readonly nodeOf: Int32Array;
  readonly free: number;
  readonly fixedPressures: Float64Array;
  readonly ceilings: Float64Array;
  readonly firstVelocity: number;
  /** Own unknown of an element, -1: none. */
  readonly ownOf: Int32Array;
  /** Pattern, by columns. */
  readonly start: Int32Array;
  readonly rows: Int32Array;
  readonly order: Int32Array;
  readonly entries: number;
  readonly diagonal: Int32Array;
  /** Slots of each row: `rowSlots[rowStart[r]..]`. */
  readonly rowStart: Int32Array;
  readonly rowSlots: Int32Array;
  /** Per element: first input node, first slot, first flow. */
  readonly inputStart: Int32Array;
  readonly inputNodes: Int32Array;
  readonly inputHeads: Float64Array;
  readonly slotStart: Int32Array;
  readonly slots: Int32Array;
  readonly flowStart: Int32Array;
  readonly flowRows: Int32Array;
  /** Chambers of all actuators, flat. */
  readonly chamberStart: Int32Array;
  readonly chamberNodes: Int32Array;
  readonly chamberHeads: Float64Array;
  readonly chamberForceSlot: Int32Array;
  readonly chamberFlowSlot: Int32Array;
  /** Scale of a force balance: total chamber area, so that its residual is a pressure. */
  readonly forceScale: Float64Array;
  readonly creep: Float64Array;
  /** 1 where no stop ends the way (motors). */
  readonly endless: Uint8Array;
  /** Positions where something of the network itself changes, per actuator. */
  readonly knots: readonly Float64Array[];
  /** Passages and checks, stamped in loops; the other elements by number. */
  readonly batches: readonly Batch[];
  readonly general: Int32Array;
  /** Nodes of parts that reach no fixed node through the floor of any element: one each, tied to atmosphere by the floor. */
  readonly grounded: Int32Array;
}

export type CompileProblem = { readonly element?: number; readonly actuator?: number; readonly message: string };

/** Checks indices and sizes; empty when the spec can be compiled. */
export function problemsOf(spec: NetworkSpec): CompileProblem[] {
  const problems: CompileProblem[] = [];
  const nodes = spec.nodes.length;
  const bad = (node: number): boolean => !(Number.isInteger(node) && node >= 0 && node < nodes);
  spec.elements.forEach((element, index) => {
    const law = lawOf(element, spec.actuators);
    if (law.nodes.some(bad)) problems.push({ element: index, message: `${element.type}: a node is not in the network` });
    if (law.actuator >= spec.actuators.length)
      problems.push({ element: index, message: `${element.type}: its actuator is not in the network` });
    for (const [size, value] of Object.entries(element)) {
      if (typeof value === 'number' && !Number.isFinite(value))
        problems.push({ element: index, message: `${element.type}: ${size} is not a finite number` });
    }
  });
  spec.actuators.forEach((actuator, index) => {
    if (actuator.chambers.some((chamber) => bad(chamber.node))) problems.push({ actuator: index, message: 'a chamber is at no node' });
    if (!(actuator.low <= actuator.high)) problems.push({ actuator: index, message: 'its low stop lies above its high stop' });
  });
  for (const gas of spec.gas) if (bad(gas.node)) problems.push({ message: 'a gas charge is at no node' });
  return problems;
}

export function compile(spec: NetworkSpec): Network {
  const problems = problemsOf(spec);
  if (problems[0]) throw new Error(`network cannot be compiled: ${problems[0].message}`);
  const laws = spec.elements.map((element) => lawOf(element, spec.actuators));
  const nodeCount = spec.nodes.length;
  const unknownOf = new Int32Array(nodeCount).fill(-1);
  const fixedPressures = new Float64Array(nodeCount);
  const ceilings = new Float64Array(nodeCount);
  const nodeOf: number[] = [];
  spec.nodes.forEach((node, i) => {
    ceilings[i] = node.ceiling ?? CEILING;
    if (i === 0 || node.fixed !== undefined) fixedPressures[i] = node.fixed ?? 0;
    else unknownOf[i] = nodeOf.push(i) - 1;
  });
  const free = nodeOf.length;
  const firstVelocity = free;
  let size = free + spec.actuators.length;
  const ownOf = new Int32Array(laws.length).fill(-1);
  laws.forEach((law, e) => {
    if (law.own) ownOf[e] = size++;
  });

  // Collect the pattern, then give every derivative its slot.
  const columns: Set<number>[] = Array.from({ length: size }, () => new Set<number>());
  for (let i = 0; i < size; i++) columns[i]!.add(i);
  const touch = (row: number, column: number): void => {
    if (row >= 0 && column >= 0) columns[column]!.add(row);
  };
  const each = (visit: (row: number, column: number) => void): void => {
    laws.forEach((law, e) => {
      for (let o = 0; o < outputsOf(law); o++) {
        const row = o < law.terminals ? unknownOf[law.nodes[o]!]! : ownOf[e]!;
        for (const node of law.nodes) visit(row, unknownOf[node]!);
        if (law.own) visit(row, ownOf[e]!);
        if (law.actuator >= 0) visit(row, firstVelocity + law.actuator);
      }
    });
  };
  each(touch);
  spec.actuators.forEach((actuator, a) => {
    for (const chamber of actuator.chambers) {
      touch(firstVelocity + a, unknownOf[chamber.node]!);
      touch(unknownOf[chamber.node]!, firstVelocity + a);
    }
  });
  const start = new Int32Array(size + 1);
  const rowList: number[] = [];
  const slotOf = new Map<number, number>();
  for (let c = 0; c < size; c++) {
    for (const r of [...columns[c]!].sort((a, b) => a - b)) {
      slotOf.set(r * size + c, rowList.length);
      rowList.push(r);
    }
    start[c + 1] = rowList.length;
  }
  const entries = rowList.length;
  const rows = Int32Array.from(rowList);
  const slot = (row: number, column: number): number => (row < 0 || column < 0 ? entries : slotOf.get(row * size + column)!);
  const slotList: number[] = [];
  each((row, column) => slotList.push(slot(row, column)));
  const slotStart = new Int32Array(laws.length + 1);
  const inputStart = new Int32Array(laws.length + 1);
  const flowStart = new Int32Array(laws.length + 1);
  const flowRows: number[] = [];
  const inputNodes: number[] = [];
  const inputHeads: number[] = [];
  laws.forEach((law, e) => {
    slotStart[e + 1] = slotStart[e]! + inputsOf(law) * outputsOf(law);
    inputStart[e + 1] = inputStart[e]! + law.nodes.length;
    flowStart[e + 1] = flowStart[e]! + law.terminals;
    law.nodes.forEach((node, i) => {
      inputNodes.push(node);
      inputHeads.push(law.heads[i] ?? 0);
      // Flows of fixed nodes go to a spare row past the last.
      if (i < law.terminals) flowRows.push(unknownOf[node]! < 0 ? size : unknownOf[node]!);
    });
  });
  const rowStart = new Int32Array(size + 1);
  const rowSlots: number[] = [];
  const byRow: number[][] = Array.from({ length: size }, () => []);
  for (let c = 0; c < size; c++) for (let k = start[c]!; k < start[c + 1]!; k++) byRow[rows[k]!]!.push(k);
  byRow.forEach((list, r) => {
    rowSlots.push(...list);
    rowStart[r + 1] = rowSlots.length;
  });

  const chamberStart = new Int32Array(spec.actuators.length + 1);
  const chamberNodes: number[] = [];
  const chamberHeads: number[] = [];
  const chamberForceSlot: number[] = [];
  const chamberFlowSlot: number[] = [];
  const forceScale = new Float64Array(spec.actuators.length);
  const creep = new Float64Array(spec.actuators.length);
  spec.actuators.forEach((actuator, a) => {
    let area = 0;
    for (const chamber of actuator.chambers) {
      chamberNodes.push(chamber.node);
      chamberHeads.push(chamber.head ?? 0);
      chamberForceSlot.push(slot(firstVelocity + a, unknownOf[chamber.node]!));
      chamberFlowSlot.push(slot(unknownOf[chamber.node]!, firstVelocity + a));
      area += Math.max(Math.abs(chamber.area), ...(chamber.areaSteps?.area.map(Math.abs) ?? []));
    }
    forceScale[a] = area > 0 ? area : 1;
    creep[a] = actuator.creep ?? CREEP;
    chamberStart[a + 1] = chamberNodes.length;
  });

  // Elements stamped in loops are those whose rows and slots are the plain two by four.
  const batches: Batch[] = [];
  const looped = new Set<number>();
  for (const type of ['path', 'check'] as const) {
    const specs: (PathSpec | CheckSpec)[] = [];
    const rowsOf: number[] = [];
    const slotsOf: number[] = [];
    spec.elements.forEach((element, e) => {
      if (element.type !== type) return;
      looped.add(e);
      specs.push(element);
      rowsOf.push(flowRows[flowStart[e]!]!, flowRows[flowStart[e]! + 1]!);
      slotsOf.push(...slotList.slice(slotStart[e]!, slotStart[e]! + 4));
    });
    batches.push(new Batch(specs, type === 'check', rowsOf, slotsOf));
  }

  return {
    spec,
    batches,
    general: Int32Array.from(laws.keys()).filter((e) => !looped.has(e)),
    parameters: new Float64Array(spec.parameters),
    laws,
    size,
    unknownOf,
    nodeOf: Int32Array.from(nodeOf),
    free,
    fixedPressures,
    ceilings,
    firstVelocity,
    ownOf,
    start,
    rows,
    order: minimumDegree(size, start, rows),
    entries,
    diagonal: Int32Array.from({ length: size }, (_, i) => slot(i, i)),
    rowStart,
    rowSlots: Int32Array.from(rowSlots),
    inputStart,
    inputNodes: Int32Array.from(inputNodes),
    inputHeads: Float64Array.from(inputHeads),
    slotStart,
    slots: Int32Array.from(slotList),
    flowStart,
    flowRows: Int32Array.from(flowRows),
    chamberStart,
    chamberNodes: Int32Array.from(chamberNodes),
    chamberHeads: Float64Array.from(chamberHeads),
    chamberForceSlot: Int32Array.from(chamberForceSlot),
    chamberFlowSlot: Int32Array.from(chamberFlowSlot),
    forceScale,
    creep,
    endless: Uint8Array.from(spec.actuators, (actuator) => (Number.isFinite(actuator.high) ? 0 : 1)),
    knots: spec.actuators.map((_, a) => sortedKnots(ownKnots(spec, a))),
    grounded: groundedNodes(spec, laws, unknownOf),
  };
}

function ownKnots(spec: NetworkSpec, a: number): number[] {
  const actuator = spec.actuators[a]!;
  const knots = [actuator.low, actuator.high, ...(actuator.spring?.at ?? [])];
  for (const chamber of actuator.chambers) knots.push(...(chamber.areaSteps?.at ?? []));
  for (const element of spec.elements) {
    if (element.type === 'camPath' && element.actuator === a) knots.push(...element.at);
    if (element.type === 'cushion' && element.actuator === a) {
      knots.push(element.end === 'extended' ? actuator.high - element.length : actuator.low + element.length);
    }
  }
  return knots;
}

function groundedNodes(spec: NetworkSpec, laws: readonly Law[], unknownOf: Int32Array): Int32Array {
  const parent = Int32Array.from({ length: spec.nodes.length }, (_, i) => i);
  const find = (i: number): number => {
    let root = i;
    while (parent[root] !== root) root = parent[root]!;
    return root;
  };
  for (const law of laws) {
    // What neither leaks a floor nor always joins (a pressure-opened valve) may leave its other side alone.
    if (!law.floor && law.joins && !law.own && !law.always) continue;
    for (let i = 1; i < law.terminals; i++) parent[find(law.nodes[i]!)] = find(law.nodes[0]!);
  }
  const tied = new Set<number>();
  spec.nodes.forEach((_, i) => {
    if (unknownOf[i]! < 0) tied.add(find(i));
  });
  const grounded: number[] = [];
  spec.nodes.forEach((_, i) => {
    if (!tied.has(find(i))) {
      tied.add(find(i));
      grounded.push(i);
    }
  });
  return Int32Array.from(grounded);
}
