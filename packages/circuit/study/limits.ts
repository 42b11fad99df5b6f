/** What limits a motion: the setting or size its speed follows, a lifting relief, a destroked pump, a stop, a closed path. */
import type { Body, Setting, Solution } from '../assembly/machine.ts';
import { standWords } from './coils.ts';
import { needed } from './loads.ts';
import { moves } from './motion.ts';
import { openPairs } from './passage.ts';
import { si } from './read.ts';
import type { Plant } from './scene.ts';
import type { Limiter } from './study.ts';
import { say } from './words.ts';

export interface Motion {
  readonly wanted: -1 | 1;
  readonly moving: boolean;
  readonly atStop: 'retracted' | 'extended' | undefined;
  readonly short: number | undefined;
}

export function limiters(plant: Plant, body: Body, setting: Setting, solution: Solution, motion: Motion): readonly Limiter[] {
  const found: Limiter[] = [];
  if (motion.atStop !== undefined) found.push({ of: body.id, words: `end stop (${motion.atStop})` });
  if (motion.moving) {
    const shares = plant.machine.sensitivities(setting, solution, body.id);
    const most = Math.max(0, ...shares.map((one) => Math.abs(one.share)));
    for (const one of [...shares].sort((a, b) => byShare(plant, a, b))) {
      if (most > 0.05 && Math.abs(one.share) > most / 2) found.push({ of: one.of, words: one.words, share: one.share });
    }
  }
  for (const id of liftingOverPumpShare(plant, solution)) found.push({ of: id, words: `relief ${id} lifts` });
  for (const pump of plant.at.ofKind('pump')) {
    const stroke = solution.openings[pump.id];
    if (stroke !== undefined && stroke < 0.995 && si(pump, 'compensator') !== undefined) {
      found.push({ of: pump.id, words: `${pump.id} destrokes to ${say(plant.circuit, stroke, 'ratio')}` });
    }
  }
  for (const brake of plant.at.ofKind('brake')) {
    if (
      body.actuators.some((id) => brake.properties.some((one) => one.value.type === 'reference' && one.value.id === id)) &&
      !motion.moving
    ) {
      found.push({ of: brake.id, words: `brake ${brake.id} holds` });
    }
  }
  if (!motion.moving && motion.atStop === undefined && motion.short === undefined) found.push(...closedAround(plant, body, solution));
  return found;
}

/** Shares within 5 % of each other are a tie: what meters comes before the pump, the pump before a path's loss. */
function byShare(plant: Plant, one: Share, other: Share): number {
  const [a, b] = [Math.abs(one.share), Math.abs(other.share)];
  if (Math.abs(a - b) > 0.05 * Math.max(a, b)) return b - a;
  return rank(plant, one) - rank(plant, other) || b - a;
}
type Share = ReturnType<Plant['machine']['sensitivities']>[number];
function rank(plant: Plant, one: Share): number {
  const kind = plant.at.component(one.of)?.kind;
  if (kind === 'throttle' || kind === 'deceleration' || /command|set$/.test(one.words)) return 0;
  return kind === 'pump' ? 1 : 2;
}

/** Reliefs over which more than 1 % of the pump flow goes. */
export function liftingOverPumpShare(plant: Plant, solution: Solution): readonly string[] {
  const pumped = plant.at.ofKind('pump').reduce((sum, one) => sum + Math.max(0, -(solution.flows[`${one.id}.P`] ?? 0)), 0);
  return plant.at
    .ofKind('relief')
    .map((one) => one.id)
    .filter((id) => pumped > 0 && (solution.openings[id] ?? 0) > 0 && (solution.flows[`${id}.P`] ?? 0) > 0.01 * pumped);
}

/** Valves that close the way of the oil of a body that should move but stands. */
function closedAround(plant: Plant, body: Body, solution: Solution): Limiter[] {
  const found: Limiter[] = [];
  for (const actuator of body.actuators) {
    for (const { port, net } of plant.at.portsOf(actuator)) {
      const reach = reachable(plant, net, solution);
      if (reach.ends) continue;
      for (const id of reach.blocked) {
        const valve = plant.at.component(id);
        const stand = solution.stands[id];
        const words = valve && stand ? `${id} (${standWords(valve, stand)})` : id;
        if (!found.some((one) => one.of === id)) found.push({ of: id, words: `no path at ${actuator}.${port}: ${words} is closed` });
      }
    }
  }
  return found;
}

/** Nets reached from one by what is open; whether a pump, accumulator or reservoir is among them; valves met closed. */
function reachable(plant: Plant, from: string, solution: Solution): { readonly ends: boolean; readonly blocked: readonly string[] } {
  const seen = new Set([from]);
  const blocked = new Set<string>();
  const queue = [from];
  let ends = false;
  for (let net = queue.pop(); net !== undefined; net = queue.pop()) {
    const joined = plant.at.net(net);
    if (!joined) continue;
    if (joined.reservoir !== undefined) ends = true;
    for (const one of plant.at.beyond(net)) {
      if (seen.has(one.net)) continue;
      seen.add(one.net);
      queue.push(one.net);
    }
    for (const { component, port } of joined.ports) {
      const part = plant.at.component(component);
      if (!part) continue;
      if (part.kind === 'pump' && port === 'P') ends = true;
      if (['cylinder', 'motor', 'rotary', 'pump', 'accumulator'].includes(part.kind)) continue;
      const onward = openPairs(plant.at, part, solution).filter((pair) => pair.includes(port));
      if (onward.length === 0 && plant.at.portsOf(component).length > 1) blocked.add(component);
      for (const pair of onward) {
        const other = plant.at.netOf(component, pair[0] === port ? pair[1] : pair[0]);
        if (other !== undefined && !seen.has(other)) {
          seen.add(other);
          queue.push(other);
        }
      }
    }
  }
  return { ends, blocked: [...blocked] };
}

/** Why a body does not go the way it should, in words: stalled by how much, or which valve closes its way, or how slowly it moves. */
export function whyItStands(plant: Plant, body: Body, setting: Setting, solution: Solution, direction: -1 | 1): string {
  if (moves(body, solution)) {
    return `${body.id} moves at ${say(plant.circuit, Math.abs(solution.velocities[body.id] ?? 0), body.type === 'rotating' ? 'rotation' : 'velocity')}`;
  }
  const held = plant.machine.solve({ ...setting, locked: [body.id] }, solution);
  const load = setting.loads[body.id];
  const available = (held.forces[body.id] ?? 0) * direction;
  const need = load ? needed(load, solution.positions[body.id] ?? 0, direction) : 0;
  const closed = closedAround(plant, body, held);
  if (closed.length > 0) return closed.map((one) => one.words).join('; ');
  if (!held.solved || available >= need) return '';
  const dimension = body.type === 'rotating' ? 'torque' : 'force';
  return `${body.id} stalled, short by ${say(plant.circuit, need - available, dimension)}: ${say(plant.circuit, Math.max(0, available), dimension)} of ${say(plant.circuit, need, dimension)}`;
}
