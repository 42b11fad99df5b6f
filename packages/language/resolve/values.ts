/** Values: numbers with units, constants, sums and products, checked for their dimension. */
import type { Origin } from '@oilway/circuit';
import {
  type Amount,
  type Dimension,
  type Outcome,
  type Quantity,
  add,
  amountOf,
  divide,
  greatest,
  least,
  multiply,
  nearestUnit,
  negate,
  quantityOf,
  squareRoot,
  subtract,
  toSi,
  unitOf,
  unitsOf,
} from '@oilway/quantity';
import type { Factor, Group, Quantity as QuantityNode, RefValue, Term, Value } from '../generated/ast.ts';
import type { Context, Placed } from './context.ts';

export interface Computed {
  readonly q: Quantity;
  readonly from: readonly string[];
  readonly origin: Origin;
  /** A number written without unit and without constant. */
  readonly bare: boolean;
}

interface Part {
  readonly amount: Amount;
  readonly bare: boolean;
}

/** Largest number of digits' worth taken; beyond it a figure is a slip of the hand. */
const LARGEST = 1e15;

type ConstantState = { readonly state: 'computing' } | { readonly state: 'done'; readonly value: Computed | undefined };

export class Values {
  private readonly context: Context;
  private readonly constants = new Map<string, ConstantState>();
  private path: string[] = [];
  /** Dimension wanted of the value being read, for "did you mean" of units. */
  private wanted: Dimension | undefined;

  constructor(context: Context) {
    this.context = context;
  }

  /** The value of a constant; rings are said once and have none. */
  constant(name: string): Computed | undefined {
    const known = this.constants.get(name);
    if (known?.state === 'done') return known.value;
    const node = this.context.constants.get(name);
    if (known?.state === 'computing') {
      const ring = [...this.path.slice(this.path.indexOf(name)), name];
      this.context.report({
        code: 'VALUE',
        what: `The constants ${ring.map((word) => `\`${word}\``).join(', ')} are defined by each other in a ring`,
        mend: 'Give one of them a value of its own.',
        origin: this.context.origin(node?.name ?? node),
        related: ring
          .slice(1, -1)
          .map((word) => ({ message: `\`${word}\` is in the ring`, origin: this.context.origin(this.context.constants.get(word)?.name) })),
        place: name,
      });
      return undefined;
    }
    if (node === undefined) return undefined;
    if (this.path.length > 200) {
      this.context.report({
        code: 'VALUE',
        what: `\`${name}\` is defined through more than 200 other constants`,
        origin: this.context.origin(node.name),
      });
      return undefined;
    }
    this.constants.set(name, { state: 'computing' });
    this.path.push(name);
    const value = node.value === undefined ? undefined : this.compute(node.value);
    this.path.pop();
    this.constants.set(name, { state: 'done', value });
    return value;
  }

  /** Computes a value; what is wrong is reported and gives `undefined`. */
  compute(node: Value | undefined, expected?: Dimension): Computed | undefined {
    if (node === undefined) return undefined;
    const from: string[] = [];
    const before = this.wanted;
    this.wanted = expected;
    const partial = this.value(node, from);
    this.wanted = before;
    if (partial === undefined) return undefined;
    const origin = this.context.origin(node);
    const q = quantityOf(partial.amount, expected);
    if (!q.ok) return this.wrong(q.problem, node, 'M07');
    return { q: q.value, from, origin, bare: partial.bare };
  }

  /** A value that must be of one of the dimensions (none given: of any). */
  quantity(node: Value | undefined, dimensions: readonly Dimension[], example = ''): Computed | undefined {
    const computed = this.compute(node, dimensions[0]);
    if (computed === undefined || node === undefined) return undefined;
    return this.fits(computed, dimensions, example) ? computed : undefined;
  }

  /** Checks the dimension and that a unit is written. */
  fits(computed: Computed, dimensions: readonly Dimension[], example = ''): boolean {
    const { q, origin } = computed;
    if (computed.bare && (dimensions.length === 0 || !dimensions.includes('ratio') || computed.q.unit === '')) {
      this.missingUnit(computed, dimensions, example);
      return false;
    }
    if (dimensions.length === 0 || dimensions.includes(q.dimension)) return true;
    const wanted = dimensions.map(nameOfDimension).join(' or ');
    const units = dimensions.flatMap((dimension) =>
      unitsOf(dimension)
        .slice(0, 3)
        .map((unit) => unit.symbol),
    );
    const point = dimensions.includes('temperature') && q.dimension === 'temperature difference';
    this.context.report({
      code: 'M07',
      what: point
        ? `\`${this.context.slice(origin)}\` is a difference; a temperature is written in degC or degF`
        : `\`${this.context.slice(origin)}\` is ${nameOfDimension(q.dimension)}; ${wanted} is needed here`,
      mend: `Write ${wanted}${units.length > 0 ? `, in ${units.join(', ')}` : ''}${example === '' ? '' : `: \`${example}\``}.`,
      origin,
    });
    return false;
  }

  private missingUnit(computed: Computed, dimensions: readonly Dimension[], example: string): void {
    const { origin } = computed;
    const fromExample = /[0-9]\s*([^\s0-9,|]+)/u.exec(example)?.[1];
    const candidates = [
      ...(fromExample === undefined ? [] : [fromExample]),
      ...dimensions.flatMap((dimension) => unitsOf(dimension).map((unit) => unit.symbol)),
    ];
    const units = [
      ...new Set(candidates.filter((symbol) => dimensions.some((dimension) => unitOf(symbol)?.dimension === dimension))),
    ].slice(0, 4);
    this.context.report({
      code: 'M07',
      what: `\`${this.context.slice(origin)}\` has no unit${dimensions.length === 0 ? '' : `; ${dimensions.map(nameOfDimension).join(' or ')} is needed here`}`,
      mend: 'Write the unit after the number: every number has one.',
      origin,
      fixes: units.map((unit) => ({
        title: `Add \`${unit}\``,
        safe: false,
        changes: [{ uri: origin.uri, start: origin.end, end: origin.end, text: ` ${unit}` }],
      })),
    });
  }

  private wrong(words: string, node: Placed, code = 'M07'): undefined {
    this.context.report({ code, what: `${words.charAt(0).toUpperCase()}${words.slice(1)}`, origin: this.context.origin(node) });
    return undefined;
  }

  private take(outcome: Outcome<Amount>, node: Placed): Amount | undefined {
    return outcome.ok ? outcome.value : this.wrong(outcome.problem, node);
  }

  private value(node: Value, from: string[]): Part | undefined {
    let total: Part | undefined;
    let failed = false;
    (node.terms ?? []).forEach((term, i) => {
      const alone = (term.factors ?? []).length === 1 ? term.factors[0] : undefined;
      const signed = i === 0 && node.negative === true;
      // The sign of a written number belongs to the number: -10 degC lies below zero of its scale.
      const part = signed && alone?.$type === 'Quantity' ? this.number(alone, -1) : this.term(term, from);
      if (part === undefined) failed = true;
      if (part === undefined || failed) return;
      if (i === 0) {
        total = signed && alone?.$type !== 'Quantity' ? this.keep(negate(part.amount), part.bare, node) : part;
      } else if (total !== undefined) {
        const sum = (node.signs ?? [])[i - 1] === '-' ? subtract(total.amount, part.amount) : add(total.amount, part.amount);
        total = this.keep(sum, false, node);
      }
      if (total === undefined) failed = true;
    });
    return failed ? undefined : total;
  }

  private keep(outcome: Outcome<Amount>, bare: boolean, node: Placed): Part | undefined {
    const amount = this.take(outcome, node);
    return amount === undefined ? undefined : { amount, bare };
  }

  private term(node: Term, from: string[]): Part | undefined {
    let total: Part | undefined;
    let failed = false;
    (node.factors ?? []).forEach((factor, i) => {
      const part = this.unitBroken(node, i) ? undefined : this.factor(factor, from);
      if (part === undefined) failed = true;
      if (part === undefined || failed) return;
      if (i === 0) total = part;
      else if (total !== undefined) {
        const result = (node.operators ?? [])[i - 1] === '/' ? divide(total.amount, part.amount) : multiply(total.amount, part.amount);
        total = this.keep(result, total.bare && part.bare, node);
      }
      if (total === undefined) failed = true;
    });
    return failed ? undefined : total;
  }

  /** `30 L/mn`: written in one with the unit before it and no name, the word behind the stroke is the rest of a unit that is none. */
  private unitBroken(node: Term, i: number): boolean {
    const before = (node.factors ?? [])[i - 1];
    const factor = (node.factors ?? [])[i];
    if (factor?.$type !== 'RefValue' || before?.$type !== 'Quantity' || before.unit === undefined || factor.arguments !== undefined)
      return false;
    if ((node.operators ?? [])[i - 1] !== '/') return false;
    const first = this.context.origin(before);
    const at: Origin = { ...first, start: first.end - before.unit.length, end: this.context.origin(factor).end };
    const written = this.context.slice(at);
    if (/\s/.test(written) || this.context.names.has(this.context.wordsOf(factor.ref)[0] ?? '')) return false;
    this.noUnit(written, at);
    return true;
  }

  private noUnit(written: string, at: Origin): void {
    const near = (this.wanted === undefined ? undefined : nearestUnit(written, this.wanted)) ?? nearestUnit(written);
    this.context.report({
      code: 'M07',
      what: `\`${written}\` is no unit${near === undefined ? '' : `: did you mean \`${near.symbol}\``}`,
      origin: at,
      fixes: near === undefined ? [] : [this.context.replace(at, near.symbol, `Write \`${near.symbol}\``)],
    });
  }

  private factor(node: Factor, from: string[]): Part | undefined {
    switch (node.$type) {
      case 'NegativeFactor': {
        if (node.operand?.$type === 'Quantity') return this.number(node.operand, -1);
        const operand = node.operand === undefined ? undefined : this.factor(node.operand, from);
        return operand === undefined ? undefined : this.keep(negate(operand.amount), operand.bare, node);
      }
      case 'Quantity':
        return this.number(node);
      case 'RefValue':
        return this.reference(node, from);
      case 'Group':
        return this.bracket(node, from);
    }
  }

  private number(node: QuantityNode, sign: 1 | -1 = 1): Part | undefined {
    let size = node.number === undefined ? 0 : Number(node.number);
    if (node.fraction !== undefined) {
      const [over, under] = node.fraction.split('/').map(Number);
      if (under === 0 || under === undefined || over === undefined) return this.wrong('a fraction over zero', node, 'VALUE');
      size += over / under;
    }
    if (!(size <= LARGEST)) return this.wrong('this number is larger than any figure of the trade', node, 'VALUE');
    if (node.unit === undefined) return { amount: amountOf({ si: sign * size, dimension: 'ratio', unit: '' }), bare: true };
    const unit = unitOf(node.unit);
    if (unit === undefined) {
      const origin = this.context.origin(node);
      const at: Origin = { ...origin, start: origin.end - node.unit.length };
      this.noUnit(node.unit, at);
      return undefined;
    }
    return { amount: amountOf({ si: toSi(sign * size, unit), dimension: unit.dimension, unit: unit.symbol }), bare: false };
  }

  private reference(node: RefValue, from: string[]): Part | undefined {
    const words = this.context.wordsOf(node.ref);
    const name = words[0];
    if (name === undefined) return undefined;
    if (node.arguments !== undefined) return this.call(name, node, from);
    const origin = this.context.origin(node.ref);
    const declared = this.context.names.get(name);
    if (words.length > 1 || (declared !== undefined && declared.what !== 'constant')) {
      return this.wrong(`\`${words.join('.')}\` is no value: a number with its unit, or a constant, is needed here`, node, 'VALUE');
    }
    if (declared === undefined) {
      this.context.unknownName(name, origin, (declaration) => declaration.what === 'constant', 'a constant (`let`)');
      return undefined;
    }
    this.context.refer(origin, declared.id);
    const computed = this.constant(name);
    if (computed === undefined) return undefined;
    from.push(name, ...computed.from.filter((other) => !from.includes(other)));
    return { amount: amountOf(computed.q), bare: computed.bare };
  }

  private call(name: string, node: RefValue, from: string[]): Part | undefined {
    const entries = node.arguments?.entries ?? [];
    const values: Amount[] = [];
    for (const entry of entries) {
      const item = entry.items?.[0];
      if (
        item?.$type !== 'ValueItem' ||
        entry.items.length !== 1 ||
        item.value === undefined ||
        item.other !== undefined ||
        item.tolerance !== undefined
      ) {
        return this.wrong(`\`${name}\` takes values in its brackets`, entry, 'VALUE');
      }
      const value = this.value(item.value, from);
      if (value === undefined) return undefined;
      values.push(value.amount);
    }
    const first = values[0];
    if (first === undefined) return this.wrong(`\`${name}\` takes values in its brackets`, node, 'VALUE');
    if (name === 'sqrt') {
      if (values.length !== 1) return this.wrong('`sqrt` takes one value', node, 'VALUE');
      return this.keep(squareRoot(first), false, node);
    }
    if (name !== 'min' && name !== 'max') {
      return this.wrong(
        `\`${name}\` computes nothing: only \`min\`, \`max\` and \`sqrt\` stand before a bracket`,
        node.ref ?? node,
        'VALUE',
      );
    }
    return this.keep((name === 'min' ? least : greatest)(values), false, node);
  }

  private bracket(node: Group, from: string[]): Part | undefined {
    const entry = node.entries?.[0];
    const item = entry?.items?.[0];
    if (
      node.entries?.length !== 1 ||
      entry?.items.length !== 1 ||
      item?.$type !== 'ValueItem' ||
      item.other !== undefined ||
      item.tolerance !== undefined
    ) {
      return this.wrong('one value is needed in these brackets', node, 'VALUE');
    }
    return item.value === undefined ? undefined : this.value(item.value, from);
  }
}

const NAMES: Readonly<Partial<Record<Dimension, string>>> = {
  ratio: 'a ratio (%)',
  area: 'an area',
  angle: 'an angle',
  acceleration: 'an acceleration',
  rotation: 'a speed of rotation',
  energy: 'an energy',
  inertia: 'a moment of inertia',
  'power/temperature': 'a power per degree',
};
/** `a pressure`, `an area`, for messages. */
export function nameOfDimension(dimension: Dimension): string {
  return NAMES[dimension] ?? `a ${dimension}`;
}
