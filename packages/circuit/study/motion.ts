/** Whether an actuator moves, what drives it, and which way its oil takes. */
import type { Body, BodyLoad, Solution } from '../assembly/machine.ts';
import { standWords } from './coils.ts';
import { netFixed, relaxesWithin } from './loads.ts';
import type { Plant } from './scene.ts';
import type { Variant } from './study.ts';

/** 0.05 mm/s. */
const STILL_LINEAR = 5e-5;
/** 0.05 deg/s. */
const STILL_ROTATING = (0.05 * Math.PI) / 180;
/** 0.005 L/min, m3/s. */
export const STILL_FLOW = 0.005 / 60000;
/** A pressed or clamped part springs back within this way, m. */
const RELAXING_WAY = 5e-3;
/** Flow that counts as a way of the oil, m3/s (0.002 L/min). */
const SEEN_FLOW = 0.002 / 60000;

/** Ports of an actuator's chambers. */
const CHAMBERS = ['.cap', '.rod', '.A', '.B'];

export function moves(body: Body, solution: Solution): boolean {
  const v = solution.velocities[body.id] ?? 0;
  if (Math.abs(v) <= (body.type === 'rotating' ? STILL_ROTATING : STILL_LINEAR)) return false;
  return oilMoved(body, solution) > STILL_FLOW;
}

/** Oil that goes into or out of a body's chambers, the larger, m3/s. */
function oilMoved(body: Body, solution: Solution): number {
  let most = 0;
  for (const actuator of body.actuators) {
    for (const port of CHAMBERS) most = Math.max(most, Math.abs(solution.flows[actuator + port] ?? 0));
  }
  return most;
}

export function movingIn(plant: Plant, solution: Solution, loads: Readonly<Record<string, BodyLoad>>): Variant['moving'] {
  return plant.bodies.flatMap((body) => {
    if (!moves(body, solution)) return [];
    const velocity = solution.velocities[body.id] ?? 0;
    const direction = velocity > 0 ? 1 : -1;
    const load = loads[body.id];
    const driven = load !== undefined && netFixed(load, solution.positions[body.id] ?? 0) * direction > 0;
    const inward = wayOfOil(plant, body, solution, 'in');
    // Oil from a turning pump or an accumulator that enters makes it a motion by pressure, whatever the load does.
    const cause = driven && !inward.pushed ? ('load' as const) : ('pressure' as const);
    const way =
      cause === 'load' && body.type === 'linear'
        ? relaxesWithin(load!, solution.positions[body.id] ?? 0, direction, RELAXING_WAY)
        : undefined;
    const path = (cause === 'load' ? wayOfOil(plant, body, solution, 'out') : inward).words;
    return body.actuators.map((id) => ({ id, velocity, cause, path, ...(way === undefined ? {} : { relaxes: way }) }));
  });
}

/** The components that the oil of a moving actuator passes, from the chamber outwards (`out`) or from its source to the chamber (`in`). */
export function wayOfOil(
  plant: Plant,
  body: Body,
  solution: Solution,
  side: 'in' | 'out',
): { readonly words: string; readonly pushed: boolean } {
  const out = side === 'out';
  // Flow into a component is positive: oil leaves the chamber where it is negative.
  const along = (key: string, sign: number) => (solution.flows[key] ?? 0) * sign;
  const start = body.actuators
    .flatMap((id) => plant.at.portsOf(id).map((one) => ({ net: one.net, flow: along(`${id}.${one.port}`, out ? -1 : 1) })))
    .sort((a, b) => b.flow - a.flow)[0];
  if (!start || start.flow <= SEEN_FLOW) return { words: '', pushed: false };
  const words: string[] = [];
  const seen = new Set<string>(body.actuators);
  let pushed = false;
  let net: string | undefined = start.net;
  for (let hop = 0; hop < 60 && net !== undefined; hop += 1) {
    const joined = plant.at.net(net);
    if (!joined) break;
    if (joined.reservoir !== undefined) {
      words.push(joined.reservoir);
      break;
    }
    // The next component takes (or gives) the most oil at this net.
    const next: { readonly component: string; readonly port: string; readonly flow: number } | undefined = joined.ports
      .filter((one) => !seen.has(one.component))
      .map((one) => ({ ...one, flow: along(`${one.component}.${one.port}`, out ? 1 : -1) }))
      .sort((a, b) => b.flow - a.flow)[0];
    const pipe: { readonly piece: string; readonly net: string } | undefined = plant.at.beyond(net).find((one) => !seen.has(one.piece));
    if (!next || next.flow <= SEEN_FLOW) {
      if (!pipe) break;
      seen.add(pipe.piece);
      net = pipe.net;
      continue;
    }
    seen.add(next.component);
    const kind = plant.at.component(next.component)?.kind;
    if (!out && (kind === 'pump' || kind === 'accumulator')) pushed = true;
    const exit = plant.at
      .portsOf(next.component)
      .filter((one) => one.port !== next.port)
      .map((one) => ({ ...one, flow: along(`${next.component}.${one.port}`, out ? -1 : 1) }))
      .sort((a, b) => b.flow - a.flow)[0];
    words.push(passing(plant, next.component, next.port, exit?.port, solution, out));
    if (pushed) break;
    net = exit && exit.flow > SEEN_FLOW ? exit.net : undefined;
  }
  return { words: (out ? words : words.reverse()).join(', '), pushed };
}

function passing(plant: Plant, id: string, entry: string, exit: string | undefined, solution: Solution, out: boolean): string {
  const component = plant.at.component(id);
  const stand = solution.stands[id];
  if (component?.kind === 'directional' && exit) {
    const [from, to] = out ? [entry, exit] : [exit, entry];
    return `${id} ${from} to ${to}${stand ? ` (${standWords(component, stand)})` : ''}`;
  }
  return component && ['pump', 'accumulator'].includes(component.kind) ? id : exit ? id : `${id}.${entry}`;
}
