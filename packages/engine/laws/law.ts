/** What every element law offers the residual: its inputs, its outputs and one evaluation with derivatives. */
import type { NodeIndex } from '../network.ts';

/** Place in `out` where a law leaves its opening (or stroke), 0..1. */
export const OPENING = 7;
/** Most inputs and outputs of one law. */
export const MAX_INPUTS = 16;
export const MAX_OUTPUTS = 8;

export interface Law {
  /** Terminals first, then sensed nodes. A node may appear more than once. */
  readonly nodes: readonly NodeIndex[];
  /** Head of each of `nodes`, MPa: pressure in the law = node pressure - head. */
  readonly heads: readonly number[];
  /** How many of `nodes` carry flow. */
  readonly terminals: number;
  /** 1 when the law has an unknown (and an equation) of its own: a line's flow, a divider's shaft. */
  readonly own: 0 | 1;
  /** Actuator whose position is an input; -1: none. */
  readonly actuator: number;
  /** Whether a leakage floor runs from the first terminal to the others. */
  readonly floor: boolean;
  /** Whether terminals count as joined when it conducts (not through a pump). */
  readonly joins: boolean;
  /** A law without floor that determines its terminals by itself (custom). */
  readonly always?: boolean;
  /**
   * Inputs z: pressures of `nodes`, then the own unknown, then the position. Writes flow INTO the element at each terminal,
   * then the own residual, to `out`; the opening to out[OPENING]; derivatives row by row (outputs by inputs) to `gradient`.
   * `blend` >= 1 widens all roundings (continuation); 1 is the law itself. Returns false when it is shut: all flows and slopes are zero.
   */
  evaluate(z: Float64Array, parameters: Float64Array, blend: number, out: Float64Array, gradient: Float64Array): unknown;
}

export const inputsOf = (law: Law): number => law.nodes.length + law.own + (law.actuator >= 0 ? 1 : 0);
export const outputsOf = (law: Law): number => law.terminals + law.own;

/** Writes a flow q from terminal 0 to terminal 1 with slopes to both pressures; the only inputs. */
export function through(q: number, da: number, db: number, out: Float64Array, gradient: Float64Array): void {
  out[0] = q;
  out[1] = -q;
  gradient[0] = da;
  gradient[1] = db;
  gradient[2] = -da;
  gradient[3] = -db;
}

/** A shut two-terminal element with `inputs` inputs: no flow, no slopes. */
export function shut(out: Float64Array, gradient: Float64Array, inputs: number): false {
  out[0] = 0;
  out[1] = 0;
  out[OPENING] = 0;
  for (let i = 0; i < 2 * inputs; i++) gradient[i] = 0;
  return false;
}

/** Heads of an element padded with zeros to the number of its nodes. */
export function headsOf(heads: readonly number[] | undefined, count: number): number[] {
  const padded: number[] = [];
  for (let i = 0; i < count; i++) padded.push(heads?.[i] ?? 0);
  return padded;
}
