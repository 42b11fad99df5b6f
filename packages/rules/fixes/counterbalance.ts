/** Mend that puts a counterbalance valve on the port of a loaded chamber. */
import { read } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import type { Fix, RuleContext } from '../rule.ts';
import { type Carried, chamberArea } from '../rules/sources.ts';
import { isMiddle, replace, writtenAt } from './places.ts';
import { below, freeName, statement, writable } from './sheet.ts';
import { pumpFlow } from '../graph/flow.ts';
import { drop, round } from './values.ts';

/** Set 30 % above the pressure the load needs (common practice), piloted from the other chamber. */
export function counterbalance(context: RuleContext, graph: Graph, carried: Carried): Fix | undefined {
  const { circuit } = graph;
  const { actuator, port, force } = carried;
  const other = port === 'cap' ? 'rod' : 'cap';
  const places = writtenAt(circuit, actuator.id, port);
  const at = places[0];
  const area = chamberArea(actuator, port);
  const opposite = graph.netAt(actuator.id, other);
  if (!writable(context, actuator) || places.length !== 1 || at === undefined || isMiddle(at) || area === undefined) return undefined;
  if (opposite === undefined || opposite.open === true) return undefined;
  const name = freeName(circuit, 'CB');
  const set = round(circuit, (1.3 * force) / area, 'pressure', 'up');
  const pumps = graph.ofKind('pump').reduce((sum, pump) => sum + (pumpFlow(graph, pump) ?? 0), 0);
  const flow = pumps > 0 ? pumps : 40 / 60000;
  const ratio = (chamberArea(actuator, port) ?? 1) / Math.max(chamberArea(actuator, other) ?? 1, 1e-9);
  const passes = round(circuit, flow * Math.max(1, ratio), 'flow', 'up').text;
  const joint = read.word({ properties: at.line.properties }, 'flanged') === undefined ? ' (flanged)' : '';
  return {
    title: `Insert counterbalance valve ${name} at ${actuator.id}.${port}, set ${set.text} (30 % above the load), piloted from ${actuator.id}.${other}`,
    safe: false,
    changes: [
      below(context, actuator.origin, [
        statement(
          context,
          actuator.origin,
          'counterbalance',
          `${name} (set ${set.text}, ratio 3:1, passes ${passes} at ${drop(circuit, 6)})`,
        ),
      ]),
      replace(at, `${name}.V`),
      below(context, at.line.origin, [
        statement(context, at.line.origin, 'working', `${name}.C to ${actuator.id}.${port}${joint}`),
        statement(context, at.line.origin, 'pilot', `${actuator.id}.${other} to ${name}.X`),
      ]),
    ],
  };
}
