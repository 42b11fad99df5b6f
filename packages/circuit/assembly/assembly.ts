/** What a kind sees when it adds its law to the network: named ports in, elements out. SI at this edge; engine units behind it. */
import type { ActuatorSpec, ElementSpec, ForceTable, NodeIndex, Param } from '@oilway/engine';
import type { Oil } from '../fluid/oil.ts';
import type { Circuit, Component } from '../model/circuit.ts';
import type { Assumption } from '../study/study.ts';
import type { Setting } from './machine.ts';

/** A flow (m3/s) at a pressure drop (Pa). */
export interface FlowAt {
  readonly flow: number;
  readonly drop: number;
}

/** An element without what the assembler adds (tag, heads). */
export type Law = ElementSpec extends infer E ? (E extends ElementSpec ? Omit<E, 'tag' | 'heads'> : never) : never;

/** A setting or size by which a speed may be limited. `of` a parameter, or a size of an element; `times` where several sizes change together. */
export interface Limitation {
  readonly component: string;
  /** "FC1 set", "P1 flow", "V1 P to A". */
  readonly words: string;
  readonly targets: readonly ({ readonly parameter: Param } | { readonly element: number; readonly size: string })[];
}

/** How a kind's opening is read from the solution. */
export interface OpeningOf {
  readonly component: string;
  readonly element: number;
}

/** A relief-like valve that "lifts" above 1 % of its `passes` flow. */
export interface Lifting {
  readonly component: string;
  readonly element: number;
  /** L/s */
  readonly above: number;
}

/** A memory bit: what turns it on and off. Pressures Pa, flow m3/s. */
export type Memory =
  | {
      readonly kind: 'lifted';
      readonly component: string;
      readonly element: number;
      readonly pilot: NodeIndex;
      readonly drain: NodeIndex;
      readonly set: number;
      readonly band: number;
      readonly closes: number;
    }
  /** A pilot-operated check at standstill is shut until its pilot force is enough; `sum` of weighted pressures above `crack` opens it. */
  | {
      readonly kind: 'held';
      readonly component: string;
      readonly element: number;
      readonly pilots: readonly { readonly node: NodeIndex; readonly weight: number }[];
      readonly crack: number;
    }
  | {
      readonly kind: 'shut';
      readonly component: string;
      readonly element: number;
      readonly c: NodeIndex;
      readonly v: NodeIndex;
      readonly closes: number;
    };

export interface ValveOf {
  readonly component: string;
  readonly rest: 'a' | 'b' | 'centre';
  readonly parameters: readonly Param[];
  readonly takes: number;
  readonly proportional: boolean;
}
export interface PilotedValve {
  readonly component: string;
  readonly pilot: NodeIndex;
  readonly drain: NodeIndex;
  readonly needs: number;
}

export interface Assembly {
  readonly circuit: Circuit;
  readonly oil: Oil;
  /** Component by id, where it is computed. */
  component(id: string): Component | undefined;
  /** Node of a component's port; undefined where the port is not joined to a line (plugged or open). */
  node(component: Component, port: string): NodeIndex | undefined;
  /** Node of a port; a private dead-ended node where nothing is joined. */
  nodeOrBlind(component: Component, port: string): NodeIndex;
  /** A node of the component's own (pilot stage, chamber behind a cushion). `volume` m3 of oil in it. */
  inner(component: Component, name: string, volume?: number): NodeIndex;
  /** A parameter set from outside (opening, setting, bit, drive running), engine units. `name` is unique in the component: "open P-A", "lifted", "set". */
  parameter(component: Component, name: string, value: number): Param;
  /** False: leakage edges are left out (but for pumps and motors, whose leakage is part of their law). */
  readonly leakage: boolean;
  /** Adds an element; `ports`: the component's port at each terminal in the spec's order (undefined: none). `words`: what it is, for diagnoses: "P to A". */
  add(component: Component, law: Law, ports: readonly (string | undefined)[], words?: string): number;
  /** What a setting means for this component's parameters. Called before every solve. */
  onSetting(apply: (setting: Setting, set: (parameter: Param, value: number) => void) => void): void;
  assume(assumption: Assumption): void;
  /** The component cannot be computed after all: it is left out and its nets are marked. Nothing may have been added before. */
  cannot(component: Component, why: string): void;
  limitation(limitation: Limitation): void;
  opening(of: OpeningOf): void;
  lifting(of: Lifting): void;
  memory(of: Memory): void;
  /** A directional valve: its position parameters, for shifting in time. `takes` s. */
  valve(of: ValveOf): void;
  /** A valve that shifts only with pilot pressure; `needs` Pa. */
  pilotedValve(of: PilotedValve): void;
  /** A pump element and its drive, for shaft power. */
  pump(of: { readonly component: string; readonly drive: string; readonly element: number }): void;
  /** Index of the actuator (body) a cylinder or motor belongs to. */
  body(actuator: string): number | undefined;
  /** A chamber pressing on the body; `port` gets its flow. Area in engine units. `dead`, `full`: m3, for storage. */
  chamber(component: Component, chamber: Omit<ActuatorSpec['chambers'][number], 'head'>, port: string | undefined, full: number): void;
  /** Force of a spring on the body, N over m given as kN table. */
  spring(component: Component, table: ForceTable): void;
  /** Coulomb friction of seals on the body, N. */
  sealFriction(component: Component, newton: number): void;
  /** Friction that grows with the pressure difference (motors), kN per MPa. */
  pressureFriction(component: Component, share: number): void;
  /** A position at which something changes by itself. */
  knot(actuator: string, at: number, words: string): void;
  /** Gas charge; volume m3, precharge Pa absolute at the oil's temperature. */
  gas(component: Component, node: NodeIndex, volume: number, precharge: number): void;
  /** Spring-applied brake on an actuator: torque N.m at the body, nothing left at `opens` Pa. */
  brake(
    component: Component,
    brake: { readonly actuator: string; readonly node: NodeIndex; readonly opens: number; readonly torque: number },
  ): void;
  /** Extra storage at a node, L/MPa. */
  store(node: NodeIndex, storage: number): void;
  /** Theoretical flow of all pumps together, m3/s. */
  readonly pumpFlow: number;
}
