/** What a kind sees when it adds its law to the network: named ports in, elements out. SI at this edge; engine units behind it. */
import type { CamPathSpec, CheckSpec, ElementSpec, NodeIndex, Param } from '@oilway/engine';
import type { Circuit, Component } from '../model/circuit.ts';
import type { Assumption } from '../study/study.ts';

export interface Assembly {
  readonly circuit: Circuit;
  /** Node of a component's port; undefined where the port is not joined to a line (plugged or open). */
  node(component: Component, port: string): NodeIndex | undefined;
  /** Node of a port; a private dead-ended node where nothing is joined. */
  nodeOrBlind(component: Component, port: string): NodeIndex;
  /** A node of the component's own (pilot stage, chamber behind a cushion). */
  inner(component: Component, name: string): NodeIndex;
  /** A parameter set from outside (opening, setting, bit, drive running). `name` is unique in the component: "open P-A", "lifted", "set". */
  parameter(component: Component, name: string, value: number): Param;
  add(element: ElementSpec): void;
  assume(assumption: Assumption): void;
  // The assembler adds: oil properties, actuators, gas charges, port-flow book-keeping. Extended in assembly/*.ts.
}
export type { CamPathSpec, CheckSpec };
