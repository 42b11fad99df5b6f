/** The elements of a directional control valve: one edge for each pair of ports and flow figure, opened by the position it stands in. */
import type { NodeIndex, Param } from '@oilway/engine';
import type { Assembly, FlowAt } from '../assembly/assembly.ts';
import { pathFlow, pathK } from '../assembly/laws.ts';
import type { Setting } from '../assembly/machine.ts';
import { BAR, CM3_PER_MINUTE, LITRE_PER_MINUTE, toLitresPerSecond } from '../assembly/units.ts';
import type { Component } from '../model/circuit.ts';
import { type Positions, positionsOf, type Side } from './directional-positions.ts';
import { addLeak, scaled, SEAT_LEAK } from './passing.ts';
import { cams, coils, flowAt, has, si, word } from './read.ts';

/** Command below which the paths of the centre fade out. */
const FADE = 0.1;
/** Width of a cam's edge, m. */
const CAM_EDGE = 1e-3;
/** Path of the load-sensing signal. */
const LS_PATH: FlowAt = { flow: 5 * LITRE_PER_MINUTE, drop: BAR };

/** How far each position is in force, 0..1. */
function weightsOf(id: string, positions: Positions, proportional: boolean, setting: Setting): Readonly<Record<Side, number>> {
  const stand = setting.valves[id] ?? { position: positions.rest };
  const weights: Record<Side, number> = { a: 0, b: 0, centre: 0 };
  const y = Math.min(1, Math.max(0, stand.opening ?? 1));
  weights[stand.position] = y;
  if (stand.position === positions.rest) weights[stand.position] = 1;
  else if (proportional) weights[positions.rest] = Math.max(0, 1 - y / FADE);
  return weights;
}

interface Edge {
  readonly from: string;
  readonly to: string;
  readonly passes: FlowAt;
  readonly sides: Side[];
}

function edgesOf(positions: Positions): Edge[] {
  const edges: Edge[] = [];
  for (const side of positions.sides) {
    for (const path of positions.paths[side]) {
      if (path.passes === undefined) continue;
      const { from, to, passes } = path;
      const there = edges.find(
        (e) =>
          ((e.from === from && e.to === to) || (e.from === to && e.to === from)) &&
          e.passes.flow === passes.flow &&
          e.passes.drop === passes.drop,
      );
      if (there === undefined) edges.push({ from, to, passes, sides: [side] });
      else if (!there.sides.includes(side)) there.sides.push(side);
    }
  }
  return edges;
}

/** Adds the valve; a string says why it cannot be computed. */
export function addDirectional(component: Component, into: Assembly): string | undefined {
  const positions = positionsOf(component);
  for (const side of positions.sides) {
    const bare = positions.paths[side].find((p) => p.passes === undefined);
    if (bare !== undefined) return `${component.id} has no \`passes\` for ${bare.from} to ${bare.to}`;
  }
  if (component.shape !== undefined && component.shape.positions >= 3 && !has(component, 'centre'))
    return `${component.id} has no \`centre\``;
  const ofCam = camWeights(component, into, positions);
  if (typeof ofCam === 'string') return ofCam;
  const node = (port: string): NodeIndex => into.nodeOrBlind(component, port);
  const proportional = has(component, 'proportional');
  const compensator = si(component, 'compensator');
  const apply: { readonly parameter: Param; readonly sides: readonly Side[] }[] = [];
  const weight = (name: string, sides: readonly Side[]): Param => {
    const parameter = into.parameter(component, name, 0);
    apply.push({ parameter, sides });
    return parameter;
  };
  const taken = new Map<string, number>();
  for (const edge of edgesOf(positions)) {
    const nth = taken.get(`${edge.from}-${edge.to}`) ?? 0;
    taken.set(`${edge.from}-${edge.to}`, nth + 1);
    const words = `${edge.from} to ${edge.to}`;
    const opening = weight(`open ${edge.from}-${edge.to}${nth === 0 ? '' : ` ${edge.sides.join(' ')}`}`, edge.sides);
    const forward = edge.to !== 'P';
    const [from, to] = forward ? [edge.from, edge.to] : [edge.to, edge.from];
    const k = pathK(scaled(edge.passes, into));
    const ports = [from, to];
    const driven = edge.sides.some((s) => s !== positions.rest);
    const limiting = driven && from === 'P' && to !== 'T';
    let element: number;
    if (ofCam !== undefined) {
      const opening1 = sumOf(ofCam, edge.sides, positions.rest);
      element = into.add(
        component,
        {
          type: 'camPath',
          a: node(from),
          b: node(to),
          k,
          actuator: ofCam.actuator,
          at: ofCam.at,
          opening: opening1,
        },
        ports,
        words,
      );
    } else if (compensator !== undefined && limiting) {
      const limit = toLitresPerSecond(pathFlow(scaled(edge.passes, into), compensator));
      element = into.add(component, { type: 'compensatedEdge', a: node(from), b: node(to), k, opening, limit }, ports, words);
    } else {
      element = into.add(component, { type: 'path', a: node(from), b: node(to), k, opening }, ports, words);
    }
    into.limitation(
      proportional && limiting
        ? { component: component.id, words: `${component.id} command`, targets: [{ parameter: opening }] }
        : { component: component.id, words: `${component.id} passes ${words}`, targets: [{ element, size: 'k' }] },
    );
  }
  addSignal(component, into, positions, weight);
  addSpoolLeaks(component, into);
  into.onSetting((setting, put) => {
    const weights = weightsOf(component.id, positions, proportional, setting);
    for (const { parameter, sides } of apply)
      put(
        parameter,
        Math.min(
          1,
          sides.reduce((sum, s) => sum + weights[s], 0),
        ),
      );
  });
  into.valve({
    component: component.id,
    rest: positions.rest,
    parameters: apply.map((a) => a.parameter),
    takes: si(component, 'takes') ?? 0.05,
    proportional,
  });
  const external = word(component, 'external') === 'pilot';
  if (external || word(component, 'internal') === 'pilot') {
    const pilot = external ? into.node(component, 'X') : into.node(component, 'P');
    if (pilot !== undefined)
      into.pilotedValve({
        component: component.id,
        pilot,
        drain: into.node(component, 'Y') ?? into.node(component, 'T') ?? 0,
        needs: si(component, 'needs') ?? 5 * BAR,
      });
  }
  return undefined;
}

/** LS follows the working port that P feeds; with none it is joined to T. */
function addSignal(
  component: Component,
  into: Assembly,
  positions: Positions,
  weight: (name: string, sides: readonly Side[]) => Param,
): void {
  const ls = into.node(component, 'LS');
  if (ls === undefined) return;
  const fed = (side: Side): string =>
    positions.paths[side].map((p) => (p.from === 'P' ? p.to : p.to === 'P' ? p.from : undefined)).find((p) => p === 'A' || p === 'B') ??
    'T';
  for (const port of ['A', 'B', 'T']) {
    const sides = positions.sides.filter((s) => fed(s) === port);
    if (sides.length === 0) continue;
    into.add(
      component,
      { type: 'path', a: into.nodeOrBlind(component, port), b: ls, k: pathK(LS_PATH), opening: weight(`signal ${port}`, sides) },
      [port, 'LS'],
      `${port} to LS`,
    );
  }
}

function addSpoolLeaks(component: Component, into: Assembly): void {
  const general = flowAt(component, 'passes') ?? positionsOf(component).paths.a[0]?.passes;
  const spool = Math.max(10, ((general?.flow ?? 0) * 0.0005) / CM3_PER_MINUTE);
  const figure = has(component, 'poppet') ? SEAT_LEAK : spool;
  for (const [a, b] of [
    ['P', 'A'],
    ['P', 'B'],
    ['A', 'T'],
    ['B', 'T'],
  ] as const) {
    const [na, nb] = [into.node(component, a), into.node(component, b)];
    if (na !== undefined && nb !== undefined) addLeak(component, into, { node: na, port: a }, { node: nb, port: b }, figure);
  }
}

interface CamWeights {
  readonly actuator: number;
  readonly at: readonly number[];
  readonly inside: Readonly<Partial<Record<Side, readonly number[]>>>;
}

/** A cam-operated valve: position by the actuator's place, edges 1 mm wide outside the range. */
function camWeights(component: Component, into: Assembly, positions: Positions): CamWeights | string | undefined {
  const all = cams(component, 'cam');
  const first = all[0];
  if (first === undefined) return undefined;
  if (coils(component).length > 0) return `${component.id} has a cam and a coil: not computed yet`;
  if (all.some((c) => c.actuator !== first.actuator)) return `${component.id} has cams on two actuators: not computed yet`;
  const actuator = into.body(first.actuator);
  if (actuator === undefined) return `${component.id}: its actuator ${first.actuator} is not computed`;
  const at = [...new Set(all.flatMap((c) => [c.from.si - CAM_EDGE, c.from.si, c.to.si, c.to.si + CAM_EDGE]))].sort((x, y) => x - y);
  const inside: Partial<Record<Side, readonly number[]>> = {};
  for (const cam of all) {
    const side: Side = cam.side ?? 'a';
    if (side === positions.rest) return `${component.id}: its cam moves it to the position it is sprung to`;
    inside[side] = at.map((x) => Math.min(1, Math.max(0, Math.min((x - cam.from.si) / CAM_EDGE, (cam.to.si - x) / CAM_EDGE) + 1)));
    into.knot(first.actuator, cam.from.si, `${component.id} moves to ${side}`);
    into.knot(first.actuator, cam.to.si, `${component.id} leaves ${side}`);
  }
  return { actuator, at, inside };
}

function sumOf(cam: CamWeights, sides: readonly Side[], rest: Side): readonly number[] {
  const total = (i: number): number => Object.values(cam.inside).reduce((sum, of) => sum + (of?.[i] ?? 0), 0);
  return cam.at.map((_, i) =>
    Math.min(
      1,
      sides.reduce((sum, s) => sum + (s === rest ? Math.max(0, 1 - total(i)) : (cam.inside[s]?.[i] ?? 0)), 0),
    ),
  );
}
