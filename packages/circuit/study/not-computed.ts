/** What depends on something unknown: nets reached from a component that was taken out without passing a closed valve. */
import type { Solution } from '../assembly/machine.ts';
import type { Component } from '../model/circuit.ts';
import { openPairs, pathsIn } from './passage.ts';
import type { Plant } from './scene.ts';
import type { Point } from './study.ts';

/** The point with every net (and the components on it) marked whose figures rest on something unknown. */
export function spread(plant: Plant, point: Point): Point {
  const marked = Object.entries(plant.machine.notComputed);
  const start = marked.filter(([id]) => plant.at.net(id) !== undefined);
  if (start.length === 0) return point;
  const reasons: Record<string, string> = Object.fromEntries(marked);
  const picture = { stands: standsOf(plant, point), flows: point.flows, openings: point.openings } as unknown as Solution;
  const queue = start.map(([id]) => id);
  for (let net = queue.pop(); net !== undefined; net = queue.pop()) {
    const joined = plant.at.net(net);
    const why = reasons[net];
    if (!joined || joined.reservoir !== undefined || why === undefined) continue;
    for (const one of plant.at.beyond(net)) {
      if (reasons[one.net] !== undefined) continue;
      reasons[one.net] = why;
      queue.push(one.net);
    }
    for (const { component, port } of joined.ports) {
      const part = plant.at.component(component);
      if (!part || reasons[component] !== undefined) continue;
      if (['cylinder', 'motor', 'rotary'].includes(part.kind)) {
        reasons[component] = why;
        continue;
      }
      for (const onward of waysOn(plant, part, port, picture)) {
        const other = plant.at.netOf(component, onward);
        if (other === undefined || reasons[other] !== undefined) continue;
        reasons[other] = why;
        queue.push(other);
      }
    }
  }
  return { ...point, notComputed: reasons };
}

/** Ports whose pressure decides how the whole component stands. */
const DECIDES = ['X', 'Y', 'LS'];
/** Ways that oil of an unknown source may open, whatever stands there now. */
const OPENS: Readonly<Record<string, readonly [string, string]>> = {
  check: ['in', 'out'],
  pilotcheck: ['V', 'C'],
  counterbalance: ['V', 'C'],
  burst: ['V', 'C'],
};

/** Ports of a component to which something unknown at one of its ports goes on. */
function waysOn(plant: Plant, part: Component, port: string, picture: Solution): readonly string[] {
  const others = plant.at
    .portsOf(part.id)
    .map((one) => one.port)
    .filter((one) => one !== port);
  if (DECIDES.includes(port)) return others;
  const open = openPairs(plant.at, part, picture)
    .filter((pair) => pair.includes(port))
    .map((pair) => (pair[0] === port ? pair[1] : pair[0]));
  const way = OPENS[part.kind];
  return way !== undefined && way[0] === port ? [...open, way[1]] : open;
}

function standsOf(plant: Plant, point: Point): Solution['stands'] {
  const stands: Record<string, Solution['stands'][string]> = {};
  for (const [id, words] of Object.entries(point.positions)) {
    const name = words.split(' ')[0];
    const valve = plant.at.component(id);
    if (name === 'a' || name === 'b' || name === 'centre') stands[id] = { position: name };
    else if (valve)
      stands[id] = { position: (['a', 'b'] as const).find((side) => pathsIn(valve, side).length > 0 === (name === 'open')) ?? 'a' };
  }
  return stands;
}
