/** What a component kind is: its schema, ports, natural ports, words and (where computed) its law. One kind is one file in this folder. */
import type { Dimension } from '@oilway/quantity';
import type { Component } from '../model/circuit.ts';
import type { Assembly } from '../assembly/assembly.ts';
import type { KindName } from './names.ts';

export type PortRole = 'suction' | 'pressure' | 'working' | 'return' | 'pilot' | 'vent' | 'drain' | 'holding' | 'any';

export interface PortSpec {
  readonly name: string;
  readonly role: PortRole;
  /** False: open is no finding. */
  readonly required: boolean;
  /** One phrase for hover and completion. */
  readonly about: string;
}

/** The form a property's items take in the text. */
export type Shape =
  | { readonly form: 'quantity'; readonly dimensions: readonly Dimension[] }
  /** `rated 315 bar`, `rated T 160 bar` */
  | { readonly form: 'portQuantity'; readonly dimension: Dimension }
  | { readonly form: 'flowAt'; readonly perPath?: boolean }
  | { readonly form: 'word'; readonly words: readonly string[] }
  /** `spring to centre`, `driven by M1`, `on C2` */
  | { readonly form: 'reference'; readonly small?: 'by'; readonly kinds: readonly KindName[] }
  | { readonly form: 'toWord'; readonly words: readonly string[] }
  | { readonly form: 'range'; readonly dimensions: readonly Dimension[] }
  | { readonly form: 'flag' }
  | { readonly form: 'number' }
  | { readonly form: 'ratio' }
  | { readonly form: 'text' }
  | { readonly form: 'position' }
  | { readonly form: 'coil' }
  | { readonly form: 'cam'; readonly small?: 'by' }
  | { readonly form: 'attitude' }
  | { readonly form: 'bypass' }
  | { readonly form: 'precharge' }
  | { readonly form: 'list'; readonly dimension: Dimension }
  | { readonly form: 'span'; readonly dimension: Dimension } // `spring 200 N to 600 N` (a range)
  | { readonly form: 'place' }
  | { readonly form: 'load' };

export interface PropertySpec {
  readonly name: string;
  readonly shape: Shape;
  readonly required: boolean;
  /** Exactly one / at least one of the group's properties must stand. */
  readonly group?: string;
  /** Shown default, in words. */
  readonly default: string;
  /** Where a computed default comes from. */
  readonly defaultSource?: string;
  readonly example: string;
  /** What it means, one sentence for hover and completion. */
  readonly about: string;
  /** May be written more than once. */
  readonly many?: boolean;
}

/** Natural ports in a chain. `through`: passed entrance to exit; `end`: P where a line comes to it, T where one starts; `fixed`: one port; `none`: write the port; `any`: reservoir. */
export type Chain =
  | { readonly how: 'through'; readonly from: string; readonly to: string }
  | { readonly how: 'end'; readonly entry: string; readonly exit: string }
  | { readonly how: 'fixed'; readonly port: string }
  | { readonly how: 'none' }
  | { readonly how: 'any' };

export interface Kind {
  readonly name: KindName;
  /** What it is, one sentence in trade words (ISO 5598 vocabulary). */
  readonly about: string;
  /** Trade noun for messages: "pilot-operated check valve". */
  readonly noun: string;
  readonly ports: readonly PortSpec[];
  readonly chain: Chain;
  readonly properties: readonly PropertySpec[];
  readonly groups: readonly { readonly name: string; readonly need: 'exactly one' | 'at least one'; readonly of: readonly string[] }[];
  /** Ports this very component has (shape of a directional valve, single-acting cylinder ...); default: `ports`. */
  portsOf?(component: Component): readonly PortSpec[];
  /** Natural port(s) of this very component; default: `chain`. */
  chainOf?(component: Component): Chain;
  /** Adds the component's law to the network. Absent = "not computed yet": shown as information, its nets are marked, nothing is taken as zero resistance. */
  assemble?(component: Component, into: Assembly): void;
}
