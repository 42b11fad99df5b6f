/** What a switch, a sensor or a condition looks at, and its value in a solution. */
import type { Body, Solution, Watch } from '../assembly/machine.ts';
import { areasOf } from '../kinds/cylinder-areas.ts';
import type { Component } from '../model/circuit.ts';
import type { Lookup } from './lookup.ts';
import { flag, range, reference, si } from './read.ts';

export type Source =
  /** `head`: rho g z of the place, taken off the net's pressure, Pa. */
  | { readonly what: 'pressure'; readonly net: string; readonly minus?: string; readonly head: number }
  | { readonly what: 'position'; readonly body: string; readonly rotating: boolean; readonly stroke: number }
  | { readonly what: 'level'; readonly reservoir: string }
  | { readonly what: 'temperature' }
  | { readonly what: 'stand'; readonly valve: string }
  | { readonly what: 'outside' }
  | { readonly what: 'unknown'; readonly why: string };

/** What a study knows to answer a source. */
export interface Scene {
  readonly at: Lookup;
  readonly bodies: readonly Body[];
  /** Component id -> rho g z at its ports, Pa. */
  readonly heads: Readonly<Record<string, number>>;
  /** Oil temperature, K. */
  readonly temperature: number;
}

export function bodyOf(scene: Scene, actuator: string): Body | undefined {
  return scene.bodies.find((one) => one.actuators.includes(actuator));
}

/** Source of a component named in a condition: actuator, sensor, switch, valve, reservoir, or anything with one port P. */
export function sourceOf(scene: Scene, id: string, dimension?: string): Source {
  const component = scene.at.component(id);
  if (!component) return { what: 'unknown', why: `${id} is not declared` };
  if (component.kind === 'switch') return flag(component, 'outside') ? { what: 'outside' } : onOf(scene, component, dimensionOf(component));
  if (component.kind === 'sensor') return onOf(scene, component, range(component, 'range')?.dimension);
  return partSource(scene, component, undefined, dimension);
}

function dimensionOf(component: Component): string | undefined {
  const value = component.properties.find((one) => ['rises', 'falls'].includes(one.name))?.value;
  return value?.type === 'quantity' ? value.q.dimension : undefined;
}

function onOf(scene: Scene, component: Component, dimension: string | undefined): Source {
  const on = reference(component, 'on');
  if (!on) {
    const net = scene.at.netOf(component.id, 'P');
    return net === undefined
      ? { what: 'unknown', why: `${component.id} is joined to nothing` }
      : { what: 'pressure', net, head: scene.heads[component.id] ?? 0 };
  }
  const target = scene.at.component(on.id);
  if (!target) return { what: 'unknown', why: `${component.id} is on ${on.id}, which is not declared` };
  return partSource(scene, target, on.port, dimension);
}

function partSource(scene: Scene, target: Component, port: string | undefined, dimension: string | undefined): Source {
  if (dimension === 'temperature') return { what: 'temperature' };
  const pressureAt = (name: string): Source => {
    const net = scene.at.netOf(target.id, name);
    return net === undefined
      ? { what: 'unknown', why: `${target.id}.${name} is joined to nothing` }
      : { what: 'pressure', net, head: scene.heads[target.id] ?? 0 };
  };
  if (port !== undefined) return pressureAt(port);
  switch (target.kind) {
    case 'cylinder':
    case 'motor':
    case 'rotary': {
      const body = bodyOf(scene, target.id);
      if (!body) return { what: 'unknown', why: `${target.id} is not computed` };
      return { what: 'position', body: body.id, rotating: body.type === 'rotating', stroke: body.stroke };
    }
    case 'reservoir':
      return { what: 'level', reservoir: target.id };
    case 'directional':
    case 'shutoff':
      return { what: 'stand', valve: target.id };
    case 'filter': {
      const [net, minus] = [scene.at.netOf(target.id, 'in'), scene.at.netOf(target.id, 'out')];
      return net !== undefined && minus !== undefined
        ? { what: 'pressure', net, minus, head: 0 }
        : { what: 'unknown', why: `${target.id} is joined at one side only` };
    }
    default:
      return pressureAt('P');
  }
}

/** SI value of a source in a solution: Pa, m or rad, m3, K; undefined where there is none. */
export function valueIn(scene: Scene, source: Source, solution: Solution): number | undefined {
  switch (source.what) {
    case 'pressure': {
      const p = solution.pressures[source.net];
      return p === undefined ? undefined : p - source.head - (source.minus === undefined ? 0 : (solution.pressures[source.minus] ?? 0));
    }
    case 'position':
      return solution.positions[source.body];
    case 'level':
      return level(scene, source.reservoir, solution);
    case 'temperature':
      return scene.temperature;
    default:
      return undefined;
  }
}

/** Content of a reservoir: `volume` less what cylinders and accumulators have taken since the start (rods in, accumulators empty). */
export function level(scene: Scene, reservoir: string, solution: Solution): number | undefined {
  const tank = scene.at.component(reservoir);
  const volume = tank ? si(tank, 'volume') : undefined;
  if (volume === undefined) return undefined;
  let taken = Object.values(solution.oil).reduce((sum, one) => sum + one, 0);
  for (const body of scene.bodies) {
    const moved = (solution.positions[body.id] ?? body.begins) - body.begins;
    for (const id of body.actuators) taken += moved * rodArea(scene.at.component(id));
  }
  return volume - taken;
}

/** Oil a cylinder takes from the reservoir per metre of extension: the area of its rod, m2. */
function rodArea(cylinder: Component | undefined): number {
  if (cylinder?.kind !== 'cylinder') return 0;
  const areas = areasOf(cylinder);
  return areas ? (areas.cap ?? 0) - (areas.rod ?? 0) : 0;
}

/** A watch on a source; undefined where a run cannot watch it. */
export function watchOf(source: Source, threshold: number, edge: 'rising' | 'falling'): Watch | undefined {
  switch (source.what) {
    case 'pressure':
      return source.minus === undefined
        ? { what: 'pressure', net: source.net, threshold: threshold + source.head, edge }
        : { what: 'pressure', net: source.net, minus: source.minus, threshold, edge };
    case 'position':
      return { what: 'position', body: source.body, threshold, edge };
    case 'level':
      return { what: 'level', reservoir: source.reservoir, threshold, edge };
    default:
      return undefined;
  }
}
