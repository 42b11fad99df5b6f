/** The resolved value of one property: plain data, SI inside, the written unit and the place in the text kept. */
import type { Dimension, Quantity } from '@oilway/quantity';
import type { Origin } from './origin.ts';

/** A number with unit, perhaps with a tolerance band. `q.si` is in the SI unit of `q.dimension` (pressure: Pa gauge; temperature: K absolute). */
export interface QuantityValue {
  readonly type: 'quantity';
  readonly q: Quantity;
  /** Half-width of the tolerance band in SI of the same dimension (temperature: K difference); absent = none declared. */
  readonly plusMinus?: number;
  readonly origin: Origin;
  /** Names of the constants (`let`) this value was computed from. */
  readonly from?: readonly string[];
}

/** `passes 80 L/min at 3 bar`, `leak 20 cm3/min at 100 bar`. */
export interface FlowAtValue {
  readonly type: 'flowAt';
  readonly flow: Quantity;
  readonly drop: Quantity;
  readonly origin: Origin;
}

export interface WordValue {
  readonly type: 'word';
  readonly word: string;
  readonly origin: Origin;
}
export interface FlagValue {
  readonly type: 'flag';
  readonly origin: Origin;
}
export interface TextValue {
  readonly type: 'text';
  readonly text: string;
  readonly origin: Origin;
}
/** A plain number: `grade 46`, `bends 4`; a ratio `3:1` is 3; a percentage is a QuantityValue of dimension `ratio`. */
export interface NumberValue {
  readonly type: 'number';
  readonly value: number;
  readonly origin: Origin;
}
/** A component named by another: `driven by M1`, `on C2`. `id` is the component's id. */
export interface ReferenceValue {
  readonly type: 'reference';
  readonly id: string;
  /** A named port (`on C1.cap`), if one is written. */
  readonly port?: string;
  readonly origin: Origin;
}
/** `range 0 bar to 250 bar`, `ambient 10 degC to 35 degC`, `from 255 mm to 320 mm`. A single value has from = to. */
export interface RangeValue {
  readonly type: 'range';
  readonly from: Quantity;
  readonly to: Quantity;
  readonly origin: Origin;
}
/** One flow path of a valve position: `A to P`, with its own `passes` where written. */
export interface PathSpec {
  readonly from: string;
  readonly to: string;
  readonly passes?: { readonly flow: Quantity; readonly drop: Quantity };
  readonly origin: Origin;
}
/** `centre closed`, `a (A to P)`, `centre (B to T)`. A named centre keeps its word; its paths are filled in. */
export interface PositionValue {
  readonly type: 'position';
  readonly word?: 'closed' | 'open' | 'tandem' | 'float';
  readonly paths: readonly PathSpec[];
  readonly origin: Origin;
}
/** `passes P to A 60 L/min at 7 bar`: several of these and at most one general `passes` may stand in one component. */
export interface PathPassesValue {
  readonly type: 'pathPasses';
  readonly from: string;
  readonly to: string;
  readonly flow: Quantity;
  readonly drop: Quantity;
  readonly origin: Origin;
}
/** `coil a SOL1 24 V`; side absent for a single signed command and for kinds without positions. */
export interface CoilValue {
  readonly type: 'coil';
  readonly side?: 'a' | 'b' | 'centre';
  readonly name: string;
  readonly voltage?: Quantity;
  readonly origin: Origin;
  readonly nameOrigin: Origin;
}
/** `cam a C2 from 250 mm to 320 mm` (side given) and `closed by C2 from 250 mm to 265 mm` (side absent). */
export interface CamValue {
  readonly type: 'cam';
  readonly side?: 'a' | 'b' | 'centre';
  readonly actuator: string;
  readonly from: Quantity;
  readonly to: Quantity;
  readonly origin: Origin;
}
/** `attitude rod up | rod down | level | 30 deg`: rod angle above horizontal, rad. */
export interface AttitudeValue {
  readonly type: 'attitude';
  readonly angle: number;
  readonly origin: Origin;
}
/** `bypass 1.7 bar` or `bypass none`. */
export interface BypassValue {
  readonly type: 'bypass';
  readonly crack?: Quantity;
  readonly origin: Origin;
}
/** `precharge 90 bar at 20 degC`. */
export interface PrechargeValue {
  readonly type: 'precharge';
  readonly pressure: Quantity;
  readonly temperature: Quantity;
  readonly origin: Origin;
}
/** `telescopic 80 mm and 60 mm`: the stages after `bore`. */
export interface ListValue {
  readonly type: 'list';
  readonly items: readonly Quantity[];
  readonly origin: Origin;
}
/** `at 265 mm`, `at a`, `at open` of a switch; `begins retracted | extended | 30 mm`. */
export interface PlaceValue {
  readonly type: 'place';
  readonly word?: string;
  readonly q?: Quantity;
  readonly origin: Origin;
}
/** One load entry: `resist 9 kN from 270 mm to 315 mm extending in Out and Back`, or a table over position. */
export interface LoadValue {
  readonly type: 'load';
  /** Constant force (N) or torque (N.m); absent with a table. */
  readonly constant?: Quantity;
  /** Knots: position (m or rad) and force (N) or torque (N.m); linear between, end values hold outside. */
  readonly table?: readonly { readonly at: Quantity; readonly value: Quantity }[];
  readonly range?: { readonly from: Quantity; readonly to: Quantity };
  readonly direction?: 'extending' | 'retracting';
  /** Ids of the steps in which the entry is there; absent = always. */
  readonly steps?: readonly string[];
  readonly origin: Origin;
}
/** `?`: to be found. The circuit is computed as if the value were missing, until sizing. */
export interface WantedValue {
  readonly type: 'wanted';
  readonly dimension?: Dimension;
  readonly origin: Origin;
}
/** Written, but wrong: an error was reported at `origin`. The component counts as unknown where the value is needed. */
export interface UnknownValue {
  readonly type: 'unknown';
  readonly why: string;
  readonly origin: Origin;
}

export type PropertyValue =
  | QuantityValue
  | FlowAtValue
  | WordValue
  | FlagValue
  | TextValue
  | NumberValue
  | ReferenceValue
  | RangeValue
  | PositionValue
  | PathPassesValue
  | CoilValue
  | CamValue
  | AttitudeValue
  | BypassValue
  | PrechargeValue
  | ListValue
  | PlaceValue
  | LoadValue
  | WantedValue
  | UnknownValue;

/** One property as written. A name may recur (`coil`, `passes`, `rated`, `resist`, `inward` ...). */
export interface Property {
  readonly name: string;
  /** `rated T 160 bar`: the port the value is for. */
  readonly port?: string;
  readonly value: PropertyValue;
  /** The whole property, name and items. */
  readonly origin: Origin;
  /** The name only. */
  readonly nameOrigin: Origin;
  /** Set where the value came from a `part`: the part's id. */
  readonly part?: string;
}
