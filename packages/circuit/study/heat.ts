/** Steady oil temperature: shaft power less work given to loads, against what reservoir wall and coolers give off. */
import type { Component } from '../model/circuit.ts';
import type { Ran } from './cycle.ts';
import { meanPower } from './duty.ts';
import { flowAt, range, si } from './read.ts';
import type { Plant } from './scene.ts';
import type { StudiedState } from './states.ts';
import type { Study, Working } from './study.ts';
import type { Trace } from './trace.ts';

/** Heat transfer of a reservoir's wall in still air, W/m2K (common practice 10 to 15, no source). */
export const WALL = 12;
const AMBIENT = 293.15;
/** A cooler counts while it gets at least this share of its `passes` flow. */
const SHARE = 0.1;
/** 1 L/min, where a cooler says no `passes`, m3/s. */
const LITTLE = 1 / 60000;

/** Components that share oil: joined by lines and through components, reservoirs included. */
export interface OilGroup {
  readonly reservoirs: readonly Component[];
  readonly pumps: readonly string[];
  readonly bodies: readonly string[];
  readonly coolers: readonly Component[];
}

export function oilGroups(plant: Plant): readonly OilGroup[] {
  const parent = new Map<string, string>();
  const root = (key: string): string => {
    const up = parent.get(key);
    if (up === undefined || up === key) return key;
    const top = root(up);
    parent.set(key, top);
    return top;
  };
  for (const net of plant.circuit.nets) {
    const keys = [...net.ports.map((one) => one.component), ...(net.reservoir === undefined ? [] : [net.reservoir])];
    for (const key of keys) parent.set(root(key), root(`net ${net.id}`));
  }
  for (const piece of plant.circuit.pieces) parent.set(root(`net ${piece.nets[0]}`), root(`net ${piece.nets[1]}`));
  const groups = new Map<string, OilGroup>();
  for (const component of plant.circuit.components) {
    const key = root(component.id);
    const group = groups.get(key) ?? { reservoirs: [], pumps: [], bodies: [], coolers: [] };
    groups.set(key, {
      reservoirs: component.kind === 'reservoir' ? [...group.reservoirs, component] : group.reservoirs,
      pumps: component.kind === 'pump' ? [...group.pumps, component.id] : group.pumps,
      bodies: plant.bodies.some((one) => one.id === component.id) ? [...group.bodies, component.id] : group.bodies,
      coolers: component.kind === 'cooler' ? [...group.coolers, component] : group.coolers,
    });
  }
  return [...groups.values()].filter((one) => one.reservoirs.length > 0);
}

/** Surface of a reservoir, m2: declared, else 6 V^(2/3) of a cube. */
export function surfaceOf(reservoir: Component): { readonly area: number; readonly assumed: boolean } {
  const declared = si(reservoir, 'surface');
  if (declared !== undefined) return { area: declared, assumed: false };
  return { area: 6 * (si(reservoir, 'volume') ?? 0) ** (2 / 3), assumed: true };
}
function ambientOf(reservoir: Component): number {
  return range(reservoir, 'ambient')?.to ?? si(reservoir, 'ambient') ?? AMBIENT;
}

/** T such that k A (T - ambient) + sum power share (T - coolant) = heat; a cooler warmer than the oil gives nothing. */
export function balance(
  heat: number,
  reservoirs: readonly Component[],
  coolers: readonly { readonly cooler: Component; readonly share: number }[],
): { readonly temperature: number; readonly working: Working } {
  const ambient = Math.max(...reservoirs.map(ambientOf));
  const area = reservoirs.reduce((sum, one) => sum + surfaceOf(one).area, 0);
  const wall = WALL * area;
  const active = coolers.map(({ cooler, share }) => ({
    id: cooler.id,
    origin: cooler.origin,
    g: (si(cooler, 'power') ?? 0) * share,
    coolant: si(cooler, 'coolant') ?? ambient,
  }));
  let used = active;
  let temperature = ambient;
  for (let round = 0; round <= active.length; round += 1) {
    const g = wall + used.reduce((sum, one) => sum + one.g, 0);
    temperature =
      g > 0 ? (Math.max(0, heat) + wall * ambient + used.reduce((sum, one) => sum + one.g * one.coolant, 0)) / g : Number.POSITIVE_INFINITY;
    const cooling = used.filter((one) => one.coolant < temperature);
    if (cooling.length === used.length) break;
    used = cooling;
  }
  const first = reservoirs[0]!;
  const working: Working = {
    formula: used.length > 0 ? 'T = (heat + k A T ambient + sum of g T coolant) / (k A + sum of g)' : 'T = T ambient + heat / (k A)',
    inputs: [
      { symbol: 'heat', value: heat, dimension: 'power', source: 'mean shaft power less mean work given to the loads' },
      { symbol: 'k', value: WALL, dimension: 'ratio', source: 'assumed: 12 W/m2K of wall in still air (common practice, no source)' },
      {
        symbol: 'A',
        value: area,
        dimension: 'area',
        source: surfaceOf(first).assumed ? `derived: 6 V^(2/3) of ${first.id}` : `${first.id} surface`,
        origin: first.origin,
      },
      { symbol: 'T ambient', value: ambient, dimension: 'temperature', source: `${first.id} ambient, highest`, origin: first.origin },
      ...used.flatMap((one) => [
        {
          symbol: `g ${one.id}`,
          value: one.g,
          dimension: 'power/temperature' as const,
          source: `${one.id} power x share of time with flow`,
          origin: one.origin,
        },
        {
          symbol: `T coolant ${one.id}`,
          value: one.coolant,
          dimension: 'temperature' as const,
          source: `${one.id} coolant (ambient unless said)`,
          origin: one.origin,
        },
      ]),
    ],
    result: temperature,
    dimension: 'temperature',
    source: 'steady heat balance; k common practice, no source',
  };
  return { temperature, working };
}

function coolerEnough(cooler: Component): number {
  const passes = flowAt(cooler, 'passes');
  return passes ? SHARE * passes.flow : LITTLE;
}
function shareInTraces(cooler: Component, traces: readonly Trace[]): number {
  const enough = coolerEnough(cooler);
  let with_ = 0;
  let all = 0;
  for (const { samples } of traces) {
    for (let i = 0; i + 1 < samples.length; i += 1) {
      const span = samples[i + 1]!.time - samples[i]!.time;
      const flow = Math.abs(samples[i]!.solution.flows[`${cooler.id}.in`] ?? 0);
      all += span;
      if (flow >= enough) with_ += span;
    }
  }
  return all > 0 ? with_ / all : 0;
}

/** Balances by cycle and by state (REST, IDLE; worst variant). With several oil groups the key ends with the reservoir's id too. */
export function heatOf(plant: Plant, rans: readonly Ran[], states: readonly StudiedState[]): Study['heat'] {
  const result: Record<string, { temperature: { value: number; dimension: 'temperature'; working: Working }; heat: number }> = {};
  for (const group of oilGroups(plant)) {
    const put = (id: string, heat: number, coolers: readonly { cooler: Component; share: number }[]) => {
      const { temperature, working } = balance(heat, group.reservoirs, coolers);
      if (!Number.isFinite(temperature)) return;
      const entry = { temperature: { value: temperature, dimension: 'temperature' as const, working }, heat };
      for (const one of group.reservoirs) result[`${id} ${one.id}`] = entry;
      const known = result[id];
      if (!known || known.temperature.value < temperature) result[id] = entry;
    };
    for (const ran of rans) {
      if (ran.cycle.mode !== 'cycle' || ran.counted.every((one) => one.end <= 0)) continue;
      const power = meanPower(ran.counted, group.pumps, group.bodies);
      put(
        ran.cycle.id,
        power.shaft - power.work,
        group.coolers.map((cooler) => ({ cooler, share: shareInTraces(cooler, ran.counted) })),
      );
    }
    for (const { result: state, settings } of states) {
      if (state.state !== 'REST' && state.state !== 'IDLE') continue;
      let worst: { heat: number; index: number } | undefined;
      for (const [index, variant] of state.variants.entries()) {
        if (!variant.point.solved) continue;
        const heat = group.pumps.reduce((sum, one) => sum + (variant.point.power[one] ?? 0), 0);
        if (!worst || heat > worst.heat) worst = { heat, index };
      }
      if (!worst || !settings[worst.index]) continue;
      const flows = state.variants[worst.index]!.point.flows;
      put(
        state.id,
        worst.heat,
        group.coolers.map((cooler) => ({ cooler, share: Math.abs(flows[`${cooler.id}.in`] ?? 0) >= coolerEnough(cooler) ? 1 : 0 })),
      );
    }
  }
  return result;
}
