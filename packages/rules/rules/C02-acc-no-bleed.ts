/** C02: an accumulator that can be emptied neither by hand nor by itself. */
import { read } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { toReservoir } from '../graph/guards.ts';
import { sprungPosition } from '../graph/paths.ts';
import type { Passing } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { bleed } from '../fixes/accumulator.ts';
import type { Rule } from '../rule.ts';
import { show } from '../words.ts';

/** Ways that are open without current or that a hand can open. */
function withoutCurrent(graph: Graph): Passing {
  return (edge) => {
    if (edge.class === 'always' || edge.kind === 'shutoff') return 0;
    if (edge.kind === 'coupling' || edge.kind === 'filter') return 0;
    const valve = edge.kind === 'directional' ? graph.component(edge.component) : undefined;
    if (valve === undefined) return undefined;
    if (read.has(valve, 'lever')) return 0;
    const rest = sprungPosition(valve);
    return rest !== undefined && edge.positions?.includes(rest) === true ? 0 : undefined;
  };
}

export const C02: Rule = {
  code: 'C02',
  name: 'acc-no-bleed',
  title: 'Accumulator cannot be emptied',
  severity: 'error',
  why: 'It stays charged when the machine is off and locked out: stored oil has killed people.',
  ground: 'ISO 4413, gas-loaded accumulators; ISO 14118; OSHA 1910.147(d)(5), stored energy',
  mend: 'Give it a bleed to the reservoir: a hand valve, a valve that opens without current, or both.',
  needs: 'topology',
  page: `
With the drives stopped and no coil live, a way to the reservoir is looked for that is open by itself (a valve that opens without current, a
throttle, a sprung centre) or that a hand can open (a shut-off, a lever valve).

Stays clean: a closed shut-off to the reservoir; a 2/2 valve \`normally open\` to it. Does not count: a relief, a valve that needs
current to open, a detent valve without a lever (it may stand either way).`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph.ofKind('accumulator').flatMap((store) => {
      const net = graph.netAt(store.id, 'P');
      if (net === undefined || net.open === true || toReservoir(graph, net.id, withoutCurrent(graph)) !== undefined) return [];
      const precharge = store.properties.find((p) => p.name === 'precharge')?.value;
      const volume = read.si(store, 'volume');
      const size = [
        volume === undefined ? '' : show(context.circuit, volume, 'volume'),
        precharge?.type === 'precharge'
          ? `precharged ${show(context.circuit, precharge.pressure.si, 'pressure', precharge.pressure.unit)}`
          : '',
      ]
        .filter((s) => s !== '')
        .join(', ');
      return [
        tell(C02, {
          what: `${store.id}${size === '' ? '' : ` (${size})`} cannot be emptied with the machine off: no way from ${store.id}.P to a reservoir opens by hand or without current.`,
          origin: store.nameOrigin,
          place: store.id,
          state: 'OFF',
          fixes: [bleed(context, graph, store)],
        }),
      ];
    });
  },
};
