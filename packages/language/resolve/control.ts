/** Control: conditions, actions, steps, cycles, standing control, interlocks, emergency. */
import type { Action, Coil, Command, Component, Condition, Cycle, Emergency, Interlock, Origin, Step, While } from '@oilway/circuit';
import type { Dimension, Quantity } from '@oilway/quantity';
import type {
  Action as ActionNode,
  Atom,
  Command as CommandNode,
  Condition as ConditionNode,
  Cycle as CycleNode,
  Emergency as EmergencyNode,
  Interlock as InterlockNode,
  Ref,
  StateAtom,
  Step as StepNode,
  Value,
  While as WhileNode,
} from '../generated/ast.ts';
import type { Context } from './context.ts';
import { unquoted } from './items.ts';
import { resolvePlace } from './places.ts';
import type { Values } from './values.ts';

const isActuator = (component: Component): boolean =>
  component.kind === 'cylinder' || component.kind === 'motor' || component.kind === 'rotary';

export class Control {
  private readonly context: Context;
  private readonly values: Values;
  private readonly coils: ReadonlyMap<string, Coil>;

  constructor(context: Context, values: Values, coils: readonly Coil[]) {
    this.context = context;
    this.values = values;
    this.coils = new Map(coils.map((coil) => [coil.id, coil]));
  }

  /** First word of a reference is a unit: its inside is not resolved here. */
  private inUnit(ref: Ref | undefined): boolean {
    const words = this.context.wordsOf(ref);
    const declared = this.context.names.get(words[0] ?? '');
    if (declared?.what !== 'unit' || words.length < 2) return false;
    this.context.refer(this.context.origin(ref?.parts?.[0]), declared.id);
    return true;
  }

  /** `wired`: the control asks it, so a switch or sensor must see it; a requirement may ask anything. */
  condition(node: ConditionNode | undefined, wired = true): Condition {
    const { context } = this;
    const origin = context.origin(node);
    const items = (node?.items ?? []).map((atom) => this.atom(atom, wired));
    const joins = node?.joins ?? [];
    if (items.length === 0) return { op: 'unknown', origin };
    const first = items[0];
    if (items.length === 1 && first !== undefined) return first;
    const mixed = joins.find((join) => join.text !== joins[0]?.text);
    if (mixed !== undefined) {
      context.report({
        code: 'SYNTAX',
        what: '`and` and `or` are mixed: brackets must say which belong together',
        why: 'Two people read `A or B and C` in two ways.',
        origin: context.origin(mixed),
        related: [{ message: `\`${joins[0]?.text ?? ''}\` stands here`, origin: context.origin(joins[0]) }],
      });
      return { op: 'unknown', origin };
    }
    return { op: joins[0]?.text ?? 'and', items, origin };
  }

  private atom(node: Atom, wired: boolean): Condition {
    if (node.$type === 'BracketCondition') return this.condition(node.condition, wired);
    return this.state(node, wired);
  }

  private state(node: StateAtom, wired: boolean): Condition {
    const { context } = this;
    const origin = context.origin(node);
    const missing: Condition = { op: 'unknown', origin };
    if (node.of === undefined || this.inUnit(node.of)) return missing;
    const words = context.wordsOf(node.of);
    const name = words.join('.');
    const at = context.origin(node.of);
    const declared = context.names.get(words[0] ?? '');
    const component = words.length === 1 ? context.components.get(name) : undefined;
    if (node.state === undefined && node.compare === undefined) {
      if (declared !== undefined && declared.what !== 'cycle' && context.stepsByName.get(name) === undefined) {
        this.incomplete(node.of, component, declared.what);
        return missing;
      }
      const id = resolvePlace(context, node.of, 'running');
      return id === undefined ? missing : { op: 'running', of: id, origin };
    }
    if (declared === undefined) {
      const wants =
        node.compare !== undefined
          ? ['cylinder', 'motor', 'rotary', 'sensor']
          : node.state === 'on' || node.state === 'off'
            ? ['switch']
            : ['cylinder', 'rotary'];
      const coils = node.state === 'on' || node.state === 'off';
      context.unknownName(
        words[0] ?? '',
        at,
        (d) => (d.kind !== undefined && d.what === 'component' && wants.includes(d.kind)) || (coils && d.what === 'coil'),
        coils ? 'a switch or coil' : `a ${wants.join(', ')}`,
      );
      return missing;
    }
    context.refer(context.origin(node.of.parts?.[0]), declared.id);
    if (words.length > 1) {
      context.report({
        code: 'NAME',
        what: `The control does not know \`${name}\`: declare a \`switch\` or a \`sensor\` for it`,
        mend: 'A pressure at a port is seen by a switch or sensor whose line leads there.',
        origin: at,
      });
      return missing;
    }
    if (node.compare !== undefined) {
      const dimensions = this.compared(declared.id, component, at);
      if (dimensions === undefined || node.value === undefined) return missing;
      const value = this.values.quantity(node.value, dimensions);
      if (value === undefined) return missing;
      if (wired && component !== undefined && isActuator(component)) this.unseen(component, node, origin);
      return { op: 'compare', of: declared.id, is: node.compare, value: value.q, origin };
    }
    const state = node.state ?? 'on';
    if (state === 'on' || state === 'off') {
      if (declared.what === 'coil' || component?.kind === 'switch') return { op: 'state', of: declared.id, is: state, origin };
      this.incomplete(node.of, component, declared.what, state);
      return missing;
    }
    if (component?.kind === 'cylinder' || component?.kind === 'rotary') return { op: 'state', of: declared.id, is: state, origin };
    this.incomplete(node.of, component, declared.what, state);
    return missing;
  }

  /** A position nothing sees is understood and computed, but cannot be wired. */
  private unseen(component: Component, node: StateAtom, origin: Origin): void {
    const { context } = this;
    let number = 1;
    while (context.names.has(`LS${number}`)) number++;
    const name = `LS${number}`;
    const place = context.slice(context.origin(node.value));
    const end = component.origin.end;
    const changes = [
      { uri: origin.uri, start: origin.start, end: origin.end, text: `${name} on` },
      { uri: origin.uri, start: end, end, text: `\nswitch ${name} (on ${component.id}, at ${place})` },
    ];
    context.report({
      code: 'VALUE',
      severity: 'warning',
      what: `No switch sees \`${context.slice(origin)}\`: the step list cannot be wired as written`,
      why: 'The control knows a position only through a switch or sensor.',
      mend: 'Declare a `switch` or a `sensor` on the actuator and ask for it.',
      origin,
      place: component.id,
      fixes: node.compare === 'at' ? [{ title: `Declare the switch \`${name}\``, safe: false, changes }] : [],
    });
  }

  private incomplete(ref: Ref, component: Component | undefined, what: string, state?: string): void {
    const { context } = this;
    const name = context.wordsOf(ref).join('.');
    const origin = context.origin(ref);
    const kind = component?.kind ?? what;
    const can =
      kind === 'switch' || kind === 'coil' ? ['on', 'off'] : kind === 'cylinder' || kind === 'rotary' ? ['extended', 'retracted'] : [];
    const say =
      can.length > 0
        ? `write \`${name} ${can[0]}\` or \`${name} ${can[1]}\``
        : kind === 'sensor'
          ? `write \`${name} above\` or \`${name} below\` and a value`
          : 'a condition is about a switch, coil, sensor, actuator, step or cycle';
    context.report({
      code: 'VALUE',
      what: state === undefined ? `\`${name}\` is a ${kind}: ${say}` : `A ${kind} is not \`${state}\`: ${say}`,
      origin,
      fixes: state === undefined ? can.map((word) => context.replace(origin, `${name} ${word}`, `Write \`${name} ${word}\``)) : [],
    });
  }

  /** Dimensions a comparison may have; says so where there is none. */
  private compared(id: string, component: Component | undefined, origin: Origin): readonly Dimension[] | undefined {
    switch (component?.kind) {
      case 'cylinder':
        return ['length'];
      case 'motor':
      case 'rotary':
        return ['angle'];
      case 'sensor': {
        const range = component.properties.find((property) => property.name === 'range')?.value;
        return range?.type === 'range' ? [range.from.dimension] : undefined;
      }
      case 'switch': {
        const threshold = component.properties.find((property) => property.name === 'rises' || property.name === 'falls')?.value;
        if (threshold?.type === 'quantity') return [threshold.q.dimension];
        break;
      }
      default:
    }
    if (component !== undefined && this.context.isHalfRead(component)) return undefined;
    this.context.report({
      code: 'VALUE',
      what: `\`${id}\` has no figure to compare with: an actuator has a position, a sensor its quantity`,
      origin,
    });
    return undefined;
  }

  private coil(ref: Ref | undefined): Coil | undefined {
    const { context } = this;
    if (ref === undefined || this.inUnit(ref)) return undefined;
    const name = context.wordsOf(ref).join('.');
    const origin = context.origin(ref);
    const coil = this.coils.get(name);
    if (coil !== undefined) {
      context.refer(origin, name);
      return coil;
    }
    const declared = context.names.get(name);
    if (declared === undefined) {
      context.unknownName(name, origin, (d) => d.what === 'coil', 'a coil (`coil a SOL1` of a valve)');
      return undefined;
    }
    const component = context.components.get(name);
    const own = [...this.coils.values()].filter((candidate) => candidate.component === name).map((candidate) => candidate.id);
    context.report({
      code: 'NAME',
      what: `\`${name}\` is a ${component?.kind ?? declared.what}; what is energised is a coil${own.length > 0 ? `: ${own.map((id) => `\`${id}\``).join(' or ')}` : ''}`,
      origin,
      fixes: own.map((id) => context.replace(origin, id, `Write \`${id}\``)),
    });
    return undefined;
  }

  /** Dimension of a command to this coil besides a percentage, and whether one is possible at all. */
  private commandDimensions(coil: Coil): readonly Dimension[] | undefined {
    const component = this.context.components.get(coil.component);
    switch (component?.kind) {
      case 'directional':
        return component.properties.some((property) => property.name === 'proportional') ? ['ratio'] : undefined;
      case 'relief':
      case 'reducing':
        return ['ratio', 'pressure'];
      case 'throttle': {
        const flow = component.properties.some((property) => property.name === 'set');
        return flow ? ['ratio', 'flow'] : ['ratio'];
      }
      default:
        return ['ratio'];
    }
  }

  private command(node: CommandNode): Command | undefined {
    const { context } = this;
    const coil = this.coil(node.coil);
    if (coil === undefined) return undefined;
    const origin = context.origin(node);
    const dimensions = this.commandDimensions(coil);
    const read = (value: Value | undefined): Quantity | undefined => {
      if (value === undefined) return undefined;
      if (dimensions === undefined) {
        const valve = context.components.get(coil.component);
        if (valve !== undefined && context.isHalfRead(valve)) return undefined;
        context.report({
          code: 'VALUE',
          what: `\`${coil.id}\` belongs to a switching valve: it is live or dead, a command has no size`,
          mend: 'Write `proportional` at the valve if it follows a command.',
          origin: context.origin(value),
          related: [{ message: 'the coil', origin: coil.origin }],
          place: coil.component,
        });
        return undefined;
      }
      const q = this.values.quantity(value, dimensions)?.q;
      if (q?.dimension === 'ratio' && (q.si > 1 + 1e-9 || q.si < (coil.side === undefined ? -1 - 1e-9 : 0))) {
        context.report({
          code: 'VALUE',
          what: `A command lies between ${coil.side === undefined ? '-100' : '0'} and 100 %`,
          origin: context.origin(value),
        });
        return undefined;
      }
      return q;
    };
    const at = read(node.at);
    const from = read(node.from);
    const to = read(node.to);
    const over = node.over === undefined ? undefined : this.time(node.over);
    return {
      coil: coil.id,
      ...(at === undefined ? {} : { at }),
      ...(from === undefined ? {} : { from }),
      ...(to === undefined ? {} : { to }),
      ...(over === undefined ? {} : { over }),
      origin,
    };
  }

  /** A time in s, not negative. */
  time(node: Value | undefined): number | undefined {
    const value = this.values.quantity(node, ['time'], 'for 3 s');
    if (value === undefined) return undefined;
    if (value.q.si < 0) {
      this.context.report({ code: 'VALUE', what: 'A time cannot be negative', origin: value.origin });
      return undefined;
    }
    return value.q.si;
  }

  action(node: ActionNode): Action | undefined {
    const { context } = this;
    const origin = context.origin(node);
    switch (node.$type) {
      case 'Energise':
        return { does: 'energise', commands: this.commands(node.commands ?? []), origin };
      case 'Shift': {
        const valve = this.component(node.valve, (kind) => kind === 'directional', 'a directional valve');
        const word = node.position?.text;
        if (valve === undefined || word === undefined) return undefined;
        const positions: readonly string[] = valve.shape?.positions === 3 ? ['a', 'centre', 'b'] : ['a', 'b'];
        if (word !== 'a' && word !== 'b' && word !== 'centre') {
          context.report({
            code: 'VALUE',
            what: `\`${valve.id}\` is shifted to ${positions.map((p) => `\`${p}\``).join(' or ')}, not to \`${word}\``,
            origin: context.origin(node.position),
          });
          return undefined;
        }
        if (!positions.includes(word) && !context.isHalfRead(valve)) {
          context.report({ code: 'VALUE', what: `\`${valve.id}\` has no centre`, origin: context.origin(node.position) });
          return undefined;
        }
        if (!valve.properties.some((property) => property.name === 'lever') && !context.isHalfRead(valve)) {
          context.report({
            code: 'VALUE',
            what: `\`${valve.id}\` has no \`lever\`: \`shift\` moves a valve by hand`,
            origin: context.origin(node.valve),
            place: valve.id,
          });
        }
        return { does: 'shift', valve: valve.id, to: word, origin };
      }
      case 'Stop': {
        const drives = (node.drives ?? []).flatMap((ref) =>
          this.inUnit(ref) ? [] : (this.component(ref, (kind) => kind === 'drive', 'a drive')?.id ?? []),
        );
        return { does: 'stop', drives, origin };
      }
      case 'Run': {
        const name = context.wordsOf(node.cycle).join('.');
        const at = context.origin(node.cycle);
        const declared = context.names.get(name);
        if (declared?.what !== 'cycle') {
          if (declared === undefined) context.unknownName(name, at, (d) => d.what === 'cycle', 'a cycle');
          else context.report({ code: 'NAME', what: `\`${name}\` is a ${declared.what}; \`run\` takes a cycle`, origin: at });
          return undefined;
        }
        context.refer(at, declared.id);
        return { does: 'run', cycle: declared.id, times: this.times(node.times, at), origin };
      }
    }
  }

  /** The same coil twice in one list is two voices. */
  private commands(nodes: readonly CommandNode[]): Command[] {
    const commands: Command[] = [];
    for (const node of nodes) {
      const command = this.command(node);
      if (command === undefined) continue;
      const first = commands.find((other) => other.coil === command.coil);
      if (first !== undefined) {
        this.context.report({
          code: 'VALUE',
          what: `\`${command.coil}\` stands twice in this list`,
          origin: command.origin,
          related: [{ message: 'first here', origin: first.origin }],
        });
        continue;
      }
      commands.push(command);
    }
    return commands;
  }

  private times(written: string | undefined, origin: Origin): number {
    if (written === undefined) return 1;
    const times = Number(written);
    if (Number.isInteger(times) && times >= 1 && times <= 10_000) return times;
    this.context.report({ code: 'VALUE', what: 'A count is a whole number from 1 to 10000', origin });
    return 1;
  }

  private component(ref: Ref | undefined, fits: (kind: Component['kind']) => boolean, wanted: string): Component | undefined {
    const { context } = this;
    const words = context.wordsOf(ref);
    const name = words.join('.');
    const origin = context.origin(ref);
    const component = context.components.get(name);
    if (component !== undefined && fits(component.kind)) {
      context.refer(origin, name);
      return component;
    }
    const declared = context.names.get(name);
    if (declared === undefined)
      context.unknownName(name, origin, (d) => d.what === 'component' && d.kind !== undefined && fits(d.kind), wanted);
    else context.report({ code: 'NAME', what: `\`${name}\` is a ${component?.kind ?? declared.what}; ${wanted} is needed here`, origin });
    return undefined;
  }

  step(node: StepNode, cycle: string, above: string | undefined): Step | undefined {
    const { context } = this;
    const name = node.name?.text;
    if (name === undefined) return undefined;
    const meanwhile = node.kind === 'meanwhile';
    if (meanwhile && above === undefined && !context.isBroken(context.origin(node.name))) {
      context.report({
        code: 'VALUE',
        what: '`meanwhile` runs beside the step above it, and there is none',
        origin: context.origin(node.name),
      });
    }
    const actions = (node.actions ?? []).flatMap((action) => this.action(action) ?? []);
    const lasts = node.lasts === undefined ? undefined : this.time(node.lasts);
    const atMost = node.most === undefined ? undefined : this.time(node.most);
    return {
      id: `${cycle}.${name}`,
      name,
      cycle,
      ...(meanwhile && above !== undefined ? { beside: above } : {}),
      actions,
      ...(lasts === undefined ? {} : { lasts }),
      ...(node.until === undefined ? {} : { until: this.condition(node.until) }),
      ...(atMost === undefined ? {} : { atMost }),
      ...(node.title === undefined ? {} : { title: unquoted(node.title) }),
      origin: context.origin(node),
      nameOrigin: context.origin(node.name),
    };
  }

  cycle(node: CycleNode): { readonly cycle: Cycle; readonly whiles: While[] } | undefined {
    const { context } = this;
    const id = node.name?.text;
    if (id === undefined) return undefined;
    const steps: Step[] = [];
    const whiles: While[] = [];
    let above: string | undefined;
    for (const line of node.lines ?? []) {
      if (line.$type === 'Step') {
        const step = this.step(line, id, above);
        // A step that has lost its name still is the step above.
        if (step === undefined && line.kind === 'step') above = `${id}.`;
        if (step === undefined) continue;
        // A second step of one name was said when it was declared.
        if (!steps.some((other) => other.id === step.id)) steps.push(step);
        if (line.kind === 'step') above = step.id;
      } else if (line.$type === 'While') {
        const standing = this.while(line);
        if (standing !== undefined) whiles.push(standing);
      }
    }
    const repeat =
      node.repeat !== true ? undefined : node.times === undefined ? ('ever' as const) : this.times(node.times, context.origin(node.name));
    return {
      cycle: {
        id,
        mode: node.manual === true ? 'manual' : 'cycle',
        ...(repeat === undefined ? {} : { repeat }),
        ...(node.title === undefined ? {} : { title: unquoted(node.title) }),
        steps,
        origin: context.origin(node),
        nameOrigin: context.origin(node.name),
      },
      whiles,
    };
  }

  while(node: WhileNode): While | undefined {
    const when = this.condition(node.when);
    const action = node.action === undefined ? undefined : this.action(node.action);
    return action === undefined ? undefined : { when, action, origin: this.context.origin(node) };
  }

  interlock(node: InterlockNode): Interlock {
    const coils = (node.coils ?? []).flatMap((ref) => this.coil(ref)?.id ?? []);
    return { coils, needs: this.condition(node.needs), origin: this.context.origin(node) };
  }

  emergency(node: EmergencyNode): Emergency {
    const actions = (node.actions ?? []).flatMap((action) => this.action(action) ?? []);
    return { actions, ...(node.title === undefined ? {} : { title: unquoted(node.title) }), origin: this.context.origin(node) };
  }
}
