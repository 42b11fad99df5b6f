/** A solution as a point of the study: what is asked for of it, actuator by actuator. */
import type { Body, BodyLoad, Setting, Solution } from '../assembly/machine.ts';
import { areasOf, DEFAULT_SEAL } from '../kinds/cylinder-areas.ts';
import { standWords } from './coils.ts';
import { limiters } from './limits.ts';
import { needed, netFixed } from './loads.ts';
import { moves } from './motion.ts';
import { si } from './read.ts';
import type { Plant } from './scene.ts';
import type { ActuatorPoint, Point } from './study.ts';

/** Below this the regularised friction of the engine lets a standing rod creep, m/s or rad/s: five times its scale. */
const CREEP = 5e-5;

export interface Asked {
  readonly label: string;
  readonly time?: number;
  /** Wanted direction of a body where the step is known to move it. */
  readonly directions?: Readonly<Record<string, -1 | 0 | 1>>;
  /** Solve also with each wanted actuator held, and say what limits it. */
  readonly forces?: boolean;
  /** Held solutions of earlier points by body: where the next one starts from. */
  readonly held?: Map<string, Solution>;
}

export function pointOf(plant: Plant, setting: Setting, solution: Solution, asked: Asked): Point {
  const power: Record<string, number> = { ...solution.shaft };
  for (const drive of plant.at.drives) {
    power[drive.id] = plant.at.pumpsOf(drive.id).reduce((sum, pump) => sum + (solution.shaft[pump.id] ?? 0), 0);
  }
  const positions: Record<string, string> = {};
  for (const [id, stand] of Object.entries(solution.stands)) {
    const valve = plant.at.component(id);
    if (valve) positions[id] = standWords(valve, stand);
  }
  return {
    label: asked.label,
    ...(asked.time === undefined ? {} : { time: asked.time }),
    solved: solution.solved,
    pressures: solution.pressures,
    undetermined: solution.undetermined,
    flows: solution.flows,
    openings: solution.openings,
    lifting: solution.lifting,
    actuators: plant.bodies.flatMap((body) => actuatorPoints(plant, body, setting, solution, asked)),
    power,
    positions,
    oil: solution.oil,
    diagnosis: solution.diagnosis,
    remarks: solution.remarks,
    notComputed: plant.machine.notComputed,
  };
}

function actuatorPoints(plant: Plant, body: Body, setting: Setting, solution: Solution, asked: Asked): ActuatorPoint[] {
  const position = solution.positions[body.id] ?? body.begins;
  const velocity = solution.velocities[body.id] ?? 0;
  const moving = moves(body, solution);
  const along = moving ? (velocity > 0 ? 1 : -1) : 0;
  const wanted = asked.directions?.[body.id] || along;
  const load: BodyLoad | undefined = setting.loads[body.id];
  const need = load && wanted !== 0 ? needed(load, position, wanted) : 0;
  const atStop = stopAt(body, position, velocity, moving, solution);
  let available: number | undefined;
  if (asked.forces && wanted !== 0) {
    const held = plant.machine.solve({ ...setting, locked: [...(setting.locked ?? []), body.id] }, asked.held?.get(body.id) ?? solution);
    const force = held.forces[body.id];
    if (held.solved) asked.held?.set(body.id, held);
    if (held.solved && force !== undefined) available = force * wanted;
  }
  const stands = !moving && atStop === undefined && Math.abs(velocity) < CREEP;
  const short =
    available !== undefined && stands && available < need && !presses(load, position, wanted, available) ? need - available : undefined;
  const limitedBy = asked.forces && wanted !== 0 ? limiters(plant, body, setting, solution, { wanted, moving, atStop, short }) : [];
  const stopForce = solution.stopForces[body.id];
  return body.actuators.map((id) => ({
    id,
    position,
    velocity,
    direction: wanted,
    force: body.actuators.length > 1 ? ownForce(plant, id, solution, moving ? velocity : 0) : (solution.forces[body.id] ?? 0),
    ...(available === undefined ? {} : { available }),
    needed: need,
    limitedBy,
    ...(short === undefined ? {} : { shortBy: short }),
    ...(atStop === undefined ? {} : { atStop }),
    ...(stopForce === undefined || stopForce === 0 ? {} : { stopForce }),
  }));
}

/** Way within which a part that gives way takes up a force, m. */
const GIVES = 5e-3;

/** Standing against a part that gives way (its force grows along the motion) is pressing, not a stall: a little before, the force was enough. */
function presses(load: BodyLoad | undefined, x: number, direction: -1 | 0 | 1, available: number): boolean {
  if (!load || direction === 0) return false;
  const here = -direction * netFixed(load, x);
  return (
    here > 0 && -direction * netFixed(load, x - direction * GIVES) < here && needed(load, x - direction * GIVES, direction) <= available
  );
}

function stopAt(body: Body, position: number, velocity: number, moving: boolean, solution: Solution): 'retracted' | 'extended' | undefined {
  if (!Number.isFinite(body.stroke) || moving) return undefined;
  const near = 1e-5;
  const pressed = solution.stopForces[body.id];
  if (position <= near && velocity <= CREEP && (pressed === undefined || pressed >= 0 || position <= 0)) return 'retracted';
  if (position >= body.stroke - near) return 'extended';
  return undefined;
}

/** What one cylinder of a rigid group presses with by its own pressures, N, + outward. */
function ownForce(plant: Plant, id: string, solution: Solution, velocity: number): number {
  const cylinder = plant.at.component(id);
  if (cylinder?.kind !== 'cylinder') return 0;
  const areas = cylinderAreas(plant, id);
  const p = (port: string) => {
    const net = plant.at.netOf(id, port);
    return net === undefined ? 0 : (solution.pressures[net] ?? 0);
  };
  const pressing = p('cap') * areas.cap - p('rod') * areas.rod;
  return pressing - Math.sign(velocity) * areas.sealFriction;
}

/** Areas of a cylinder, m2, and its seal friction, N. */
export function cylinderAreas(plant: Plant, id: string): { readonly cap: number; readonly rod: number; readonly sealFriction: number } {
  const cylinder = plant.at.component(id);
  const areas = cylinder ? areasOf(cylinder) : undefined;
  if (!cylinder || !areas) return { cap: 0, rod: 0, sealFriction: 0 };
  return { cap: areas.cap ?? 0, rod: areas.rod ?? 0, sealFriction: (si(cylinder, 'seal') ?? DEFAULT_SEAL) * areas.bore };
}
