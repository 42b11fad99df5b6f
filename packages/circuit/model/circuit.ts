/** The resolved circuit: what the text says, in trade terms, as plain data (structured-clone safe). */
import type { Dimension, Quantity } from '@oilway/quantity';
import type { KindName } from '../kinds/names.ts';
import type { Origin } from './origin.ts';
import type { Property } from './value.ts';

export type LineFunction = 'suction' | 'working' | 'return' | 'pilot' | 'drain';

export interface Component {
  /** Unique in the circuit: `C1`; inside a unit `U1.M1`. */
  readonly id: string;
  readonly kind: KindName;
  /** Own properties first, then those of the part that are not overridden. */
  readonly properties: readonly Property[];
  /** `4/3`, `2/2` of a directional valve: ports and positions. */
  readonly shape?: { readonly ports: number; readonly positions: number; readonly origin: Origin };
  readonly part?: string;
  readonly title?: string;
  /** The whole statement (shared by twins). */
  readonly origin: Origin;
  /** The name where it is declared. */
  readonly nameOrigin: Origin;
}

export interface PortRef {
  readonly component: string;
  readonly port: string;
}

/** One place of a station as written, with what it resolved to. */
export interface LinePlace {
  readonly origin: Origin;
  /** Component port(s) this place stands for: one at an end, entrance and exit where it is passed through. */
  readonly ports: readonly PortRef[];
  /** Set where the place is the name of a line. */
  readonly line?: string;
  /** True where the port was written (`V1.P`), false where the natural port was taken. */
  readonly written: boolean;
}

/** One line statement: stations joined by `to`. Piece i lies between station i and i + 1. */
export interface LineStatement {
  readonly function: LineFunction;
  readonly name?: string;
  readonly stations: readonly { readonly places: readonly LinePlace[]; readonly origin: Origin }[];
  readonly properties: readonly Property[];
  readonly origin: Origin;
  /** Ids of the pieces, in order. */
  readonly pieces: readonly string[];
}

/** A piece of pipe between two stations. */
export interface Piece {
  /** `line:3.0`: statement number and position in the chain. */
  readonly id: string;
  readonly function: LineFunction;
  /** The nets at its two sides: the same net unless bore and length are both given (then it has a loss of its own). */
  readonly nets: readonly [string, string];
  readonly joint?: 'flanged' | 'tube' | 'hose';
  /** m */
  readonly bore?: number;
  /** m */
  readonly wall?: number;
  /** m */
  readonly length?: number;
  /** Pa gauge */
  readonly rated?: number;
  readonly bends?: number;
  readonly shielded?: boolean;
  /** The ports at each side as written in this piece. */
  readonly sides: readonly [readonly PortRef[], readonly PortRef[]];
  readonly origin: Origin;
}

/** Ports joined with nothing but pipe without own loss between them: one pressure. A net never spans a reservoir: each pipe to a reservoir is its own net. */
export interface Net {
  /** Stable in words: the line's name if it has one, else the first port in text order, `P1.P`. */
  readonly id: string;
  readonly name?: string;
  readonly ports: readonly PortRef[];
  readonly pieces: readonly string[];
  readonly functions: readonly LineFunction[];
  /** Reservoir this pipe ends in: its pressure is the level pressure. */
  readonly reservoir?: string;
  /** Written with `plug`, or a port left open (then `open`). */
  readonly plugged?: Origin;
  readonly open?: boolean;
  readonly origin: Origin;
}

export interface Coil {
  /** Unique: `SOL1`, inside a unit `U1.SOL0`. */
  readonly id: string;
  readonly component: string;
  readonly side?: 'a' | 'b' | 'centre';
  /** V */
  readonly voltage?: number;
  readonly origin: Origin;
}

/** A load statement: one body on one actuator, or on several that move as one (`with`). */
export interface Load {
  readonly actuators: readonly string[];
  readonly properties: readonly Property[];
  readonly origin: Origin;
}

export type Condition =
  | { readonly op: 'and' | 'or'; readonly items: readonly Condition[]; readonly origin: Origin }
  /** A switch, coil (`on`/`off`) or actuator (`extended`/`retracted`). */
  | { readonly op: 'state'; readonly of: string; readonly is: 'on' | 'off' | 'extended' | 'retracted'; readonly origin: Origin }
  /** An actuator's position, a sensor's or switch's quantity against a value. */
  | {
      readonly op: 'compare';
      readonly of: string;
      readonly is: 'at' | 'above' | 'below';
      readonly value: Quantity;
      readonly origin: Origin;
    }
  /** A step (`Drill.Clamp`) or cycle (`Drill`) is running. */
  | { readonly op: 'running'; readonly of: string; readonly origin: Origin }
  /** Did not resolve; an error was reported. */
  | { readonly op: 'unknown'; readonly origin: Origin };

/** A coil asked for. Values: ratio (1 = 100 %) or, for a coil on a setting, that setting's dimension. Absent = fully on. */
export interface Command {
  readonly coil: string;
  readonly at?: Quantity;
  readonly from?: Quantity;
  readonly to?: Quantity;
  /** Ramp time, s. */
  readonly over?: number;
  readonly origin: Origin;
}

export type Action =
  | { readonly does: 'energise'; readonly commands: readonly Command[]; readonly origin: Origin }
  | { readonly does: 'shift'; readonly valve: string; readonly to: 'a' | 'b' | 'centre'; readonly origin: Origin }
  | { readonly does: 'stop'; readonly drives: readonly string[]; readonly origin: Origin }
  | { readonly does: 'run'; readonly cycle: string; readonly times: number; readonly origin: Origin };

export interface Step {
  /** `Drill.Clamp` */
  readonly id: string;
  readonly name: string;
  readonly cycle: string;
  /** Id of the step above that this `meanwhile` line runs beside. */
  readonly beside?: string;
  readonly actions: readonly Action[];
  /** `for`, s. */
  readonly lasts?: number;
  readonly until?: Condition;
  /** `at most`, s. */
  readonly atMost?: number;
  readonly title?: string;
  readonly origin: Origin;
  readonly nameOrigin: Origin;
}

export interface Cycle {
  readonly id: string;
  readonly mode: 'cycle' | 'manual';
  readonly repeat?: 'ever' | number;
  readonly title?: string;
  readonly steps: readonly Step[];
  readonly origin: Origin;
  readonly nameOrigin: Origin;
}

export interface While {
  readonly when: Condition;
  readonly action: Action;
  readonly origin: Origin;
}
export interface Interlock {
  readonly coils: readonly string[];
  readonly needs: Condition;
  readonly origin: Origin;
}
export interface Emergency {
  readonly actions: readonly Action[];
  readonly title?: string;
  readonly origin: Origin;
}

export type Measure =
  | 'speed'
  | 'force'
  | 'torque'
  | 'pressure'
  | 'power'
  | 'loading'
  | 'flow'
  | 'loss'
  | 'temperature'
  | 'time'
  | 'position'
  | 'volume'
  | 'drift';

export interface Where {
  /** Steps, cycles, or REST OFF STOP IDLE; all must hold. */
  readonly places?: readonly string[];
  readonly range?: { readonly from: Quantity; readonly to: Quantity };
  readonly direction?: 'extending' | 'retracting';
}
export type Bound =
  | { readonly is: 'least' | 'most'; readonly value: Quantity }
  | { readonly is: 'between'; readonly low: Quantity; readonly high: Quantity }
  | { readonly is: 'reaches'; readonly value: Quantity; readonly within?: number };

export type Requirement =
  | { readonly form: 'never'; readonly id: string; readonly condition: Condition; readonly origin: Origin }
  | {
      readonly form: 'still';
      readonly id: string;
      readonly of: string;
      readonly where: Where;
      readonly lasts?: number;
      readonly origin: Origin;
    }
  | {
      readonly form: 'bound';
      readonly id: string;
      /** Component, `component.port`, line name, step or cycle. */
      readonly of: string;
      readonly port?: string;
      readonly measure: Measure;
      readonly where: Where;
      readonly bound: Bound;
      readonly lasts?: number;
      readonly origin: Origin;
    };

export interface Allow {
  readonly rule: string;
  readonly on?: string;
  readonly port?: string;
  readonly where: Where;
  readonly reason: string;
  readonly origin: Origin;
}

export interface Limits {
  readonly properties: readonly Property[];
  readonly origin: Origin;
}

export interface Controls {
  readonly file: string;
  readonly symbols: readonly { readonly of: string; readonly symbol?: string; readonly number?: number; readonly origin: Origin }[];
  readonly origin: Origin;
}

export interface Constant {
  readonly name: string;
  readonly value?: Quantity;
  readonly origin: Origin;
  readonly nameOrigin: Origin;
}

/** A statement that is understood but not yet computed; shown as information, never silently dropped. */
export interface NotComputed {
  readonly what: string;
  readonly why: string;
  readonly origin: Origin;
}

export interface Circuit {
  readonly uri: string;
  readonly name?: string;
  readonly title?: string;
  readonly display: 'as written' | 'metric' | 'us';
  /** The unit met most often in the text for each dimension (tie: first), for `display as written`. */
  readonly units: Readonly<Partial<Record<Dimension, string>>>;
  readonly components: readonly Component[];
  readonly coils: readonly Coil[];
  readonly lines: readonly LineStatement[];
  readonly pieces: readonly Piece[];
  readonly nets: readonly Net[];
  readonly loads: readonly Load[];
  readonly cycles: readonly Cycle[];
  readonly whiles: readonly While[];
  readonly interlocks: readonly Interlock[];
  readonly emergency?: Emergency;
  readonly requirements: readonly Requirement[];
  readonly allows: readonly Allow[];
  readonly limits?: Limits;
  readonly controls?: Controls;
  readonly constants: readonly Constant[];
  readonly notComputed: readonly NotComputed[];
  /** Component ids that cannot be computed, each with the reason in trade words ("V2 has no `passes`"). */
  readonly unknown: Readonly<Record<string, string>>;
}
