/** Builds the network of a circuit: nodes for nets, laws of the kinds, bodies, gas charges, lines with loss. */
import type { ActuatorSpec, ElementSpec, ForceTable, NodeIndex, NodeSpec, Param } from '@oilway/engine';
import { oilOf } from '../fluid/oil.ts';
import { KINDS } from '../kinds/index.ts';
import { DEFAULT_MECHANICAL } from '../kinds/pump.ts';
import { si } from '../kinds/read.ts';
import type { Circuit, Component, Piece } from '../model/circuit.ts';
import type { Assumption } from '../study/study.ts';
import type { Apply, Assembled, BodyNote, BrakeNote, ChamberNote, ElementNote, GasNote, PumpNote } from './assembled.ts';
import type { Assembly, Lifting, Limitation, Memory, OpeningOf, PilotedValve, ValveOf } from './assembly.ts';
import { type BodyGroup, groupBodies } from './bodies.ts';
import { addLines, piecesWithoutLoss } from './lines.ts';
import { DEAD_SHARE, netVolume } from './storage.ts';
import { GRAVITY, toKilo, toLitres, toMPa } from './units.ts';

/** Engine polytropic exponent of free air in the oil. */
const AIR_EXPONENT = 1.4;
/** Storage that every node keeps, L/MPa. */
const LEAST_STORAGE = 1e-9;
/** Default rating above which oil has no outlet, MPa. */
const CEILING = 60;

/** Properties that no law reads: an error in one of them costs its component nothing. */
const FACTS: ReadonlySet<string> = new Set([
  ...['code', 'attitude', 'certified', 'fineness', 'collapse', 'inlet', 'casing', 'mounted', 'connection', 'cleanliness', 'cold', 'hot'],
  ...[
    'starts',
    'peak',
    'power',
    'engine',
    'breather',
    'usable',
    'surface',
    'ambient',
    'coolant',
    'range',
    'test',
    'on',
    'at',
    'from',
    'rises',
  ],
  ...['falls', 'outside', 'broken', 'locked', 'seals', 'bladder', 'piston', 'diaphragm', 'gas'],
]);

/** Repeats without the components that turn out not to be computable, until none is left. */
export function assembleNetwork(circuit: Circuit, temperature?: number, leakage = true): Assembled {
  const out = new Map<string, string>(Object.entries(circuit.unknown));
  for (const c of circuit.components) {
    if (KINDS[c.kind].assemble === undefined && !out.has(c.id)) out.set(c.id, `${c.id}: a ${KINDS[c.kind].noun} is not computed yet`);
  }
  for (const c of circuit.components) {
    const bad = c.properties.find((p) => p.value.type === 'unknown' && !FACTS.has(p.name));
    if (bad?.value.type === 'unknown' && !out.has(c.id)) out.set(c.id, `${c.id}: ${bad.value.why}`);
  }
  for (;;) {
    const refused = new Map<string, string>();
    const built = build(circuit, out, refused, temperature, leakage);
    if (refused.size === 0) return built;
    for (const [id, why] of refused) out.set(id, why);
  }
}

function build(
  circuit: Circuit,
  out: ReadonlyMap<string, string>,
  refused: Map<string, string>,
  temperature: number | undefined,
  leakage: boolean,
): Assembled {
  const { oil, assumptions: ofOil } = oilOf(circuit, temperature);
  const assumptions: Assumption[] = [...ofOil];
  const said = new Set<string>();
  const components = new Map(circuit.components.filter((c) => !out.has(c.id)).map((c) => [c.id, c]));
  const pieces = new Map<string, Piece>(circuit.pieces.map((p) => [p.id, p]));

  const nodes: { storage: number; volume: number; fixed?: number; ceiling: number }[] = [
    { storage: LEAST_STORAGE, volume: 0, fixed: 0, ceiling: CEILING },
  ];
  const nodeOf = new Map<string, NodeIndex>();
  const netOf = new Map<NodeIndex, string>();
  const netOfPort = new Map<string, { readonly id: string; readonly joined: boolean }>();
  let assumedVolumes = 0;
  for (const net of circuit.nets) {
    for (const p of net.ports)
      netOfPort.set(`${p.component}.${p.port}`, {
        id: net.id,
        joined: net.pieces.length > 0 || net.ports.length > 1 || net.reservoir !== undefined,
      });
    if (net.reservoir !== undefined) {
      nodeOf.set(net.id, 0);
      continue;
    }
    const { volume, walls, assumed } = netVolume(net, pieces);
    if (assumed) assumedVolumes++;
    nodeOf.set(net.id, nodes.length);
    netOf.set(nodes.length, net.id);
    nodes.push({ storage: LEAST_STORAGE + toLitres(walls) / toMPa(1), volume: toLitres(volume), ceiling: CEILING });
  }

  const parameters: number[] = [];
  const apply: Apply[] = [];
  const specs: ElementSpec[] = [];
  const elements: ElementNote[] = [];
  const chambers: ChamberNote[] = [];
  const gases: GasNote[] = [];
  const pumps: PumpNote[] = [];
  const brakes: BrakeNote[] = [];
  const memories: Memory[] = [];
  const valves: ValveOf[] = [];
  const piloted: PilotedValve[] = [];
  const limitations: Limitation[] = [];
  const openings: OpeningOf[] = [];
  const liftings: Lifting[] = [];

  const groups = groupBodies(circuit, (c) => components.has(c.id));
  const bodyOf = new Map<string, number>(groups.flatMap((g, i) => g.actuators.map((id) => [id, i] as const)));
  const drafts = groups.map((group) => ({
    group,
    springs: [] as ForceTable[],
    seal: 0,
    pressureFriction: 0,
    knots: [] as { at: number; words: string }[],
  }));

  const head = (component: Component): number => (si(component, 'elevation') ?? 0) * oil.density * GRAVITY;
  const heads: Record<string, number> = {};
  for (const c of components.values()) if (head(c) !== 0) heads[c.id] = head(c);

  const inners = new Map<string, NodeIndex>();
  const newNode = (volume: number): NodeIndex => {
    nodes.push({ storage: LEAST_STORAGE, volume: toLitres(volume), ceiling: CEILING });
    return nodes.length - 1;
  };
  const inner = (key: string, volume: number): NodeIndex => {
    const there = inners.get(key);
    if (there !== undefined) return there;
    const made = newNode(volume);
    inners.set(key, made);
    return made;
  };
  const parameter = (value: number): Param => parameters.push(value) - 1;
  const assume = (a: Assumption): void => {
    const key = `${a.component}|${a.property}|${a.value}`;
    if (said.has(key)) return;
    said.add(key);
    assumptions.push(a);
  };

  const into: Assembly = {
    circuit,
    oil,
    leakage,
    component: (id) => components.get(id),
    node(component, port) {
      const net = netOfPort.get(`${component.id}.${port}`);
      return net?.joined === true ? nodeOf.get(net.id) : undefined;
    },
    nodeOrBlind(component, port) {
      const net = netOfPort.get(`${component.id}.${port}`);
      return (net === undefined ? undefined : nodeOf.get(net.id)) ?? inner(`${component.id}.${port}`, 1e-6);
    },
    inner: (component, name, volume = 1e-6) => inner(`${component.id} ${name}`, volume),
    parameter: (_component, _name, value) => parameter(value),
    add(component, law, ports, words = '') {
      const bad = Object.entries(law).find(([, v]) => typeof v === 'number' && !Number.isFinite(v));
      if (bad !== undefined)
        refused.set(component.id, `${component.id}${words === '' ? '' : ` ${words}`}: a figure is zero that must not be`);
      const h = toMPa(head(component));
      // All terminals of a component lie at its elevation; the engine reads as many heads as the law has terminals.
      const withHead = h === 0 ? {} : { heads: [h, h, h, h, h, h] };
      const withPilots = h !== 0 && law.type === 'piloted' ? { ...law, pilots: law.pilots.map((p) => ({ ...p, head: h })) } : law;
      specs.push({ ...withPilots, ...withHead, tag: elements.length } as ElementSpec);
      return elements.push({ component: component.id, words, ports }) - 1;
    },
    onSetting: (a) => void apply.push(a),
    assume,
    cannot: (component, why) => void refused.set(component.id, why),
    limitation: (l) => void limitations.push(l),
    opening: (o) => void openings.push(o),
    lifting: (l) => void liftings.push(l),
    memory: (m) => void memories.push(m),
    valve: (v) => void valves.push(v),
    pilotedValve: (v) => void piloted.push(v),
    pump(of) {
      const component = components.get(of.component);
      pumps.push({ ...of, mechanical: (component === undefined ? undefined : si(component, 'mechanical')) ?? DEFAULT_MECHANICAL });
    },
    body: (actuator) => bodyOf.get(actuator),
    chamber(component, chamber, port, full) {
      const body = bodyOf.get(component.id);
      if (body === undefined) return;
      const stages = chamber.areaSteps;
      chambers.push({
        component: component.id,
        port,
        body,
        node: chamber.node,
        area: chamber.area,
        ...(stages === undefined ? {} : { stages }),
        head: toMPa(head(component)),
      });
      const node = nodes[chamber.node];
      if (node !== undefined && node.fixed === undefined) node.volume += toLitres(full * DEAD_SHARE);
    },
    spring(component, table) {
      draftOf(component)?.springs.push(table);
    },
    sealFriction(component, newton) {
      const draft = draftOf(component);
      if (draft !== undefined) draft.seal += newton;
    },
    pressureFriction(component, share) {
      const draft = draftOf(component);
      if (draft !== undefined) draft.pressureFriction += share;
    },
    knot(actuator, at, words) {
      const body = bodyOf.get(actuator);
      if (body !== undefined) drafts[body]?.knots.push({ at, words });
    },
    gas(component, node, volume, precharge) {
      if (!(volume > 0) || !(precharge > 0)) refused.set(component.id, `${component.id}: volume and precharge must be more than zero`);
      gases.push({ component: component.id, node, volume, precharge });
    },
    brake(component, b) {
      const body = bodyOf.get(b.actuator);
      if (body === undefined) return;
      if (brakes.some((other) => other.body === body))
        refused.set(component.id, `${component.id}: a second brake on ${b.actuator} is not computed yet`);
      else brakes.push({ component: component.id, body, node: b.node, opens: b.opens, torque: b.torque });
    },
    store(node, storage) {
      const n = nodes[node];
      if (n !== undefined) n.storage += storage;
    },
    pumpFlow: [...components.values()].reduce((sum, c) => sum + theoreticalFlow(c, components), 0),
  };
  function draftOf(component: Component) {
    const body = bodyOf.get(component.id);
    return body === undefined ? undefined : drafts[body];
  }

  for (const component of components.values()) KINDS[component.kind].assemble?.(component, into);
  addLines(circuit, oil, nodeOf, (spec, piece) => {
    specs.push({ ...spec, tag: elements.length } as ElementSpec);
    elements.push({ component: piece, words: 'line', ports: [undefined, undefined] });
  });
  if (assumedVolumes > 0) {
    assume({
      component: '',
      property: 'volume',
      value: '0.2 L a net, 0.01 L a pilot or drain',
      source: 'memory',
      note: `${assumedVolumes} nets without bore and length; counts for rise times only`,
    });
  }

  const lossless = piecesWithoutLoss(circuit);
  if (lossless > 0) {
    assume({
      component: '',
      property: 'line loss',
      value: 'none',
      source: 'not counted',
      note: `${lossless} of ${circuit.pieces.length} pieces without bore and length; entry, exit and manifold losses are never counted`,
    });
  }

  const notComputed: Record<string, string> = {};
  for (const [id, why] of out) {
    notComputed[id] = why;
    for (const net of circuit.nets)
      if (net.ports.some((p) => p.component === id) && notComputed[net.id] === undefined) notComputed[net.id] = why;
  }

  for (const piece of circuit.pieces) {
    if (piece.nets[0] === piece.nets[1] || ((piece.bore ?? 0) > 0 && (piece.length ?? 0) > 0)) continue;
    for (const net of piece.nets) notComputed[net] ??= 'a line with a bore or length of zero';
  }

  const bodies: BodyNote[] = drafts.map((d) => bodyNote(d.group, d.seal, d.springs, d.knots));
  const actuators = drafts.map((d, i): ActuatorSpec => {
    const own = chambers
      .filter((c) => c.body === i)
      .map((c) => ({
        node: c.node,
        area: c.area,
        ...(c.head === 0 ? {} : { head: c.head }),
        ...(c.stages === undefined ? {} : { areaSteps: c.stages }),
      }));
    const brake = brakes.find((b) => b.body === i);
    const spring = bodies[i]?.spring;
    return {
      tag: i,
      // A brake feels its release pressure through a chamber that presses on nothing.
      chambers: brake === undefined ? own : [...own, { node: brake.node, area: 0, head: toMPa(heads[brake.component] ?? 0) }],
      low: d.group.stroke === Number.POSITIVE_INFINITY ? Number.NEGATIVE_INFINITY : 0,
      high: d.group.stroke,
      mass: toKilo(d.group.mass),
      ...(spring === undefined ? {} : { spring }),
      ...(d.pressureFriction === 0 ? {} : { pressureFriction: d.pressureFriction }),
      ...(brake === undefined ? {} : { brake: { chamber: own.length, torque: toKilo(brake.torque), opens: toMPa(brake.opens) } }),
    };
  });
  const gasSpecs = gases.map((g, i) => ({
    tag: i,
    node: g.node,
    head: toMPa(heads[g.component] ?? 0),
    volume: toLitres(g.volume),
    precharge: toMPa(g.precharge),
  }));
  return {
    circuit,
    oil,
    spec: {
      nodes: nodes satisfies readonly NodeSpec[],
      elements: specs,
      actuators,
      gas: gasSpecs,
      parameters: parameters.length,
      oil: { bulk: toMPa(oil.bulk), air: oil.air, exponent: AIR_EXPONENT },
    },
    parameters: Float64Array.from(parameters),
    apply,
    elements,
    specs,
    actuators,
    gasSpecs,
    netOf,
    nodeOf,
    chambers,
    bodies,
    bodyOf,
    gases,
    pumps,
    brakes,
    memories,
    valves,
    piloted,
    limitations,
    openings,
    liftings,
    assumptions,
    notComputed,
    heads,
  };
}

function theoreticalFlow(c: Component, components: ReadonlyMap<string, Component>): number {
  if (c.kind !== 'pump') return 0;
  const driven = c.properties.find((p) => p.name === 'driven')?.value;
  const drive = driven?.type === 'reference' ? components.get(driven.id) : undefined;
  return (si(c, 'displacement') ?? 0) * ((drive === undefined ? undefined : si(drive, 'speed')) ?? 0);
}

function bodyNote(
  group: BodyGroup,
  seal: number,
  springs: readonly ForceTable[],
  knots: readonly { readonly at: number; readonly words: string }[],
): BodyNote {
  const spring = springs[0] === undefined ? undefined : springs.reduce(addTables);
  return {
    id: group.actuators[0] ?? '',
    actuators: group.actuators,
    type: group.type,
    stroke: group.stroke,
    begins: group.begins,
    sealFriction: seal,
    ...(spring === undefined ? {} : { spring }),
    knots: [...knots]
      .sort((x, y) => x.at - y.at)
      .filter((k, i, all) => i === 0 || all[i - 1]?.at !== k.at || all[i - 1]?.words !== k.words),
  };
}

/** Sum of two straight-line springs on one body. */
function addTables(x: ForceTable, y: ForceTable): ForceTable {
  const at = [...new Set([...x.at, ...y.at])].sort((p, q) => p - q);
  return { at, force: at.map((p) => valueAt(x, p) + valueAt(y, p)) };
}
function valueAt(table: ForceTable, x: number): number {
  const { at, force } = table;
  let i = at.findIndex((p) => p >= x);
  if (i < 0) i = at.length;
  if (i === 0) return force[0] ?? 0;
  if (i === at.length) return force[at.length - 1] ?? 0;
  const [x0, x1, f0, f1] = [at[i - 1] ?? 0, at[i] ?? 0, force[i - 1] ?? 0, force[i] ?? 0];
  return x1 === x0 ? f1 : f0 + ((f1 - f0) * (x - x0)) / (x1 - x0);
}
