/** Proposals inside brackets: properties of the kind, then what a property takes. */
import { CompletionItemKind } from 'vscode-languageserver-types';
import { unitsOf, type Dimension } from '@oilway/quantity';
import {
  KINDS,
  KIND_NAMES,
  LIMITS_PROPERTIES,
  LINE_PROPERTIES,
  LOAD_PROPERTIES,
  type Circuit,
  type KindName,
  type PropertySpec,
  type Shape,
} from '@oilway/circuit';
import type { Token } from '../text/scan.ts';
import { LINE_FUNCTIONS } from '../../parse/words.ts';
import type { BracketEntry } from './context.ts';
import { components, constants, portsOf, steps } from './names.ts';
import { word, type Proposal } from './item.ts';

export const isKind = (name: string): name is KindName => (KIND_NAMES as readonly string[]).includes(name);

/** The property table that holds in this statement's brackets; undefined where none does. */
export function propertyTable(statement: readonly Token[]): readonly PropertySpec[] | undefined {
  const head = statement[0]?.text ?? '';
  const second = statement[1]?.text ?? '';
  if (isKind(head)) return KINDS[head].properties;
  if (head === 'part' && isKind(second)) return KINDS[second].properties;
  if ((LINE_FUNCTIONS as readonly string[]).includes(head)) return LINE_PROPERTIES;
  if (head === 'load') return LOAD_PROPERTIES;
  if (head === 'limits') return LIMITS_PROPERTIES;
  return undefined;
}

/** Dimensions a number has behind what is written of the property so far. */
export function dimensionsOf(spec: PropertySpec, entry: readonly Token[]): readonly Dimension[] {
  const { shape } = spec;
  if (entry.some((token) => token.text === '±')) {
    const own = dimensionsBefore(shape, entry);
    return [...own, 'ratio'];
  }
  return dimensionsBefore(shape, entry);
}

function dimensionsBefore(shape: Shape, entry: readonly Token[]): readonly Dimension[] {
  const has = (text: string): boolean => entry.some((token) => token.text === text);
  switch (shape.form) {
    case 'quantity':
    case 'range':
      return shape.dimensions;
    case 'portQuantity':
    case 'span':
    case 'list':
      return [shape.dimension];
    case 'flowAt':
      return has('at') ? ['pressure'] : ['flow'];
    case 'cam':
      return ['length', 'angle'];
    case 'attitude':
      return ['angle'];
    case 'bypass':
      return ['pressure'];
    case 'precharge':
      return has('at') ? ['temperature'] : ['pressure'];
    case 'place':
      return ['length', 'angle'];
    case 'coil':
      return ['voltage'];
    case 'position':
      return has('at') ? ['pressure'] : ['flow'];
    case 'load': {
      const inTable = entry.at(1)?.text === '(';
      if (inTable) {
        const cut = Math.max(
          entry.findLastIndex((token) => token.text === ','),
          entry.findLastIndex((token) => token.text === '('),
        );
        return entry.slice(cut).some((token) => token.text === ':') ? ['force', 'torque'] : ['length', 'angle'];
      }
      return has('from') || has('to') ? ['length', 'angle'] : ['force', 'torque'];
    }
    default:
      return [];
  }
}

/** Units of the dimensions; the one the file uses most comes first. */
export function units(circuit: Circuit | undefined, dimensions: readonly Dimension[]): Proposal[] {
  return dimensions.flatMap((dimension) =>
    unitsOf(dimension).map((unit) => ({
      label: unit.symbol,
      kind: CompletionItemKind.Unit,
      detail: unit.about,
      rank: circuit?.units[dimension] === unit.symbol ? 0 : unit.system === 'us' ? 3 : 2,
    })),
  );
}

/** Names of properties that may still be written, what is required first. */
export function propertyNames(table: readonly PropertySpec[], written: readonly string[]): Proposal[] {
  const taken = new Set(written);
  const groupTaken = new Set(table.filter((spec) => spec.group && taken.has(spec.name)).map((spec) => spec.group));
  return table
    .filter((spec) => spec.many || !taken.has(spec.name))
    .map((spec) => ({
      label: spec.name,
      kind: CompletionItemKind.Property,
      detail: spec.required ? `required, e.g. ${spec.example}` : `e.g. ${spec.example}`,
      about: propertyAbout(spec),
      insert: spec.shape.form === 'flag' ? spec.name : `${spec.name} `,
      rank:
        spec.required && !taken.has(spec.name)
          ? 0
          : spec.group && !groupTaken.has(spec.group)
            ? 1
            : spec.name === 'code' || spec.name === 'elevation'
              ? 4
              : 2,
    }));
}

export function propertyAbout(spec: PropertySpec): string {
  const fallback = spec.required ? '' : spec.default === '—' ? '' : `Unsaid: ${spec.default}.`;
  return [spec.about, fallback, `\`${spec.example}\``].filter(Boolean).join('  \n');
}

/** What may follow inside a property. */
export function propertyValues(circuit: Circuit | undefined, spec: PropertySpec, place: BracketEntry): Proposal[] {
  const { entry } = place;
  const last = entry.at(-1)?.text ?? '';
  const has = (text: string): boolean => entry.some((token) => token.text === text);
  const afterValue = entry.at(-1)?.type === 'unit' || entry.at(-1)?.type === 'number';
  const actuators = (): Proposal[] => (circuit ? components(circuit, ['cylinder', 'motor', 'rotary'], 1) : []);
  const span = (): Proposal[] => (last === spec.name || !has('from') ? [word('from')] : afterValue && !has('to') ? [word('to')] : []);
  const first = entry.length === 1;
  const { shape } = spec;
  const values = circuit ? constants(circuit, dimensionsOf(spec, entry)) : [];
  switch (shape.form) {
    case 'word':
      return first ? shape.words.map((one) => word(one, '', 1)) : [];
    case 'toWord':
      return last === 'to' ? shape.words.map((one) => word(one, '', 1)) : first ? [word('to')] : [];
    case 'reference':
      if (shape.small && !has(shape.small)) return [word(shape.small)];
      return circuit && (first || last === shape.small) ? components(circuit, shape.kinds, 1) : [];
    case 'coil':
      return first ? ['a', 'b'].map((one) => word(one, 'side of the valve', 1)) : [];
    case 'cam':
      if (shape.small && first) return [word(shape.small)];
      if (!shape.small && first) return ['a', 'b', 'centre'].map((one) => word(one, 'position it moves the valve to', 1));
      if (entry.length === 2) return actuators();
      return has('from') ? (afterValue && !has('to') ? [word('to')] : []) : [word('from')];
    case 'position': {
      if (first)
        return [
          ...(spec.name === 'centre' ? ['closed', 'open', 'tandem', 'float'].map((one) => word(one, 'all positions of this name', 1)) : []),
          { ...word('(', 'own paths', 2), insert: '(' },
        ];
      const own = ownPorts(circuit, place);
      if (last === '(' || last === ',' || last === 'to') return own.map((port) => word(port, 'port', 1));
      if (own.includes(last)) return [word(entry.at(-2)?.text === 'to' ? 'passes' : 'to')];
      return afterValue && has('passes') && !has('at') ? [word('at')] : [];
    }
    case 'attitude':
      return first
        ? [word('rod', 'rod up, rod down', 1), word('level', 'no weight along the rod', 1)]
        : last === 'rod'
          ? [word('up', 'weight acts inward', 1), word('down', 'weight acts outward', 1)]
          : [];
    case 'bypass':
      return first ? [word('none', 'no bypass valve')] : [];
    case 'precharge':
      return afterValue && !has('at') ? [word('at', 'gas temperature at filling')] : values;
    case 'flowAt': {
      if (afterValue && !has('at')) return [word('at', 'pressure drop')];
      if (!shape.perPath || afterValue) return values;
      const own = ownPorts(circuit, place);
      return first || last === 'to' ? [...own.map((port) => word(port, 'port', 3)), ...values] : own.includes(last) ? [word('to')] : values;
    }
    case 'range':
    case 'span':
      return afterValue && !has('to') ? [word('to')] : values;
    case 'place':
      return first
        ? (spec.name === 'begins' ? ['retracted', 'extended'] : ['a', 'b', 'centre', 'open', 'closed']).map((one) => word(one, '', 1))
        : [];
    case 'portQuantity':
      if (spec.name === 'velocity' && first) return LINE_FUNCTIONS.map((one) => word(one, 'lines of this function', 1));
      return first ? [...ownPorts(circuit, place).map((port) => word(port, 'for this port only', 3)), ...values] : afterValue ? [] : values;
    case 'list':
      return afterValue ? [word('and')] : values;
    case 'load': {
      if (last === 'in') return circuit ? steps(circuit, 1) : [];
      if (first) return values;
      if (!afterValue && last !== ')') return values;
      const words = [
        ...span(),
        ...(has('extending') || has('retracting') ? [] : [word('extending'), word('retracting')]),
        ...(has('in') || spec.name === 'resist' ? [] : [word('in', 'only in a step')]),
      ];
      return spec.name === 'resist' ? words : words.filter((one) => one.label !== 'extending' && one.label !== 'retracting');
    }
    case 'quantity':
      return afterValue ? [word('±', 'tolerance')] : [...values, ...(first ? [word('?', 'find the size', 6)] : [])];
    default:
      return [];
  }
}

/** Ports of the component that the statement declares. */
function ownPorts(circuit: Circuit | undefined, place: BracketEntry): string[] {
  const names = place.outside.filter((token) => token.type === 'word').map((token) => token.text);
  const known = circuit?.components.find((one) => names.includes(one.id));
  if (known) return portsOf(known).map((port) => port.name);
  const kind = names.find(isKind);
  return kind ? KINDS[kind].ports.map((port) => port.name) : [];
}
