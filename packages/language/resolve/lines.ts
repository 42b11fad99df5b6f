/** Lines: places to ports, chains to pieces, pieces to nets. */
import type { Component, LineFunction, LinePlace, LineStatement, Net, Origin, Piece, PortRef, PortSpec, Property } from '@oilway/circuit';
import { LINE_PROPERTIES } from '@oilway/circuit';
import type { Line as LineNode, Plug as PlugNode, Ref } from '../generated/ast.ts';
import { nearest } from '../parse/near.ts';
import { type Context, chainOf, kindOf, oneOf, portsOf } from './context.ts';
import { NetBuilder } from './nets.ts';
import { readProperties } from './properties.ts';
import { wrongSize } from './sizes.ts';
import type { Values } from './values.ts';

/** Where a place stands in its chain. */
type Position = 'start' | 'middle' | 'end';

interface Resolved {
  readonly place: LinePlace;
  /** What it puts on its entrance and on its exit side; a reservoir's pipe is told apart by the piece. */
  readonly entrance?: string | undefined;
  readonly exit?: string | undefined;
  readonly reservoir?: string | undefined;
}

export class Lines {
  readonly statements: LineStatement[] = [];
  private readonly context: Context;
  private readonly values: Values;
  private readonly net = new NetBuilder();
  private readonly taken = new Map<string, LinePlace>();

  constructor(context: Context, values: Values) {
    this.context = context;
    this.values = values;
  }

  add(node: LineNode): void {
    const { context } = this;
    const index = this.statements.length;
    const lineFunction = node.function ?? 'working';
    const origin = context.origin(node);
    // Where the parser gave up, the rest of the line may lead elsewhere: nothing is joined by halves.
    const stations = context.isLost(origin) ? [] : (node.stations ?? []);
    const { properties } = readProperties(context, this.values, node.properties, {
      name: node.name?.text ?? 'the line',
      specs: LINE_PROPERTIES,
      shaped: false,
      of: 'a line',
    });
    const hydraulic = this.hydraulics(properties, node);
    const ends = stations.length < 2 ? this.single(node, stations.length) : undefined;
    const resolved = stations.map((station, i) => {
      const position: Position = ends ?? (i === 0 ? 'start' : i === stations.length - 1 ? 'end' : 'middle');
      return (station.places ?? []).map((ref) => this.place(ref, position, lineFunction, node.name?.text));
    });
    const own = hydraulic.bore !== undefined && hydraulic.length !== undefined && hydraulic.length > 0;
    const ids: string[] = [];
    for (let i = 0; i + 1 < stations.length; i++) {
      const id = `line:${index}.${i}`;
      ids.push(id);
      const left = `${id} left`;
      const right = own ? `${id} right` : left;
      const from = context.origin(stations[i]);
      const to = context.origin(stations[i + 1]);
      this.net.side(left, lineFunction, from);
      this.net.side(right, lineFunction, own ? to : from);
      this.attach(resolved[i] ?? [], 'exit', left, id, lineFunction);
      this.attach(resolved[i + 1] ?? [], 'entrance', right, id, lineFunction);
      if (i === 0 && node.name?.text !== undefined && context.names.get(node.name.text)?.origin.start === context.origin(node.name).start) {
        this.net.nameLine(left, node.name.text, context.origin(node.name));
      }
      const joint = properties.find((property) => property.name === 'flanged' || property.name === 'tube' || property.name === 'hose')
        ?.name as Piece['joint'];
      this.net.piece({
        id,
        function: lineFunction,
        keys: [left, right],
        ...(joint === undefined ? {} : { joint }),
        ...hydraulic,
        ...(properties.some((property) => property.name === 'shielded') ? { shielded: true } : {}),
        sides: [portsAt(resolved[i] ?? [], 'exit'), portsAt(resolved[i + 1] ?? [], 'entrance')],
        origin: context.span(from, to),
      });
    }
    this.statements.push({
      function: lineFunction,
      ...(node.name?.text === undefined ? {} : { name: node.name.text }),
      stations: stations.map((station, i) => ({
        places: (resolved[i] ?? []).map((entry) => entry.place),
        origin: context.origin(station),
      })),
      properties,
      origin,
      pieces: ids,
    });
  }

  /** A line of one station joins what stands in it, if it is named or has several places; else it leads nowhere. */
  private single(node: LineNode, stations: number): Position | undefined {
    if (stations === 1 && !this.context.isBroken(this.context.origin(node))) {
      this.context.report({
        code: 'CHAIN',
        what: 'This line leads nowhere: `to` and a second place are missing',
        origin: this.context.origin(node),
      });
    }
    return 'start';
  }

  private hydraulics(
    properties: readonly Property[],
    node: LineNode,
  ): { bore?: number; wall?: number; length?: number; rated?: number; bends?: number } {
    const found: { bore?: number; wall?: number; length?: number; rated?: number; bends?: number } = {};
    for (const property of properties) {
      const { value } = property;
      if (
        value.type === 'quantity' &&
        (property.name === 'bore' || property.name === 'wall' || property.name === 'length' || property.name === 'rated')
      ) {
        const none = property.name !== 'length' && value.q.si === 0;
        const what = none ? `\`${property.name}\` must be above zero` : wrongSize(property);
        if (what !== undefined) this.context.report({ code: 'VALUE', what, origin: property.origin });
        else found[property.name] = value.q.si;
      }
      if (value.type === 'number' && property.name === 'bends') found.bends = value.value;
    }
    const length = properties.find((property) => property.name === 'length');
    const stations = node.stations ?? [];
    if (length !== undefined && (stations.length !== 2 || stations.some((station) => (station.places ?? []).length !== 1))) {
      this.context.report({
        code: 'CHAIN',
        what: '`length` needs one piece with two ends: this line has more',
        mend: 'Give the piece whose length counts a line of its own, from one port to one port.',
        origin: length.origin,
      });
      delete found.length;
    }
    const joints = properties.filter((property) => property.name === 'flanged' || property.name === 'tube' || property.name === 'hose');
    const second = joints[1];
    if (second !== undefined && joints[0] !== undefined && second.name !== joints[0].name) {
      this.context.report({
        code: 'VALUE',
        what: `A line is \`${joints[0].name}\` or \`${second.name}\`, not both`,
        origin: second.origin,
        related: [{ message: 'first here', origin: joints[0].origin }],
      });
    }
    return found;
  }

  private attach(entries: readonly Resolved[], side: 'entrance' | 'exit', key: string, piece: string, lineFunction: LineFunction): void {
    for (const entry of entries) {
      if (entry.reservoir !== undefined) this.net.reservoirEnd(`${entry.reservoir} ${piece} ${side}`, entry.reservoir);
      const target = entry.reservoir === undefined ? entry[side] : `${entry.reservoir} ${piece} ${side}`;
      if (target === undefined) continue;
      this.net.join(key, target, lineFunction);
    }
  }

  /** A place of a station: a component, its port, or a line's name. */
  private place(ref: Ref, position: Position, lineFunction: LineFunction, ownName: string | undefined): Resolved {
    const { context } = this;
    const words = context.wordsOf(ref);
    const origin = context.origin(ref);
    const nowhere: Resolved = { place: { origin, ports: [], written: words.length > 1 || ref.dangling === true } };
    const name = words[0];
    const first = ref.parts?.[0];
    if (name === undefined || first === undefined) return nowhere;
    const declared = context.names.get(name);
    if (declared === undefined) {
      context.unknownName(
        name,
        context.origin(first),
        (d) => d.what === 'component' || d.what === 'line' || d.what === 'unit',
        'a component or line',
      );
      return nowhere;
    }
    context.refer(context.origin(first), declared.id);
    if (declared.what === 'unit') return nowhere;
    if (declared.what === 'line') {
      if (words.length > 1) context.report({ code: 'PORT', what: `\`${name}\` is a line and has no ports`, origin });
      if (position === 'middle') this.notInTheMiddle(origin, `the line \`${name}\``);
      if (name === ownName) context.report({ code: 'CHAIN', what: `The line \`${name}\` is led to itself`, origin });
      const key = this.net.useLine(name);
      return { place: { origin, ports: [], line: name, written: false }, entrance: key, exit: key };
    }
    const component = context.components.get(name);
    if (declared.what !== 'component' || component === undefined) {
      // A component without content: its kind was not understood, and that was said at its own line.
      if (declared.what !== 'component')
        context.report({ code: 'NAME', what: `\`${name}\` is a ${declared.what}: a line joins components and lines`, origin });
      return nowhere;
    }
    if (component.kind === 'reservoir') {
      if (words.length > 1)
        context.report({
          code: 'PORT',
          what: `A reservoir takes any number of lines and has no ports: write \`${name}\``,
          origin,
          fixes: [context.replace(origin, name, `Write \`${name}\``)],
        });
      if (position === 'middle') this.notInTheMiddle(origin, `the reservoir \`${name}\``);
      return { place: { origin, ports: [], written: false }, reservoir: name };
    }
    if (words.length > 1 || ref.dangling === true) return this.written(component, ref, words, position, lineFunction);
    return this.natural(component, ref, position, lineFunction);
  }

  private notInTheMiddle(origin: Origin, what: string): void {
    this.context.report({
      code: 'CHAIN',
      what: `${what.charAt(0).toUpperCase()}${what.slice(1)} cannot be passed through: it stands at an end of a line`,
      mend: 'End the line here and begin another one.',
      origin,
    });
  }

  private written(component: Component, ref: Ref, words: readonly string[], position: Position, lineFunction: LineFunction): Resolved {
    const { context } = this;
    const origin = context.origin(ref);
    const word = words[1];
    const specs = portsOf(component);
    const spec = specs.find((candidate) => candidate.name === word);
    if (spec === undefined || words.length > 2) {
      const names = specs.map((candidate) => candidate.name);
      const node = ref.parts?.[1];
      const at = node === undefined ? origin : context.origin(node);
      if (word === undefined) {
        context.report({
          code: 'PORT',
          what: `A port of \`${component.id}\` is missing after the dot: ${oneOf(names)}`,
          origin,
          place: component.id,
          fixes: names.map((name) => context.replace(origin, `${component.id}.${name}`, `Write \`${component.id}.${name}\``)),
        });
      } else this.noPort(component, words.slice(1).join('.'), at, names);
      return { place: { origin, ports: [], written: true } };
    }
    const node = ref.parts?.[1];
    context.portMentions.push({ origin: context.origin(node), component: component.id, port: spec.name });
    if (position === 'middle') this.notInTheMiddle(origin, `the port \`${component.id}.${spec.name}\``);
    return this.joined(component, spec, origin, lineFunction, true);
  }

  private noPort(component: Component, port: string, origin: Origin, names: readonly string[]): void {
    if (this.context.isHalfRead(component)) return;
    const near = nearest(port, names) ?? names.find((name) => name.toLowerCase() === port.toLowerCase());
    this.context.report({
      code: 'PORT',
      what: `\`${component.id}\` has no port \`${port}\`${names.length === 0 ? '' : `: it has ${names.map((name) => `\`${name}\``).join(', ')}`}`,
      origin,
      related: [{ message: `\`${component.id}\` is declared here`, origin: component.nameOrigin }],
      place: component.id,
      fixes: (near === undefined ? (names.length <= 4 ? names : []) : [near]).map((name) =>
        this.context.replace(origin, name, `Write \`${name}\``),
      ),
    });
  }

  private joined(component: Component, spec: PortSpec, origin: Origin, lineFunction: LineFunction, written: boolean): Resolved {
    const ref: PortRef = { component: component.id, port: spec.name };
    const key = this.net.touch(ref, origin);
    this.checkFunction(component, spec, origin, lineFunction);
    return { place: { origin, ports: [ref], written }, entrance: key, exit: key };
  }

  private natural(component: Component, ref: Ref, position: Position, lineFunction: LineFunction): Resolved {
    const { context } = this;
    const origin = context.origin(ref);
    const chain = chainOf(component);
    const specs = portsOf(component);
    const names = specs.map((spec) => spec.name);
    const nowhere: Resolved = { place: { origin, ports: [], written: false } };
    if (chain.how === 'through' && position === 'middle') {
      const from = specs.find((spec) => spec.name === chain.from);
      const to = specs.find((spec) => spec.name === chain.to);
      if (from === undefined || to === undefined) return nowhere;
      const place: LinePlace = {
        origin,
        ports: [
          { component: component.id, port: from.name },
          { component: component.id, port: to.name },
        ],
        written: false,
      };
      this.claim(component, from.name, place);
      this.claim(component, to.name, place);
      this.checkFunction(component, from, origin, lineFunction);
      return {
        place,
        entrance: this.net.touch({ component: component.id, port: from.name }, origin),
        exit: this.net.touch({ component: component.id, port: to.name }, origin),
      };
    }
    if (position === 'middle') {
      this.context.report({
        code: 'CHAIN',
        what:
          chain.how === 'none' && names.length > 0
            ? `\`${component.id}\` is never passed through: write the ports on both sides, ${names.map((name) => `\`${component.id}.${name}\``).join(', ')}`
            : `\`${component.id}\` cannot be passed through: ${kindOf(component).noun} stands at an end of a line`,
        mend: 'End the line at one port and begin another one at the next.',
        origin,
        place: component.id,
      });
      return nowhere;
    }
    const port =
      chain.how === 'through'
        ? position === 'start'
          ? chain.to
          : chain.from
        : chain.how === 'end'
          ? position === 'start'
            ? chain.exit
            : chain.entry
          : chain.how === 'fixed'
            ? chain.port
            : undefined;
    const spec = specs.find((candidate) => candidate.name === port);
    if (spec === undefined && context.isHalfRead(component)) return nowhere;
    if (spec === undefined) {
      const what =
        names.length === 0
          ? `\`${component.id}\` has no ports: no line leads to ${kindOf(component).noun === 'fluid' ? 'a fluid' : `a ${kindOf(component).noun}`}`
          : `\`${component.id}\` has no natural port: write ${oneOf(names.map((name) => `${component.id}.${name}`))}`;
      context.report({
        code: 'PORT',
        what,
        origin,
        place: component.id,
        fixes: names.map((name) => context.replace(origin, `${component.id}.${name}`, `Write \`${component.id}.${name}\``)),
      });
      return nowhere;
    }
    const result = this.joined(component, spec, origin, lineFunction, false);
    this.claim(component, spec.name, result.place);
    return result;
  }

  /** A natural port is taken once. */
  private claim(component: Component, port: string, place: LinePlace): void {
    const key = `${component.id}.${port}`;
    const first = this.taken.get(key);
    if (first === undefined) {
      this.taken.set(key, place);
      return;
    }
    const { context } = this;
    context.report({
      code: 'PORT',
      what: `\`${key}\` is taken already: without a port, \`${component.id}\` stands for it once`,
      mend: `Write \`${key}\` if the same pipe is meant, or the port that is.`,
      origin: place.origin,
      related: [{ message: `\`${component.id}\` stands for \`${key}\` here`, origin: first.origin }],
      place: component.id,
      fixes: [context.replace(place.origin, key, `Write \`${key}\``)],
    });
  }

  /** Pilot ports on `pilot`, drains on `drain`, suction ports on `suction`. */
  private checkFunction(component: Component, spec: PortSpec, origin: Origin, lineFunction: LineFunction): void {
    const needs: LineFunction | undefined =
      spec.role === 'pilot' || spec.role === 'vent'
        ? 'pilot'
        : spec.role === 'drain'
          ? 'drain'
          : spec.role === 'suction'
            ? 'suction'
            : undefined;
    if (needs === undefined || needs === lineFunction) return;
    this.context.report({
      code: 'PORT',
      what: `\`${component.id}.${spec.name}\` is a ${spec.role} port; it stands on a \`${lineFunction}\` line`,
      mend: `Lead a \`${needs}\` line to it.`,
      origin,
      place: component.id,
    });
  }

  plug(node: PlugNode): void {
    const { context } = this;
    for (const ref of node.places ?? []) {
      const words = context.wordsOf(ref);
      const origin = context.origin(ref);
      const component = context.components.get(words[0] ?? '');
      const declared = context.names.get(words[0] ?? '');
      if (declared === undefined) {
        context.unknownName(words[0] ?? '', origin, (d) => d.what === 'component', 'a component');
        continue;
      }
      context.refer(context.origin(ref.parts?.[0]), declared.id);
      if (declared.what === 'unit') continue;
      const names = component === undefined ? [] : portsOf(component).map((spec) => spec.name);
      const port = words[1];
      if (component === undefined || port === undefined) {
        context.report({
          code: 'PORT',
          what: 'A plug closes one port: write the component and its port',
          origin,
          fixes: names.map((name) => context.replace(origin, `${words[0]}.${name}`, `Write \`${words[0]}.${name}\``)),
        });
        continue;
      }
      if (!names.includes(port)) {
        this.noPort(component, port, context.origin(ref.parts?.[1]), names);
        continue;
      }
      const key = `${component.id}.${port}`;
      context.portMentions.push({ origin: context.origin(ref.parts?.[1]), component: component.id, port });
      const joinedAt = this.net.joinedAt(key);
      if (joinedAt !== undefined) {
        context.report({
          code: 'PORT',
          what: `\`${key}\` is plugged, but a line leads to it`,
          origin,
          related: [{ message: 'the line', origin: joinedAt }],
          place: component.id,
        });
        continue;
      }
      this.net.plug({ component: component.id, port }, origin);
    }
  }

  finish(): { readonly nets: Net[]; readonly pieces: Piece[] } {
    return this.net.finish(this.context);
  }
}

/** The ports of a station on one side: the exit of what is passed through, else the one port. */
function portsAt(entries: readonly Resolved[], side: 'entrance' | 'exit'): PortRef[] {
  return entries.flatMap((entry) => {
    const ports = entry.place.ports;
    const port = side === 'exit' ? ports.at(-1) : ports[0];
    return port === undefined ? [] : [port];
  });
}
