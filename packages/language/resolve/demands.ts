/** Requirements and allowances: subject, measure, place and bound that fit each other. */
import type { Allow, Bound, Component, Measure, Requirement, Where } from '@oilway/circuit';
import type { Dimension } from '@oilway/quantity';
import type { Allow as AllowNode, Bound as BoundNode, Demand, Ref, Require, Value, Where as WhereNode } from '../generated/ast.ts';
import { nearest } from '../parse/near.ts';
import { type Context, oneOf, portsOf } from './context.ts';
import type { Control } from './control.ts';
import { unquoted } from './items.ts';
import { MEASURES, type Subject, measureOf, measuresOf } from './measures.ts';
import { resolvePlace } from './places.ts';
import type { Values } from './values.ts';

interface Named {
  readonly of: string;
  readonly port?: string;
  readonly subject: Subject;
}

export class Demands {
  readonly requirements: Requirement[] = [];
  readonly allows: Allow[] = [];
  private readonly context: Context;
  private readonly values: Values;
  private readonly control: Control;
  private readonly ids = new Map<string, number>();

  constructor(context: Context, values: Values, control: Control) {
    this.context = context;
    this.values = values;
    this.control = control;
  }

  /** The words of the requirement are its id: it stays the same when other lines move. */
  private id(text: string): string {
    const words = text
      .replace(/^require\s+/, '')
      .replace(/\s+/g, ' ')
      .trim();
    const count = (this.ids.get(words) ?? 0) + 1;
    this.ids.set(words, count);
    return count === 1 ? words : `${words} (${count})`;
  }

  require(node: Require): void {
    const { context } = this;
    const origin = context.origin(node);
    if (node.$type === 'Never') {
      const condition = this.control.condition(node.condition, false);
      if (condition.op !== 'unknown') this.requirements.push({ form: 'never', id: this.id(context.slice(origin)), condition, origin });
      return;
    }
    if (node.$type === 'Demand') this.demand(node);
  }

  private demand(node: Demand): void {
    const { context } = this;
    const origin = context.origin(node);
    const named = this.subject(node.of);
    const lasts = node.lasts === undefined ? undefined : this.control.time(node.lasts);
    if (node.still === true) {
      const where = this.where(node.where ?? [], named?.subject);
      if (named === undefined || where === undefined) return;
      if (
        named.subject.is !== 'component' ||
        !['cylinder', 'motor', 'rotary'].includes(named.subject.component.kind) ||
        named.port !== undefined
      ) {
        context.report({
          code: 'VALUE',
          what: `\`${named.of}\` does not move: \`still\` is asked of an actuator`,
          origin: context.origin(node.of),
        });
        return;
      }
      this.requirements.push({
        form: 'still',
        id: this.id(context.slice(origin)),
        of: named.of,
        where,
        ...(lasts === undefined ? {} : { lasts }),
        origin,
      });
      return;
    }
    const measure = this.measure(node, named);
    const where = this.where(node.where ?? [], named?.subject);
    if (node.bound === undefined && node.measure !== undefined) {
      context.report({
        code: 'SYNTAX',
        what: 'A bound is missing: `at least`, `at most`, `between .. and ..` or `reaches`',
        origin: context.origin(node.measure),
      });
      return;
    }
    if (named === undefined || measure === undefined || node.bound === undefined) return;
    const bound = this.bound(node.bound, measure.dimension);
    if (bound === undefined || where === undefined) return;
    if (measure.name === 'drift' && lasts === undefined) {
      context.report({ code: 'M08', what: 'A drift needs its time: `for 10 min`', origin });
      return;
    }
    this.requirements.push({
      form: 'bound',
      id: this.id(context.slice(origin)),
      of: named.of,
      ...(named.port === undefined ? {} : { port: named.port }),
      measure: measure.name,
      where,
      bound,
      ...(lasts === undefined ? {} : { lasts }),
      origin,
    });
  }

  /** Component, port, line, step or cycle; nothing where it is in a unit or does not resolve. */
  private subject(ref: Ref | undefined): Named | undefined {
    const { context } = this;
    const words = context.wordsOf(ref);
    const name = words[0];
    if (name === undefined) return undefined;
    const first = context.origin(ref?.parts?.[0]);
    const declared = context.names.get(name);
    if (declared?.what === 'unit') {
      context.refer(first, declared.id);
      return undefined;
    }
    if (declared?.what === 'component') {
      const component = context.components.get(name);
      if (component === undefined) return undefined;
      context.refer(first, name);
      return this.atPort(component, ref, words);
    }
    if (declared?.what === 'line' && words.length === 1) {
      context.refer(first, name);
      return { of: name, subject: { is: 'line' } };
    }
    if (declared?.what === 'cycle' || context.stepsByName.has(name)) {
      const id = resolvePlace(context, ref, 'running');
      if (id === undefined) return undefined;
      return { of: id, subject: { is: context.names.get(id)?.what === 'cycle' ? 'cycle' : 'step' } };
    }
    if (declared !== undefined) {
      context.report({
        code: 'NAME',
        what: `\`${words.join('.')}\` is a ${declared.what}: a requirement is about a component, port, line, step or cycle`,
        origin: context.origin(ref),
      });
      return undefined;
    }
    context.unknownName(
      name,
      first,
      (d) => d.what === 'component' || d.what === 'line' || d.what === 'step' || d.what === 'cycle',
      'a component, line, step or cycle',
    );
    return undefined;
  }

  private atPort(component: Component, ref: Ref | undefined, words: readonly string[]): Named | undefined {
    const { context } = this;
    const port = words[1];
    if (port === undefined) return { of: component.id, subject: { is: 'component', component } };
    const names = portsOf(component).map((spec) => spec.name);
    const origin = context.origin(ref?.parts?.[1]);
    if (!names.includes(port) && context.isHalfRead(component)) return undefined;
    if (!names.includes(port)) {
      const near = nearest(port, names);
      context.report({
        code: 'PORT',
        what: `\`${component.id}\` has no port \`${port}\`${names.length === 0 ? '' : `: it has ${names.map((word) => `\`${word}\``).join(', ')}`}`,
        origin,
        related: [{ message: `\`${component.id}\` is declared here`, origin: component.nameOrigin }],
        place: component.id,
        fixes: near === undefined ? [] : [context.replace(origin, near, `Write \`${near}\``)],
      });
      return undefined;
    }
    context.portMentions.push({ origin, component: component.id, port });
    return { of: component.id, port, subject: { is: 'component', component, port } };
  }

  private measure(node: Demand, named: Named | undefined): { readonly name: Measure; readonly dimension: Dimension } | undefined {
    const { context } = this;
    const word = node.measure?.text;
    if (word === undefined) return undefined;
    const origin = context.origin(node.measure);
    const measure = MEASURES.find((candidate) => candidate === word);
    if (measure === undefined) {
      const near = nearest(word, MEASURES);
      context.report({
        code: 'VALUE',
        what: `\`${word}\` is no measure${near === undefined ? '' : `: did you mean \`${near}\``}`,
        mend: `Measures: ${MEASURES.join(', ')}.`,
        origin,
        fixes: near === undefined ? [] : [context.replace(origin, near, `Write \`${near}\``)],
      });
      return undefined;
    }
    if (named === undefined) return undefined;
    const found = measureOf(measure, named.subject);
    if ('dimension' in found) return { name: measure, dimension: found.dimension };
    const ports =
      named.subject.is === 'component' && named.port === undefined && measure === 'pressure'
        ? portsOf(named.subject.component).map((spec) => `${named.of}.${spec.name}`)
        : [];
    const ref = context.origin(node.of);
    context.report({
      code: 'VALUE',
      what:
        ports.length > 0
          ? `Which pressure of \`${named.of}\`: ${oneOf(ports)}`
          : `\`${measure}\` is a measure of ${found.of}; \`${context.slice(ref)}\` has ${oneOf(measuresOf(named.subject))}`,
      origin: ports.length > 0 ? ref : origin,
      fixes: ports.map((port) => context.replace(ref, port, `Write \`${port}\``)),
    });
    return undefined;
  }

  private bound(node: BoundNode, dimension: Dimension): Bound | undefined {
    const read = (value: Value | undefined) => this.values.quantity(value, [dimension])?.q;
    switch (node.$type) {
      case 'AtBound': {
        const value = read(node.value);
        return value === undefined ? undefined : { is: node.is ?? 'most', value };
      }
      case 'Between': {
        const low = read(node.low);
        const high = read(node.high);
        if (low === undefined || high === undefined) return undefined;
        if (high.si < low.si) {
          this.context.report({
            code: 'VALUE',
            what: 'The bounds run backwards: the smaller value stands first',
            origin: this.context.origin(node),
          });
          return undefined;
        }
        return { is: 'between', low, high };
      }
      case 'Reaches': {
        const value = read(node.value);
        const within = node.within === undefined ? undefined : this.control.time(node.within);
        if (value === undefined || (node.within !== undefined && within === undefined)) return undefined;
        return { is: 'reaches', value, ...(within === undefined ? {} : { within }) };
      }
    }
  }

  /** Nothing where a place, range or direction does not resolve: half a place would check something else. */
  private where(nodes: readonly WhereNode[], subject: Subject | undefined): Where | undefined {
    const { context } = this;
    let places: string[] | undefined;
    let range: Where['range'];
    let direction: Where['direction'];
    let failed = false;
    for (const node of nodes) {
      if (node.$type === 'InPlaces') {
        places ??= [];
        for (const ref of node.names ?? []) {
          const id = resolvePlace(context, ref, 'place');
          if (id === undefined) failed = true;
          else if (!places.includes(id)) places.push(id);
        }
        continue;
      }
      const actuator = this.actuator(subject, node);
      if (node.$type === 'Moving') {
        direction = node.direction;
        if (actuator === undefined && subject !== undefined) failed = true;
        continue;
      }
      const turns = actuator !== undefined && actuator.kind !== 'cylinder';
      const from = this.values.quantity(node.from, [turns ? 'angle' : 'length']);
      const to = this.values.quantity(node.to, [turns ? 'angle' : 'length']);
      if (from === undefined || to === undefined || (actuator === undefined && subject !== undefined)) {
        failed = true;
      } else if (to.q.si < from.q.si) {
        context.report({
          code: 'VALUE',
          what: 'The range runs backwards: the smaller position stands first',
          origin: context.origin(node),
        });
        failed = true;
      } else range = { from: from.q, to: to.q };
    }
    if (failed) return undefined;
    return {
      ...(places === undefined ? {} : { places }),
      ...(range === undefined ? {} : { range }),
      ...(direction === undefined ? {} : { direction }),
    };
  }

  /** Whose range or direction is meant: the subject's own, else that of the circuit's only actuator. */
  private actuator(subject: Subject | undefined, node: WhereNode): Component | undefined {
    const moves = (component: Component): boolean =>
      component.kind === 'cylinder' || component.kind === 'motor' || component.kind === 'rotary';
    if (subject?.is === 'component' && moves(subject.component)) return subject.component;
    const all = [...this.context.components.values()].filter(moves);
    if (all.length === 1) return all[0];
    if (subject !== undefined) {
      this.context.report({
        code: 'VALUE',
        what:
          all.length === 0
            ? 'There is no actuator whose way or direction this could be'
            : `Whose way or direction is meant: there are ${all.map((component) => `\`${component.id}\``).join(', ')}`,
        mend: 'Name the step instead: `in Out`.',
        origin: this.context.origin(node),
      });
    }
    return undefined;
  }

  allow(node: AllowNode): void {
    const { context } = this;
    const origin = context.origin(node);
    const rule = node.rule?.text;
    if (rule === undefined) return;
    const named = node.place === undefined ? undefined : this.subject(node.place);
    const where = this.where(node.where ?? [], undefined);
    const reason = unquoted(node.reason).trim();
    if (reason === '') {
      context.report({
        code: 'M08',
        what: 'An allowance needs its reason: `allow D09 on C1.cap "why it is safe here"`',
        why: 'Accepted findings and their reasons are printed in the risk notes.',
        origin,
        fixes:
          node.reason !== undefined
            ? []
            : [
                {
                  title: 'Add a reason',
                  safe: false,
                  changes: [{ uri: origin.uri, start: origin.end, end: origin.end, text: ' "reason"' }],
                },
              ],
      });
      return;
    }
    if (where === undefined || (node.place !== undefined && named === undefined)) return;
    this.allows.push({
      rule,
      ...(named === undefined ? {} : { on: named.of, ...(named.port === undefined ? {} : { port: named.port }) }),
      where,
      reason,
      origin,
    });
  }
}
