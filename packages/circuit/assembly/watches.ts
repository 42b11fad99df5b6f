/** What a run is stopped for, in the engine's terms. */
import type { TransientWatch, WatchTerm } from '@oilway/engine';
import { si } from '../kinds/read.ts';
import type { Assembled } from './assembled.ts';
import type { Setting, Watch } from './machine.ts';
import { chargeIn, positionOf } from './setting.ts';
import { toLitres, toMPa } from './units.ts';

export function engineWatch(assembled: Assembled, watch: Watch, start: Setting): TransientWatch {
  const { edge } = watch;
  switch (watch.what) {
    case 'pressure': {
      const terms: WatchTerm[] = [];
      const add = (net: string | undefined, weight: number): void => {
        const node = net === undefined ? undefined : assembled.nodeOf.get(net);
        if (node !== undefined) terms.push({ of: 'pressure', index: node, weight });
      };
      add(watch.net, 1);
      add(watch.minus, -1);
      return { terms, threshold: toMPa(watch.threshold), edge };
    }
    case 'position': {
      const index = assembled.bodies.findIndex((b) => b.id === watch.body || b.actuators.includes(watch.body));
      return {
        terms: index < 0 ? [] : [{ of: 'position', index, weight: 1 }],
        threshold: beyondStop(assembled.bodies[index]?.stroke, watch),
        edge,
      };
    }
    case 'oil': {
      const index = assembled.gases.findIndex((g) => g.component === watch.accumulator);
      return { terms: index < 0 ? [] : [{ of: 'oil', index, weight: 1 }], threshold: toLitres(watch.threshold), edge };
    }
    case 'level': {
      const { terms, atStart } = levelTerms(assembled, watch.reservoir, start);
      return { terms, threshold: toLitres(watch.threshold) - atStart, edge };
    }
  }
}

/** How far a threshold at a stop is put beyond it, m: a body comes to rest on its stop, it never passes it. */
const BEYOND = 1e-6;
function beyondStop(stroke: number | undefined, watch: { readonly threshold: number; readonly edge: 'rising' | 'falling' }): number {
  const { threshold, edge } = watch;
  if (stroke === undefined || stroke === Number.POSITIVE_INFINITY) return threshold;
  if (edge === 'falling' && Math.abs(threshold) < BEYOND) return -BEYOND;
  if (edge === 'rising' && Math.abs(threshold - stroke) < BEYOND) return stroke + BEYOND;
  return threshold;
}

/**
 * Content of a reservoir, L: what it holds at the start less what cylinders and accumulators have taken since. Bodies and charges
 * count for the reservoir their oil reaches; `atStart` is the constant part.
 */
export function levelTerms(
  assembled: Assembled,
  reservoir: string,
  start: Setting,
): { readonly terms: readonly WatchTerm[]; readonly atStart: number } {
  const component = assembled.circuit.components.find((c) => c.id === reservoir);
  const group = oilGroup(assembled, reservoir);
  const terms: WatchTerm[] = [];
  let atStart = toLitres((component === undefined ? undefined : si(component, 'volume')) ?? 0);
  assembled.bodies.forEach((body, index) => {
    const taken = assembled.chambers.filter((c) => c.body === index && group.has(c.component)).reduce((sum, c) => sum + c.area, 0);
    if (taken === 0 || body.stroke === Number.POSITIVE_INFINITY) return;
    terms.push({ of: 'position', index, weight: -taken });
    atStart += taken * positionOf(body, { ...start, positions: {} });
  });
  assembled.gases.forEach((gas, index) => {
    if (!group.has(gas.component)) return;
    terms.push({ of: 'oil', index, weight: -1 });
    atStart += toLitres(chargeIn(gas, { ...start, oil: {} }).oil);
  });
  return { terms, atStart };
}

/** Components whose oil comes from this reservoir: joined by lines and through components; the first reservoir of a group has it all. */
function oilGroup(assembled: Assembled, reservoir: string): ReadonlySet<string> {
  const { nets, components } = assembled.circuit;
  const first = new Set<string>();
  const seen = new Set<string>();
  const queue = [reservoir];
  for (let id = queue.pop(); id !== undefined; id = queue.pop()) {
    if (seen.has(id)) continue;
    seen.add(id);
    for (const net of nets) {
      const touches = net.reservoir === id || net.ports.some((p) => p.component === id);
      if (!touches) continue;
      if (net.reservoir !== undefined) {
        first.add(net.reservoir);
        queue.push(net.reservoir);
      }
      for (const p of net.ports) queue.push(p.component);
    }
  }
  const order = components.filter((c) => c.kind === 'reservoir' && (first.has(c.id) || c.id === reservoir));
  return order[0]?.id === reservoir ? seen : new Set();
}
