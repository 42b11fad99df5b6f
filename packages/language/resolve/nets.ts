/** Nets: what lines join, gathered place by place and numbered at the end. */
import type { LineFunction, Net, Origin, Piece, PortRef } from '@oilway/circuit';
import { type Context, portsOf } from './context.ts';
import { Joints } from './joints.ts';

export const portKey = (ref: PortRef): string => `${ref.component}.${ref.port}`;
export const lineKey = (name: string): string => `line ${name}`;

/** A piece before the nets have their names: the keys of its two sides. */
export type PieceDraft = Omit<Piece, 'nets'> & { readonly keys: readonly [string, string] };

export class NetBuilder {
  private readonly joints = new Joints();
  private readonly pieces: PieceDraft[] = [];
  private readonly ports = new Map<string, { readonly ref: PortRef; readonly origin: Origin }>();
  private readonly functions = new Map<string, Set<LineFunction>>();
  private readonly reservoirs = new Map<string, string>();
  private readonly lineNames = new Map<string, Origin>();
  private readonly plugs = new Map<string, Origin>();
  private readonly places = new Map<string, Origin>();
  private readonly open = new Set<string>();

  /** A side of a piece, with its place in the text. */
  side(key: string, lineFunction: LineFunction, origin: Origin): void {
    this.joints.add(key);
    this.functionOf(key, lineFunction);
    this.places.set(key, origin);
  }

  join(side: string, key: string, lineFunction: LineFunction): void {
    this.joints.join(side, key);
    this.functionOf(key, lineFunction);
  }

  /** The end of one pipe in a reservoir: never joined with another pipe there. */
  reservoirEnd(key: string, reservoir: string): void {
    this.reservoirs.set(key, reservoir);
  }

  nameLine(side: string, name: string, origin: Origin): void {
    this.joints.join(side, lineKey(name));
    this.lineNames.set(name, origin);
  }

  useLine(name: string): string {
    return this.joints.add(lineKey(name));
  }

  piece(piece: PieceDraft): void {
    this.pieces.push(piece);
  }

  /** Where a port is joined, if it is. */
  joinedAt(key: string): Origin | undefined {
    return this.ports.get(key)?.origin;
  }

  touch(ref: PortRef, origin: Origin): string {
    const key = portKey(ref);
    if (!this.ports.has(key)) this.ports.set(key, { ref, origin });
    return this.joints.add(key);
  }

  plug(ref: PortRef, origin: Origin): void {
    this.plugs.set(this.touch(ref, origin), origin);
  }

  private functionOf(key: string, lineFunction: LineFunction): void {
    const set = this.functions.get(key) ?? new Set();
    set.add(lineFunction);
    this.functions.set(key, set);
  }

  /** The nets, with every required port that nothing joins as an open one. */
  finish(context: Context): { readonly nets: Net[]; readonly pieces: Piece[] } {
    const perhaps = context.perhapsJoined;
    for (const component of context.components.values()) {
      for (const spec of portsOf(component)) {
        const ref: PortRef = { component: component.id, port: spec.name };
        if (spec.required && !this.ports.has(portKey(ref))) {
          this.touch(ref, component.nameOrigin);
          if (!perhaps.has(component.id)) this.open.add(portKey(ref));
        }
      }
    }
    return this.collect(context);
  }

  private collect(context: Context): { readonly nets: Net[]; readonly pieces: Piece[] } {
    const groups = new Map<string, string[]>();
    for (const key of this.joints.keys()) {
      const root = this.joints.root(key);
      const group = groups.get(root);
      if (group === undefined) groups.set(root, [key]);
      else group.push(key);
    }
    const piecesAt = new Map<string, string[]>();
    for (const piece of this.pieces) {
      for (const root of new Set(piece.keys.map((key) => this.joints.root(key)))) {
        const list = piecesAt.get(root);
        if (list === undefined) piecesAt.set(root, [piece.id]);
        else list.push(piece.id);
      }
    }
    const idOf = new Map<string, string>();
    const nets: Net[] = [];
    const used = new Set<string>();
    for (const [root, keys] of groups) {
      const touched = keys.flatMap((key) => this.ports.get(key) ?? []).sort((a, b) => a.origin.start - b.origin.start);
      const named = keys.flatMap((key) => (key.startsWith('line ') ? [key.slice(5)] : [])).filter((name) => this.lineNames.has(name));
      named.sort((a, b) => (this.lineNames.get(a)?.start ?? 0) - (this.lineNames.get(b)?.start ?? 0));
      const pieces = piecesAt.get(root) ?? [];
      const reservoir = keys.map((key) => this.reservoirs.get(key)).find((id) => id !== undefined);
      const first = touched[0]?.ref;
      if (first === undefined && reservoir === undefined && pieces.length === 0) continue;
      const name = named[0];
      let id = name ?? (first === undefined ? `${reservoir ?? 'pipe'} ${pieces[0] ?? ''}`.trim() : portKey(first));
      if (used.has(id)) id = `${id} ${pieces[0] ?? nets.length}`;
      used.add(id);
      idOf.set(root, id);
      const functions = new Set<LineFunction>();
      for (const key of keys) for (const lineFunction of this.functions.get(key) ?? []) functions.add(lineFunction);
      const plugged = keys.map((key) => this.plugs.get(key)).find((origin) => origin !== undefined);
      const place = touched[0]?.origin ?? keys.map((key) => this.places.get(key)).find((origin) => origin !== undefined);
      nets.push({
        id,
        ...(name === undefined ? {} : { name }),
        ports: touched.map((port) => port.ref),
        pieces,
        functions: [...functions],
        ...(reservoir === undefined ? {} : { reservoir }),
        ...(plugged === undefined ? {} : { plugged }),
        ...(keys.some((key) => this.open.has(key)) ? { open: true } : {}),
        origin: place ?? { uri: context.uri, start: 0, end: 0 },
      });
    }
    nets.sort((a, b) => a.origin.start - b.origin.start);
    const pieces = this.pieces.map(
      ({ keys, ...piece }): Piece => ({
        ...piece,
        nets: [idOf.get(this.joints.root(keys[0])) ?? '', idOf.get(this.joints.root(keys[1])) ?? ''],
      }),
    );
    return { nets, pieces };
  }
}
