/** How much oil an accumulator holds at a pressure, and the pressure to which its net can charge it. */
import { ATMOSPHERE } from '../fluid/density.ts';
import { oilAt as chargedWith, prechargeAt } from '../fluid/gas.ts';
import type { Component } from '../model/circuit.ts';
import { si, valueNamed } from './read.ts';
import type { Plant } from './scene.ts';

/** Oil (m3) that an accumulator holds at a gauge pressure, filled isothermally: V0 (1 - p0/p), absolute, p0 at the fluid's temperature. */
export function oilAt(accumulator: Component, pressure: number, temperature: number): number {
  const volume = si(accumulator, 'volume');
  const value = valueNamed(accumulator, 'precharge');
  if (volume === undefined || value?.type !== 'precharge') return 0;
  return chargedWith(volume, prechargeAt(value.pressure.si, value.temperature.si, temperature), pressure + ATMOSPHERE, 1);
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

/** Oil of every accumulator when charged: the highest pressure its net reached in the cycles, else the usual charge. */
export function chargedOil(plant: Plant, highest: Readonly<Record<string, number>>): Record<string, number> {
  const oil: Record<string, number> = {};
  for (const one of plant.at.accumulators) {
    const net = plant.at.netOf(one.id, 'P');
    const reached = net === undefined ? undefined : highest[net];
    const pressure = reached ?? usualCharge(plant, one);
    oil[one.id] = pressure === undefined ? 0 : oilAt(one, pressure, plant.temperature);
  }
  return oil;
}
export function noOil(plant: Plant): Record<string, 'empty'> {
  return Object.fromEntries(plant.at.accumulators.map((one) => [one.id, 'empty' as const]));
}
