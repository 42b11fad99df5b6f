/** H14: a port that must be joined is left open and not plugged. */
import { type Component, KINDS, type PortSpec } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { tell } from '../finding.ts';
import { plugPort, toReservoirLine } from '../fixes/lines.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { list } from '../words.ts';

function portsOf(component: Component): readonly PortSpec[] {
  const kind = KINDS[component.kind];
  return kind.portsOf?.(component) ?? kind.ports;
}

/** Directional valves have the ports of their shape: A and B are there to be used or plugged. */
function mustBeJoined(component: Component, port: PortSpec): boolean {
  return port.required || (component.kind === 'directional' && ['P', 'T', 'A', 'B'].includes(port.name));
}

function isOpen(graph: Graph, component: Component, port: string): boolean {
  const net = graph.netAt(component.id, port);
  return net === undefined || (net.open === true && net.plugged === undefined);
}

function judge(context: RuleContext, graph: Graph, component: Component): Finding[] {
  const ports = portsOf(component);
  const open = ports.filter((p) => mustBeJoined(component, p) && isOpen(graph, component, p.name));
  if (open.length === 0) return [];
  const noun = KINDS[component.kind].noun;
  if (open.length > 1 && ports.every((p) => isOpen(graph, component, p.name))) {
    return [
      tell(H14, {
        what: `${component.id} (${noun}) is joined to nothing: ${list(open.map((p) => `${component.id}.${p.name}`))} ${open.length === 1 ? 'is' : 'are'} open.`,
        origin: component.nameOrigin,
        place: component.id,
      }),
    ];
  }
  return open.map((port) => {
    const place = `${component.id}.${port.name}`;
    const head = port.role === 'drain' ? 'drain' : 'return';
    const away = ['return', 'drain'].includes(port.role) ? toReservoirLine(context, component, port.name, head) : undefined;
    const plug =
      port.role === 'suction' || (component.kind === 'relief' && port.name !== 'X') ? undefined : plugPort(context, component, port.name);
    return tell(H14, {
      what: `${place} of the ${noun} is open: no line leads to it and it is not plugged.`,
      origin: component.nameOrigin,
      place,
      fixes: [away, plug],
    });
  });
}

export const H14: Rule = {
  code: 'H14',
  name: 'open-port',
  title: 'Port without a line',
  severity: 'error',
  why: 'Oil runs out of it, or the function it is there for is missing.',
  ground: 'ISO 1219-2, completeness of circuit diagrams',
  mend: 'Join it by a line, or say with `plug` that it is meant to be closed.',
  needs: 'topology',
  page: `
Every port that its kind needs must be joined by a line or named in a \`plug\` statement; a directional valve has all ports of its shape.
A component with no port joined is told once.

Stays clean: ports that are only there if used (L, X, Y, LS of most kinds), plugged ports, what has no ports. A relief whose T is open is A06; an open Y
of a sequence or reducing valve is F05.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return context.circuit.components.flatMap((component) => judge(context, graph, component));
  },
};
