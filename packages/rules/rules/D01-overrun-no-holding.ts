/** D01: a carried load moves, or is held by nothing but a leaking spool, with the machine at rest, off or stopped. */
import { type Component, read, type StateResult, type Study, type Variant } from '@oilway/circuit';
import { type Edge, graphOf, type Graph } from '../graph/graph.ts';
import { sprungPosition, positionWords } from '../graph/paths.ts';
import { type Passing, type Way, waysFrom } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { counterbalance } from '../fixes/counterbalance.ts';
import type { Finding, Rule, RuleContext, Severity } from '../rule.ts';
import { show } from '../words.ts';
import { relatedTo } from './pump-guard.ts';
import { type Carried, carriedLoads, chamberArea } from './sources.ts';

/** What holds a load without leaking: every seat, and what is shut by hand. */
function isSeat(graph: Graph, edge: Edge): boolean {
  if (edge.class === 'never') return edge.kind !== 'sequence' && edge.kind !== 'reducing';
  const component = graph.component(edge.component);
  return component?.kind === 'directional' && read.has(component, 'poppet');
}

/** The leaking element (spool, sequence, reducing, deceleration valve) that alone closes the chamber. */
function spoolAt(graph: Graph, net: string): { readonly spool: Component; readonly way: Way } | undefined {
  const leaking = (e: Edge) => ['directional', 'sequence', 'reducing', 'deceleration'].includes(e.kind) && e.class !== 'always';
  const passing: Passing = (e) => (isSeat(graph, e) || leaking(e) ? undefined : 0);
  for (const way of waysFrom(graph, net, passing).values()) {
    for (const edge of graph.from(way.net)) {
      if (isSeat(graph, edge) || !leaking(edge)) continue;
      const spool = graph.component(edge.component);
      if (spool !== undefined) return { spool, way: { net: edge.target, cost: 0, edges: [...way.edges, edge] } };
    }
  }
  return undefined;
}

/** The way by which the chamber's oil runs to a reservoir with no coil live; undefined where something closes it. */
function openWhenDead(graph: Graph, net: string): Way | undefined {
  const passing: Passing = (e) => {
    if (e.class === 'always' || e.byHand === true || e.kind === 'coupling' || e.kind === 'burst') return 0;
    const valve = e.kind === 'directional' ? graph.component(e.component) : undefined;
    const rest = valve === undefined ? undefined : sprungPosition(valve);
    return rest !== undefined && e.positions?.includes(rest) === true ? 0 : undefined;
  };
  return [...waysFrom(graph, net, passing).values()].find((w) => graph.net(w.net)?.reservoir !== undefined);
}

/** Pressure the load alone puts on its chamber, Pa. */
function loadPressure(carried: Carried): number | undefined {
  const area = chamberArea(carried.actuator, carried.port);
  return area === undefined ? undefined : carried.force / area;
}

/** A load that the seals alone hold (3 bar x bore area where nothing is declared) is not worth a holding valve. */
function beyondSeals(carried: Carried): boolean {
  const area = chamberArea(carried.actuator, 'cap');
  return area === undefined || carried.force > (read.si(carried.actuator, 'seal') ?? 3e5) * area;
}

function moving(
  study: Study,
  carried: Carried,
): { readonly state: StateResult; readonly variant: Variant; readonly motion: Variant['moving'][number] } | undefined {
  const order = ['OFF', 'REST', 'STOP'];
  const states = study.states.filter((s) => order.includes(s.state)).sort((a, b) => order.indexOf(a.state) - order.indexOf(b.state));
  for (const state of states) {
    for (const variant of state.variants) {
      const motion = variant.moving.find((m) => m.id === carried.actuator.id && m.cause === 'load' && m.relaxes === undefined);
      if (motion !== undefined && Math.sign(motion.velocity) === (carried.inward ? -1 : 1)) return { state, variant, motion };
    }
  }
  return undefined;
}

function severe(carried: Carried, motion: boolean): Severity {
  if (carried.people === 'never') return 'warning';
  return motion || carried.people === 'near' || carried.people === 'under' ? 'error' : 'warning';
}

function load(context: RuleContext, carried: Carried): string {
  const dimension = carried.actuator.kind === 'cylinder' ? 'force' : 'torque';
  const pressure = loadPressure(carried);
  return `${show(context.circuit, carried.force, dimension)}${pressure === undefined ? '' : `, ${show(context.circuit, pressure, 'pressure')} at ${carried.actuator.id}.${carried.port}`}`;
}

function falls(context: RuleContext, graph: Graph, carried: Carried): Finding | undefined {
  const { actuator, port } = carried;
  const people = carried.people === 'near' || carried.people === 'under' ? ` People are ${carried.people} it.` : '';
  const common = {
    severity: severe(carried, true),
    origin: actuator.nameOrigin,
    place: actuator.id,
    related: [{ message: `this load is carried by the oil at ${actuator.id}.${port}`, origin: carried.load.origin }],
    fixes: [actuator.kind === 'cylinder' ? counterbalance(context, graph, carried) : undefined],
    hides: ['D14', 'L12'],
  };
  if (context.study?.states.some((s) => s.state === 'OFF' && s.variants.some((v) => v.point.solved)) === true) {
    const found = moving(context.study, carried);
    if (found === undefined) return undefined;
    const speed = show(context.circuit, Math.abs(found.motion.velocity), actuator.kind === 'cylinder' ? 'velocity' : 'rotation');
    return tell(D01, {
      ...common,
      what: `${actuator.id} moves under its load (${load(context, carried)}) in ${found.state.id}${found.variant.label === '' ? '' : ` (${found.variant.label})`}: ${speed} by way of ${found.motion.path}.${people}`,
      state: found.state.id,
      computed: true,
    });
  }
  const net = graph.netAt(actuator.id, port)?.id;
  const way = net === undefined || !carried.fixed || actuator.kind !== 'cylinder' ? undefined : openWhenDead(graph, net);
  if (way === undefined) return undefined;
  const through = way.edges.flatMap((e) => {
    const valve = graph.component(e.component);
    if (e.kind === 'pipe' || valve === undefined) return [];
    const rest = valve.kind === 'directional' ? sprungPosition(valve) : undefined;
    return [rest === undefined ? e.component : `${e.component} (${e.from} to ${e.to}, position ${positionWords(valve, rest)})`];
  });
  return tell(D01, {
    ...common,
    what: `Nothing holds the load on ${actuator.id} (${load(context, carried)}) in OFF: the oil of ${actuator.id}.${port} runs to the reservoir by way of ${through.join(', ')}.${people}`,
    state: 'OFF',
    computed: false,
  });
}

/** Leakage of a closed spool edge, m3/s at 1e7 Pa: declared, or 0.05 % of its `passes` flow, at least 10 cm3/min (common practice, from memory). */
function leakAt(spool: Component): number {
  const declared = read.flowAt(spool, 'leak');
  if (declared !== undefined) return (declared.flow / declared.drop) * 1e7;
  const least = 10e-6 / 60;
  if (spool.kind !== 'directional') return 2 * least;
  return Math.max(least, 0.0005 * (read.flowAt(spool, 'passes')?.flow ?? 0));
}

function sinks(context: RuleContext, graph: Graph, carried: Carried): Finding | undefined {
  const { actuator, port } = carried;
  const net = graph.netAt(actuator.id, port);
  const area = chamberArea(actuator, port);
  if (actuator.kind !== 'cylinder' || !carried.fixed || net === undefined || net.open === true || net.plugged !== undefined)
    return undefined;
  const found = spoolAt(graph, net.id);
  if (found === undefined || area === undefined) return undefined;
  const perMinute = ((leakAt(found.spool) * (carried.force / area)) / 1e7 / area) * 60;
  const people = carried.people === 'near' || carried.people === 'under' ? ` People are ${carried.people} it.` : '';
  return tell(D01, {
    what: `Only ${found.spool.id}, which leaks, holds the load on ${actuator.id} (${load(context, carried)}): it sinks about ${show(context.circuit, perMinute, 'length')} a minute and falls when a line to ${actuator.id}.${port} bursts.${people}`,
    severity: severe(carried, false),
    origin: actuator.nameOrigin,
    place: actuator.id,
    related: [
      relatedTo(found.spool, `${found.spool.id} is all that closes ${actuator.id}.${port}`),
      { message: `this load is carried by the oil at ${actuator.id}.${port}`, origin: carried.load.origin },
    ],
    fixes: [counterbalance(context, graph, carried)],
    computed: false,
  });
}

/** A cylinder that stands or hangs and says nothing of its load: nothing can be decided, and that is said. */
function unsaid(context: RuleContext): Finding[] {
  return context.circuit.components.flatMap((cylinder) => {
    const attitude = cylinder.properties.find((p) => p.name === 'attitude')?.value;
    if (cylinder.kind !== 'cylinder' || attitude?.type !== 'attitude' || Math.abs(Math.sin(attitude.angle)) < 1e-9) return [];
    const loads = context.circuit.loads.filter((l) => l.actuators.includes(cylinder.id));
    if (loads.some((l) => l.properties.some((p) => ['mass', 'inward', 'outward'].includes(p.name)))) return [];
    return [
      tell(D01, {
        what: `${cylinder.id} does not lie level, and no mass, inward or outward force is declared for it: whether it needs a holding valve cannot be decided.`,
        severity: 'information',
        origin: cylinder.nameOrigin,
        place: cylinder.id,
        mend: 'Say the load: `mass`, `inward` or `outward`; `inward 0 N` where nothing acts on it.',
        computed: false,
      }),
    ];
  });
}

export const D01: Rule = {
  code: 'D01',
  name: 'overrun-no-holding',
  title: 'Nothing holds the load',
  severity: 'error',
  why: 'A load that can move by itself falls on people, tools and parts.',
  ground: 'ISO 4413, control of movements; ISO 12100',
  mend: 'Put a counterbalance valve or a pilot-operated check valve on the port of the chamber that carries the load.',
  needs: 'topology',
  figures: true,
  page: `
Inward forces and weight with the rod up are carried by the cap oil, outward ones by the rod oil.

**It moves** (error; warning with \`people never\`): in OFF, REST or STOP, in some variant of valves, accumulators and load, the computed state
moves in the direction of its load. Friction is not counted on. Before the figures are there, a way from the chamber to the reservoir that is open
with no coil live says the same.

**It sinks** (warning; error with \`people near\` or \`under\`): nothing but a leaking element (directional spool, sequence, reducing or deceleration valve)
closes the chamber. The way it sinks a minute follows from the leakage declared, or 0.05 % of the valve's flow at 100 bar (common
practice, from memory).

Stays clean: a pilot-operated check, counterbalance valve, check or poppet valve at the chamber; a closed hand valve; a pressed part that springs back
within a few millimetres (a table that falls to nothing); a load smaller than the friction of the seals; a level cylinder without declared forces. A cylinder that is not
level and says nothing of its load is told for information.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    const told = new Set<string>();
    const found = carriedLoads(graph).flatMap((carried) => {
      if (carried.actuator.kind === 'cylinder' && !beyondSeals(carried)) return [];
      const one = falls(context, graph, carried) ?? sinks(context, graph, carried);
      if (one === undefined || told.has(one.place)) return [];
      told.add(one.place);
      return [one];
    });
    return [...found, ...unsaid(context)];
  },
};
