/** Mends that give a pump a relief: a new one at its outlet, or the one there is moved upstream. */
import type { Component } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import type { Fix, RuleContext } from '../rule.ts';
import { neighbours, takeOut, writtenAt } from './places.ts';
import { below, freeName, reservoirFor, statement, valueOrigin, writable } from './sheet.ts';
import { ratingOf } from '../graph/rating.ts';
import { pumpFlow, pumpFlowTo } from '../graph/flow.ts';
import { drop, reliefSetting, round, type Setting } from './values.ts';

/** A new relief at the pump's outlet with its line to the reservoir. */
export function addRelief(context: RuleContext, graph: Graph, pump: Component, preferred?: Setting): Fix | undefined {
  const { circuit } = graph;
  const net = graph.netAt(pump.id, 'P');
  const reservoir = reservoirFor(circuit, pump.id);
  const at = writtenAt(circuit, pump.id, 'P')[0];
  if (net === undefined || reservoir === undefined || at === undefined || !writable(context, pump)) return undefined;
  const setting = preferred ?? reliefSetting(graph, net.id);
  // All the oil that comes here, not only this pump's; this pump's own flow must be known.
  const flow = pumpFlow(graph, pump) === undefined ? undefined : pumpFlowTo(graph, net.id);
  if (setting === undefined || flow === undefined) return undefined;
  const name = freeName(circuit, 'RV');
  const passes = round(circuit, flow, 'flow', 'up').text;
  return {
    title: `Insert relief ${name} at ${pump.id}.P, set ${setting.text} (${setting.reason}), with a line to ${reservoir}`,
    safe: false,
    changes: [
      below(context, pump.origin, [
        statement(context, pump.origin, 'relief', `${name} (set ${setting.text}, passes ${passes} at ${drop(circuit, 5)})`),
      ]),
      below(context, at.line.origin, [
        statement(context, at.line.origin, 'working', `${pump.id}.P to ${name}`),
        statement(context, at.line.origin, 'return', `${name} to ${reservoir}`),
      ]),
    ],
  };
}

/** The setting of the relief that is there, as written, unless it is above what the pump's line bears. */
export function settingLike(context: RuleContext, graph: Graph, net: string, like: Component): Setting | undefined {
  const property = like.properties.find((p) => p.name === 'set' && p.part === undefined);
  const value = property?.value;
  const rating = ratingOf(graph, net);
  if (
    property === undefined ||
    value?.type !== 'quantity' ||
    value.origin.uri !== context.circuit.uri ||
    (rating !== undefined && value.q.si * 1.1 > rating.value)
  )
    return undefined;
  const { uri, start, end } = valueOrigin(context, property);
  const text = context.text(uri).slice(start, end);
  return { text, si: value.q.si, reason: `as ${like.id}` };
}

/** The relief's inlet taken off its present line and joined to the pump's outlet; undefined where its line would lose its only end. */
export function moveRelief(context: RuleContext, graph: Graph, pump: Component, relief: Component): Fix | undefined {
  if (!writable(context, pump) || !writable(context, relief)) return undefined;
  const inlets = writtenAt(graph.circuit, relief.id, 'P');
  const at = writtenAt(graph.circuit, pump.id, 'P')[0];
  const inlet = inlets[0];
  if (inlets.length !== 1 || inlet === undefined || at === undefined || neighbours(inlet) < 2) return undefined;
  return {
    title: `Join ${relief.id} to ${pump.id}.P, before anything that can close`,
    safe: false,
    changes: [
      ...takeOut([inlet]),
      below(context, at.line.origin, [statement(context, at.line.origin, 'working', `${pump.id}.P to ${relief.id}.P`)]),
    ],
  };
}

/** `locked` behind the `open` of a shut-off. */
export function lockOpen(context: RuleContext, shutoff: Component): Fix | undefined {
  const open = shutoff.properties.find((p) => p.name === 'open' && p.part === undefined);
  if (open === undefined || !writable(context, shutoff)) return undefined;
  const { uri, end } = open.origin;
  return { title: `Lock ${shutoff.id} open`, safe: false, changes: [{ uri, start: end, end, text: ', locked' }] };
}
