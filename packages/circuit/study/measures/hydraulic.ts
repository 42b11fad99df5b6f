/** Pressure, flow, loss and power: of ports, lines, components, drives. */
import type { Solution } from '../../assembly/machine.ts';
import type { Net, Piece } from '../../model/circuit.ts';
import { passesRange, type Place, placeWords, rangeBody, selectedPoints, selectedSamples, stepSamples } from '../places.ts';
import type { Plant } from '../scene.ts';
import type { Point } from '../study.ts';
import { drivePower } from '../trace.ts';
import type { Asked } from './asked.ts';
import { notPassed } from './motion.ts';
import { type Observed, type Value, value } from './observed.ts';

/** What points and samples have in common for these measures. */
type Picture = Pick<Solution, 'pressures' | 'undetermined' | 'flows'>;
type Read = (picture: Picture) => { readonly low: number; readonly high: number } | undefined;
const exactly = (amount: number | undefined) => (amount === undefined ? undefined : { low: amount, high: amount });

/** Net of a requirement's port or line; or why there is none. */
export function netAsked(
  plant: Plant,
  of: string,
  port: string | undefined,
): { readonly net: string; readonly head: number } | { readonly why: string } {
  const named = plant.circuit.nets.find((one) => one.name === of || one.id === of);
  const component = plant.at.component(of);
  if (!component && named) return { net: named.id, head: 0 };
  if (!component) return { why: `${of} is no line or component` };
  const name =
    port ?? (plant.at.netOf(of, 'P') !== undefined ? 'P' : plant.at.portsOf(of).length === 1 ? plant.at.portsOf(of)[0]!.port : undefined);
  if (name === undefined) return { why: `${of} has several ports: name one` };
  const net = plant.at.netOf(of, name);
  return net === undefined ? { why: `${of}.${name} is joined to nothing` } : { net, head: plant.machine.heads[of] ?? 0 };
}

export function pressure(asked: Asked, place: Place): Observed {
  const found = netAsked(asked.plant, asked.requirement.of, asked.requirement.port);
  if ('why' in found) return { place: place.id, values: [], problems: [found.why] };
  const why = asked.plant.machine.notComputed[found.net];
  if (why !== undefined) return { place: place.id, values: [], problems: [why] };
  const { net, head } = found;
  const read: Read = (picture) => {
    const span = picture.undetermined[net];
    if (span) return { low: span.low - head, high: span.high - head };
    const p = picture.pressures[net];
    return exactly(p === undefined ? undefined : p - head);
  };
  return over(asked, place, read, { run: true });
}

export function flow(asked: Asked, place: Place): Observed {
  const { plant, requirement } = asked;
  const component = plant.at.component(requirement.of);
  const net = plant.circuit.nets.find((one) => one.name === requirement.of || one.id === requirement.of);
  const read: Read = (picture) => {
    if (requirement.port !== undefined) return exactly(Math.abs(picture.flows[`${requirement.of}.${requirement.port}`] ?? 0));
    if (component)
      return exactly(
        component.kind === 'pump' ? Math.max(0, -(picture.flows[`${component.id}.P`] ?? 0)) : through(plant, component.id, picture),
      );
    if (net) return exactly(throughLine(plant, requirement.of, net, picture));
    return undefined;
  };
  if (!component && !net) return { place: place.id, values: [], problems: [`${requirement.of} is no line or component`] };
  return over(asked, place, read, { run: requirement.bound.is === 'reaches' || requirement.lasts !== undefined });
}

/** What goes through a line: the flow of its pipe where that has a loss of its own, else what its ports bring or take, the larger. */
function throughLine(plant: Plant, name: string, net: Net, picture: Picture): number {
  const pipes = pipesOf(plant, name).map((one) => Math.abs(picture.flows[one.id] ?? 0));
  if (pipes.length > 0) return Math.max(...pipes);
  const flows = net.ports.map((one) => picture.flows[`${one.component}.${one.port}`] ?? 0);
  const sum = (sign: 1 | -1) => flows.reduce((total, one) => total + Math.max(0, one * sign), 0);
  return Math.max(sum(1), sum(-1));
}
/** Pieces of a named line that have a loss of their own. */
function pipesOf(plant: Plant, name: string): readonly Piece[] {
  const ids = plant.circuit.lines.filter((one) => one.name === name).flatMap((one) => one.pieces);
  return plant.circuit.pieces.filter((one) => ids.includes(one.id) && one.nets[0] !== one.nets[1]);
}

/** Largest flow at any port, m3/s. */
function through(plant: Plant, id: string, picture: Picture): number {
  return Math.max(0, ...plant.at.portsOf(id).map((one) => Math.abs(picture.flows[`${id}.${one.port}`] ?? 0)));
}

/** Pressure drop across the two ports of a component, in the direction of flow. */
export function loss(asked: Asked, place: Place): Observed {
  const { plant, requirement } = asked;
  const ports = plant.at.portsOf(requirement.of);
  if (ports.length < 2) return { place: place.id, values: [], problems: [`${requirement.of} has no two joined ports`] };
  const read: Read = (picture) => {
    const byFlow = ports
      .map((one) => ({ ...one, flow: picture.flows[`${requirement.of}.${one.port}`] ?? 0 }))
      .sort((a, b) => b.flow - a.flow);
    const [entry, exit] = [byFlow[0]!, byFlow.at(-1)!];
    const [p, q] = [picture.pressures[entry.net], picture.pressures[exit.net]];
    if (p === undefined || q === undefined) return undefined;
    return exactly(entry.flow > 1e-9 ? p - q : Math.abs(p - q));
  };
  return over(asked, place, read, { run: true });
}

export function power(asked: Asked, place: Place): Observed {
  const { plant, requirement } = asked;
  const component = plant.at.component(requirement.of);
  const body = plant.bodies.find((one) => one.actuators.includes(requirement.of));
  const net = plant.circuit.nets.find((one) => one.name === requirement.of);
  const ofSolution = (solution: Solution): number | undefined => {
    if (component?.kind === 'drive') return Math.max(0, drivePower(plant, component.id, solution));
    if (component?.kind === 'pump') return Math.max(0, solution.shaft[component.id] ?? 0);
    if (body) return Math.abs((solution.forces[body.id] ?? 0) * (solution.velocities[body.id] ?? 0));
    return lost(plant, component?.id, net === undefined ? undefined : requirement.of, solution);
  };
  const ofPoint = (point: Point): number | undefined => {
    if (component?.kind === 'drive' || component?.kind === 'pump') return Math.max(0, point.power[component.id] ?? 0);
    const actuator = point.actuators.find((one) => one.id === requirement.of);
    if (actuator) return Math.abs(actuator.force * actuator.velocity);
    return lost(plant, component?.id, net === undefined ? undefined : requirement.of, point);
  };
  return over(
    asked,
    place,
    (picture) => exactly('solved' in picture && 'label' in picture ? ofPoint(picture as Point) : ofSolution(picture as Solution)),
    { run: true },
  );
}

/** Power lost: in a component the sum over its ports of pressure times flow in; in a line that of its pipes, none where no length is said. */
function lost(plant: Plant, id: string | undefined, line: string | undefined, picture: Picture): number | undefined {
  const p = (net: string) => picture.pressures[net] ?? 0;
  if (id === undefined) {
    if (line === undefined) return undefined;
    return pipesOf(plant, line).reduce((sum, one) => sum + Math.abs((p(one.nets[0]) - p(one.nets[1])) * (picture.flows[one.id] ?? 0)), 0);
  }
  return Math.max(
    0,
    plant.at.portsOf(id).reduce((sum, one) => sum + p(one.net) * (picture.flows[`${id}.${one.port}`] ?? 0), 0),
  );
}

/** Reads a quantity at every selected point of a step and, with `run`, in the run between them; in every variant of a state. */
function over(asked: Asked, place: Place, read: Read, sampling: { readonly run: boolean }): Observed {
  const { plant, requirement } = asked;
  if (place.is === 'state') return overState(asked, place, read);
  const body = rangeBody(plant, requirement);
  if (!passesRange(requirement.where, body, place)) {
    return {
      place: place.id,
      values: [],
      problems: [body ? notPassed(asked, body, place.id) : 'the range is not that of one actuator: name the step instead'],
    };
  }
  const values: Value[] = [];
  const problems: string[] = [];
  for (const point of selectedPoints(requirement.where, body, place.result.points)) {
    if (!point.solved) {
      problems.push(`no equilibrium found at ${point.label} of ${place.id}`);
      continue;
    }
    const found = read(point);
    if (!found) continue;
    const x = body ? point.actuators.find((one) => one.id === body.actuators[0])?.position : undefined;
    values.push({
      ...value(placeWords(plant, place.id, body, x, point.time), found.high, point.time === undefined ? {} : { time: point.time }),
      low: found.low,
    });
  }
  if (sampling.run) {
    for (const one of selectedSamples(requirement.where, body, stepSamples(place))) {
      // In a run every pressure is that of the stored oil.
      const found = read({ ...one.solution, undetermined: {} });
      if (found)
        values.push({
          ...value(placeWords(plant, place.id, body, body ? one.solution.positions[body.id] : undefined, one.time), found.high, {
            since: one.since,
            run: true,
            time: one.time,
          }),
          low: found.low,
        });
    }
  }
  if (values.length === 0 && problems.length === 0) problems.push(`${requirement.of} is not computed in ${place.id}`);
  return { place: place.id, values, problems };
}

function overState(asked: Asked, place: Place & { readonly is: 'state' }, read: Read): Observed {
  const { bound, lasts } = asked.requirement;
  const timed = lasts ?? (bound.is === 'reaches' ? bound.within : undefined);
  if (timed !== undefined) {
    const { runs, all } = asked.runner.run(place.states, timed, false);
    const values = runs.flatMap((run, series) =>
      run.samples.flatMap((one) => {
        const found = read({ ...one.solution, undetermined: {} });
        return found ? [{ ...value(run.label, found.high, { series, since: one.time, run: true, time: one.time }), low: found.low }] : [];
      }),
    );
    const problems = runs.flatMap((one) => (one.failed === undefined ? [] : [`${one.label}: ${one.failed}`]));
    return {
      place: place.id,
      values,
      problems,
      ...(runs.length < all ? { notes: [`${runs.length} of ${all} variants run in time`] } : {}),
    };
  }
  const values: Value[] = [];
  const problems: string[] = [];
  const notes: string[] = [];
  let series = 0;
  for (const { result } of place.states) {
    if (result.studied.of < result.studied.all) notes.push(`${result.studied.of} of ${result.studied.all} variants of ${result.id}`);
    for (const { label, point } of result.variants) {
      const at = label === '' ? result.id : `${result.id}: ${label}`;
      const found = point.solved ? read(point) : undefined;
      if (!point.solved) problems.push(`no equilibrium found in ${at}`);
      else if (found) values.push({ ...value(at, found.high, { series }), low: found.low });
      series += 1;
    }
  }
  return { place: place.id, values, problems, notes };
}
