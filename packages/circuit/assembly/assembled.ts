/** The network with everything needed to set it and to read it: what the assembler hands to the machine. */
import type { ActuatorSpec, ElementSpec, ForceTable, GasSpec, NetworkSpec, NodeIndex, Param } from '@oilway/engine';
import type { Oil } from '../fluid/oil.ts';
import type { Circuit } from '../model/circuit.ts';
import type { Assumption } from '../study/study.ts';
import type { Lifting, Limitation, Memory, OpeningOf, PilotedValve, ValveOf } from './assembly.ts';
import type { Setting } from './machine.ts';

/** What an element is, for diagnoses and port flows. */
export interface ElementNote {
  readonly component: string;
  readonly words: string;
  /** Port at each terminal; undefined: an inner one. */
  readonly ports: readonly (string | undefined)[];
}
export interface ChamberNote {
  readonly component: string;
  readonly port: string | undefined;
  readonly body: number;
  readonly node: NodeIndex;
  /** Engine area, + outward. */
  readonly area: number;
  readonly stages?: { readonly at: readonly number[]; readonly area: readonly number[] };
  /** Rating head: pressure at the chamber = node - head, MPa. */
  readonly head: number;
}
export interface BodyNote {
  readonly id: string;
  readonly actuators: readonly string[];
  readonly type: 'linear' | 'rotating';
  readonly stroke: number;
  readonly begins: number;
  /** N */
  readonly sealFriction: number;
  readonly spring?: ForceTable;
  readonly knots: readonly { readonly at: number; readonly words: string }[];
}
export interface GasNote {
  readonly component: string;
  readonly node: NodeIndex;
  /** m3 */
  readonly volume: number;
  /** Pa absolute at the oil's temperature. */
  readonly precharge: number;
}
export interface PumpNote {
  readonly component: string;
  readonly drive: string;
  readonly element: number;
  /** Share of the shaft torque that reaches the oil. */
  readonly mechanical: number;
}
export interface BrakeNote {
  readonly component: string;
  readonly body: number;
  readonly node: NodeIndex;
  /** Pa */
  readonly opens: number;
  /** N.m at the body. */
  readonly torque: number;
}
export type Apply = (setting: Setting, set: (parameter: Param, value: number) => void) => void;

export interface Assembled {
  readonly circuit: Circuit;
  readonly oil: Oil;
  readonly spec: NetworkSpec;
  /** Values before any setting. */
  readonly parameters: Float64Array;
  readonly apply: readonly Apply[];
  /** By element index; lines with loss have the piece's id as component. */
  readonly elements: readonly ElementNote[];
  readonly specs: readonly ElementSpec[];
  readonly actuators: readonly ActuatorSpec[];
  readonly gasSpecs: readonly GasSpec[];
  readonly netOf: ReadonlyMap<NodeIndex, string>;
  readonly nodeOf: ReadonlyMap<string, NodeIndex>;
  readonly chambers: readonly ChamberNote[];
  readonly bodies: readonly BodyNote[];
  readonly bodyOf: ReadonlyMap<string, number>;
  readonly gases: readonly GasNote[];
  readonly pumps: readonly PumpNote[];
  readonly brakes: readonly BrakeNote[];
  readonly memories: readonly Memory[];
  readonly valves: readonly ValveOf[];
  readonly piloted: readonly PilotedValve[];
  readonly limitations: readonly Limitation[];
  readonly openings: readonly OpeningOf[];
  readonly liftings: readonly Lifting[];
  readonly assumptions: readonly Assumption[];
  readonly notComputed: Readonly<Record<string, string>>;
  /** Component id -> rho g z at its ports, Pa. */
  readonly heads: Readonly<Record<string, number>>;
}
