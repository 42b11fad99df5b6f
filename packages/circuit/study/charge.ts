/** How much oil an accumulator holds at a pressure, and the pressure to which its net can charge it. */
import { ATMOSPHERE } from '../fluid/density.ts';
import { oilAt as chargedWith, prechargeAt } from '../fluid/gas.ts';
import { realOilAt, realPrechargeAt } from '../fluid/nitrogen.ts';
import type { Component } from '../model/circuit.ts';
import { si, valueNamed } from './read.ts';
import type { Plant } from './scene.ts';
import { REAL_ABOVE } from './working/gas.ts';

/** Oil (m3) that an accumulator holds at a gauge pressure, filled slowly: V0 (1 - p0/p), absolute, p0 at the fluid's temperature; above 150 bar as real nitrogen. */
export function oilAt(accumulator: Component, pressure: number, temperature: number): number {
  const volume = si(accumulator, 'volume');
  const value = valueNamed(accumulator, 'precharge');
  if (volume === undefined || value?.type !== 'precharge') return 0;
  const p = pressure + ATMOSPHERE;
  if (pressure > REAL_ABOVE) {
    return realOilAt(volume, realPrechargeAt(value.pressure.si + ATMOSPHERE, value.temperature.si, temperature), p, temperature);
  }
  return chargedWith(volume, prechargeAt(value.pressure.si, value.temperature.si, temperature), p, 1);
}

/** With no cycle to tell: the lowest of compensators, reliefs and switch thresholds on nets joined to the accumulator, Pa gauge. */
export function usualCharge(plant: Plant, accumulator: Component): number | undefined {
  const own = plant.at.netOf(accumulator.id, 'P');
  if (own === undefined) return undefined;
  const nets = joinedThroughOpen(plant, own);
  const found: number[] = [];
  for (const net of nets) {
    for (const { component, port } of plant.at.net(net)?.ports ?? []) {
      const part = plant.at.component(component);
      if (!part) continue;
      const setting =
        part.kind === 'relief' && port === 'P'
          ? si(part, 'set')
          : part.kind === 'pump' && port === 'P'
            ? si(part, 'compensator')
            : part.kind === 'switch'
              ? si(part, 'rises')
              : undefined;
      if (setting !== undefined) found.push(setting);
    }
  }
  return found.length > 0 ? Math.min(...found) : undefined;
}

/** The net itself and those joined to it by shut-offs declared open, filters and gauges. */
function joinedThroughOpen(plant: Plant, start: string): ReadonlySet<string> {
  const seen = new Set([start]);
  const queue = [start];
  for (let net = queue.pop(); net !== undefined; net = queue.pop()) {
    for (const one of plant.at.beyond(net)) {
      if (seen.has(one.net)) continue;
      seen.add(one.net);
      queue.push(one.net);
    }
    for (const { component } of plant.at.net(net)?.ports ?? []) {
      const part = plant.at.component(component);
      if (!part || (!(part.kind === 'shutoff' && part.properties.some((one) => one.name === 'open')) && part.kind !== 'filter')) continue;
      for (const other of plant.at.portsOf(component)) {
        if (seen.has(other.net) || plant.at.net(other.net)?.reservoir !== undefined) continue;
        seen.add(other.net);
        queue.push(other.net);
      }
    }
  }
  return seen;
}

/** What accumulators hold: oil by id, and the absolute gas pressure that goes with it. */
export interface Charge {
  readonly oil: Readonly<Record<string, number | 'empty'>>;
  readonly gasPressures: Readonly<Record<string, number>>;
}

/** Every accumulator charged: to the highest pressure its net reached in the cycles, else to the usual charge. */
export function charge(plant: Plant, highest: Readonly<Record<string, number>>): Charge {
  const oil: Record<string, number> = {};
  const gasPressures: Record<string, number> = {};
  for (const one of plant.at.accumulators) {
    const net = plant.at.netOf(one.id, 'P');
    const reached = net === undefined ? undefined : highest[net];
    const pressure = reached ?? usualCharge(plant, one);
    oil[one.id] = pressure === undefined ? 0 : oilAt(one, pressure, plant.temperature);
    if (pressure !== undefined && oil[one.id]! > 0) gasPressures[one.id] = pressure + ATMOSPHERE;
  }
  return { oil, gasPressures };
}
/** No oil, the gas at precharge. */
export function empty(plant: Plant): Charge {
  return { oil: noOil(plant), gasPressures: {} };
}
export function noOil(plant: Plant): Record<string, 'empty'> {
  return Object.fromEntries(plant.at.accumulators.map((one) => [one.id, 'empty' as const]));
}
