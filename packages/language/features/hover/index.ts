/** Hover: what stands under the cursor, told from the latest finished study. A pure function; nothing is computed anew here. */
import {
  KINDS,
  LIMITS_PROPERTIES,
  LINE_PROPERTIES,
  LOAD_PROPERTIES,
  type Component,
  type LineStatement,
  type Origin,
  type PropertySpec,
} from '@oilway/circuit';
import type { Analysis, Occurrence } from '../analysis.ts';
import { isLineHead, LINE_FUNCTIONS } from '../../parse/words.ts';
import { cursorAt } from '../completion/context.ts';
import { propertyTable } from '../completion/properties.ts';
import { tokenAt, type Token } from '../text/scan.ts';
import { hoverActuator } from './actuator.ts';
import { hoverCoil } from './coil.ts';
import { hoverKeyword } from './keyword.ts';
import { hoverLine } from './line.ts';
import { hoverPart } from './part.ts';
import { hoverDrive, hoverPump } from './pump.ts';
import { hoverRequirement } from './requirement.ts';
import { hoverState, isState } from './state.ts';
import { hoverConstant, hoverSetting } from './setting.ts';
import { hoverCycle, hoverStep } from './step.ts';
import { hoverUnit } from './unit.ts';
import { hoverValve } from './valve.ts';

export interface HoverText {
  readonly markdown: string;
  readonly start: number;
  readonly end: number;
}

const holds = (origin: Origin, uri: string, offset: number): boolean =>
  origin.uri === uri && origin.start <= offset && offset <= origin.end;

export function hoverAt(analysis: Analysis, offset: number): HoverText | undefined {
  const token = tokenAt(analysis.tokens, offset);
  if (!token || token.type === 'comment' || token.type === 'string') return undefined;
  const markdown = textOf(analysis, offset, token);
  return markdown ? { markdown, start: token.start, end: token.end } : undefined;
}

function textOf(analysis: Analysis, offset: number, token: Token): string | undefined {
  if (token.type === 'number' || token.type === 'unit') return numberText(analysis, token);
  if (token.type !== 'word') return undefined;
  const occurrence = analysis.occurrenceAt(offset);
  if (occurrence && occurrence.kind !== 'property') {
    const text = hoverOccurrence(analysis, occurrence);
    if (text) return text;
  }
  const { circuit } = analysis;
  if (circuit) {
    if (token.text === 'require') {
      const requirement = circuit.requirements.find((one) => holds(one.origin, analysis.uri, offset));
      if (requirement) return hoverRequirement(analysis, requirement);
    }
    if ((LINE_FUNCTIONS as readonly string[]).includes(token.text) || token.text === 'to') {
      const line = circuit.lines.find((one) => holds(one.origin, analysis.uri, offset));
      const text = line && lineText(analysis, line, token);
      if (text) return text;
    }
  }
  const property = propertyText(analysis, token);
  if (property) return property;
  if (isState(token.text)) return hoverState(analysis, token.text);
  const requirement = circuit?.requirements.find((one) => holds(one.origin, analysis.uri, offset));
  return (
    [hoverKeyword(token.text), requirement && hoverRequirement(analysis, requirement)].filter(Boolean).join('\n\n---\n\n') || undefined
  );
}

function hoverOccurrence(analysis: Analysis, occurrence: Occurrence): string | undefined {
  const { circuit } = analysis;
  if (!circuit) return undefined;
  const { id } = occurrence;
  switch (occurrence.kind) {
    case 'component': {
      const component = circuit.components.find((one) => one.id === id);
      return component && hoverComponent(analysis, component);
    }
    case 'port': {
      const component = circuit.components.find((one) => one.id === id.slice(0, id.lastIndexOf('.')));
      return component && hoverPort(analysis, component, id.slice(id.lastIndexOf('.') + 1));
    }
    case 'coil': {
      const coil = circuit.coils.find((one) => one.id === id);
      return coil && hoverCoil(analysis, coil);
    }
    case 'line': {
      const line = circuit.lines.find((one) => one.name === id);
      return line && hoverLine(analysis, line);
    }
    case 'constant': {
      const constant = circuit.constants.find((one) => one.name === id);
      return constant && hoverConstant(analysis, constant);
    }
    case 'cycle': {
      const cycle = circuit.cycles.find((one) => one.id === id);
      return cycle && hoverCycle(analysis, cycle);
    }
    case 'step': {
      const step = circuit.cycles.flatMap((cycle) => cycle.steps).find((one) => one.id === id);
      return step && hoverStep(analysis, step);
    }
    default:
      return undefined;
  }
}

export function hoverComponent(analysis: Analysis, component: Component): string {
  switch (component.kind) {
    case 'cylinder':
    case 'motor':
    case 'rotary':
      return hoverActuator(analysis, component);
    case 'pump':
      return hoverPump(analysis, component);
    case 'drive':
      return hoverDrive(analysis, component);
    case 'fluid':
    case 'reservoir':
    case 'accumulator':
    case 'switch':
    case 'sensor':
    case 'gauge':
    case 'heater':
    case 'brake':
      return hoverPart(analysis, component);
    default:
      return hoverValve(analysis, component);
  }
}

function hoverPort(analysis: Analysis, component: Component, port: string): string | undefined {
  const kind = KINDS[component.kind];
  const spec = (kind.portsOf?.(component) ?? kind.ports).find((one) => one.name === port);
  if (!spec) return undefined;
  const line = `**${component.id}.${port}** ${spec.role === 'any' ? '' : `${spec.role} `}port${spec.about ? `: ${spec.about}` : ''}`;
  return `${line}\n\n${hoverComponent(analysis, component)}`;
}

/** On the head: every piece; on a `to`: the piece that it is. */
function lineText(analysis: Analysis, line: LineStatement, token: Token): string | undefined {
  if (token.text !== 'to') return hoverLine(analysis, line);
  const index = line.stations.findIndex(
    (station, i) =>
      i + 1 < line.stations.length && station.origin.end <= token.start && (line.stations[i + 1]?.origin.start ?? 0) >= token.end,
  );
  const piece = line.pieces[index];
  return piece ? hoverLine(analysis, line, piece) : undefined;
}

function numberText(analysis: Analysis, token: Token): string | undefined {
  const index = analysis.tokens.indexOf(token);
  let first = index;
  let last = index;
  while (analysis.tokens[last]?.type === 'number' && analysis.tokens[last + 1]?.type === 'number') last += 1;
  if (analysis.tokens[last]?.type === 'number' && analysis.tokens[last + 1]?.type === 'unit') last += 1;
  while (first > 0 && analysis.tokens[first - 1]?.type === 'number') first -= 1;
  const unit = analysis.tokens[last]?.type === 'unit' ? analysis.tokens[last] : undefined;
  const number = analysis.tokens
    .slice(first, last + 1)
    .filter((one) => one.type === 'number')
    .map((one) => one.text)
    .join(' ');
  return hoverUnit(number, unit);
}

/** A property name: its meaning; in a component also what depends on it. */
function propertyText(analysis: Analysis, token: Token): string | undefined {
  const cursor = cursorAt(analysis, token.start);
  const table = propertyTable(cursor.before);
  const previous = cursor.before.at(-1)?.text;
  if (!table || isLineHead(token.text) || (previous !== '(' && previous !== ',')) return undefined;
  const spec: PropertySpec | undefined = table.find((one) => one.name === token.text);
  if (!spec) return undefined;
  if (table === LINE_PROPERTIES || table === LOAD_PROPERTIES || table === LIMITS_PROPERTIES) return hoverSetting(analysis, spec);
  for (const component of analysis.circuit?.components ?? []) {
    const property = component.properties.find((one) => one.nameOrigin.uri === analysis.uri && one.nameOrigin.start === token.start);
    if (property) return hoverSetting(analysis, spec, component, property);
  }
  return hoverSetting(analysis, spec);
}
