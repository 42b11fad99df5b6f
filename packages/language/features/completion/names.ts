/** Proposals that name something of the circuit: components, ports, lines, coils, switches, steps. */
import { CompletionItemKind } from 'vscode-languageserver-types';
import { KINDS, type Circuit, type Component, type KindName, type PortSpec } from '@oilway/circuit';
import type { Proposal } from './item.ts';

export function portsOf(component: Component): readonly PortSpec[] {
  const kind = KINDS[component.kind];
  return kind.portsOf?.(component) ?? kind.ports;
}

/** True where the component must be written with its port (`C1.cap`). */
function writesPort(component: Component): boolean {
  const kind = KINDS[component.kind];
  return (kind.chainOf?.(component) ?? kind.chain).how === 'none' && portsOf(component).length > 0;
}

/** Ports that a line already reaches or a `plug` closes. */
export function joinedPorts(circuit: Circuit): ReadonlySet<string> {
  const joined = new Set<string>();
  for (const net of circuit.nets) {
    if (net.open) continue;
    for (const port of net.ports) joined.add(`${port.component}.${port.port}`);
  }
  return joined;
}

const describe = (component: Component): string => {
  const noun = KINDS[component.kind].noun;
  const shape = component.shape ? `${component.shape.ports}/${component.shape.positions} ` : '';
  return component.title ? `${shape}${noun}: ${component.title}` : `${shape}${noun}`;
};

export function components(circuit: Circuit, of?: readonly KindName[], rank = 5): Proposal[] {
  return circuit.components
    .filter((one) => !of || of.length === 0 || of.includes(one.kind))
    .map((one) => ({ label: one.id, kind: CompletionItemKind.Variable, detail: describe(one), rank }));
}

/** What may stand in a line's chain: components with ports, and lines with a name. Those with open ports come first. */
export function places(circuit: Circuit): Proposal[] {
  const joined = joinedPorts(circuit);
  const found: Proposal[] = [];
  for (const component of circuit.components) {
    const ports = portsOf(component);
    if (ports.length === 0) continue;
    const open = ports.filter((port) => !joined.has(`${component.id}.${port.name}`) && port.required);
    const detail =
      open.length > 0 && component.kind !== 'reservoir'
        ? `${describe(component)}, open: ${open.map((port) => port.name).join(', ')}`
        : describe(component);
    const rank = component.kind === 'reservoir' ? 2 : open.length > 0 ? 1 : 3;
    found.push({
      label: component.id,
      kind: CompletionItemKind.Variable,
      detail,
      rank,
      ...(writesPort(component) ? { insert: `${component.id}.`, again: true } : {}),
    });
  }
  for (const line of circuit.lines)
    if (line.name) found.push({ label: line.name, kind: CompletionItemKind.Interface, detail: `${line.function} line`, rank: 2 });
  return found;
}

/** What may follow the dot: ports (open ones first), what a unit holds, a cycle's steps. */
export function members(circuit: Circuit, owner: string): Proposal[] {
  const found: Proposal[] = [];
  const component = circuit.components.find((one) => one.id === owner);
  if (component) {
    const joined = joinedPorts(circuit);
    for (const port of portsOf(component)) {
      const taken = joined.has(`${owner}.${port.name}`);
      found.push({
        label: port.name,
        kind: CompletionItemKind.Field,
        detail: `${port.role === 'any' ? '' : `${port.role} `}port, ${taken ? 'joined' : 'open'}`.trim(),
        ...(port.about ? { about: port.about } : {}),
        rank: taken ? 3 : port.required ? 1 : 2,
      });
    }
  }
  const inside = `${owner}.`;
  const next = (id: string): string => id.slice(inside.length).split('.')[0] ?? '';
  const seen = new Set<string>();
  const add = (id: string, kind: CompletionItemKind, detail: string): void => {
    const label = next(id);
    if (!id.startsWith(inside) || !label || seen.has(label)) return;
    seen.add(label);
    found.push({ label, kind, detail, rank: 4 });
  };
  for (const one of circuit.components) add(one.id, CompletionItemKind.Variable, describe(one));
  for (const one of circuit.coils) add(one.id, CompletionItemKind.Event, `coil of ${one.component}`);
  for (const line of circuit.lines) if (line.name) add(line.name, CompletionItemKind.Interface, `${line.function} line`);
  for (const cycle of circuit.cycles) for (const step of cycle.steps) add(step.id, CompletionItemKind.Function, step.title ?? 'step');
  return found;
}

export function coils(circuit: Circuit): Proposal[] {
  return circuit.coils.map((coil) => {
    const valve = circuit.components.find((one) => one.id === coil.component);
    return {
      label: coil.id,
      kind: CompletionItemKind.Event,
      detail: `${coil.side ? `${coil.side} of ` : ''}${coil.component}${valve?.title ? `, ${valve.title}` : ''}`,
      rank: 1,
    };
  });
}

/** What a condition may ask about. */
export function conditionNames(circuit: Circuit): Proposal[] {
  return [
    ...components(circuit, ['switch', 'sensor'], 1),
    ...components(circuit, ['cylinder', 'motor', 'rotary'], 2),
    ...coils(circuit).map((one) => ({ ...one, rank: 3 })),
    ...steps(circuit, 4),
    ...cycles(circuit, 4),
  ];
}

export function steps(circuit: Circuit, rank = 2): Proposal[] {
  const names = new Map<string, number>();
  for (const cycle of circuit.cycles) for (const step of cycle.steps) names.set(step.name, (names.get(step.name) ?? 0) + 1);
  return circuit.cycles.flatMap((cycle) =>
    cycle.steps.map((step) => ({
      label: names.get(step.name) === 1 ? step.name : step.id,
      kind: CompletionItemKind.Function,
      detail: step.title ?? `step of ${cycle.id}`,
      rank,
    })),
  );
}

export function cycles(circuit: Circuit, rank = 2): Proposal[] {
  return circuit.cycles.map((cycle) => ({
    label: cycle.id,
    kind: CompletionItemKind.Module,
    detail: cycle.title ?? (cycle.mode === 'manual' ? 'manual function' : 'cycle'),
    rank,
  }));
}

export function constants(circuit: Circuit, dimensions: readonly string[] = []): Proposal[] {
  return circuit.constants
    .filter((one) => !one.value || dimensions.length === 0 || dimensions.includes(one.value.dimension))
    .map((one) => ({ label: one.name, kind: CompletionItemKind.Constant, detail: 'constant', rank: 4 }));
}

export const STATES: readonly Proposal[] = [
  { label: 'REST', kind: CompletionItemKind.EnumMember, detail: 'drives turn, all coils dead', rank: 3 },
  { label: 'OFF', kind: CompletionItemKind.EnumMember, detail: 'drives stopped, all coils dead', rank: 3 },
  { label: 'STOP', kind: CompletionItemKind.EnumMember, detail: 'emergency stop', rank: 3 },
  { label: 'IDLE', kind: CompletionItemKind.EnumMember, detail: 'as REST, while lines act', rank: 3 },
];
