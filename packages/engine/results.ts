/** What goes into a solve and what comes out of it. Units as in network.ts. */
import type { LoadState, NodeIndex } from './network.ts';

/**
 * A gas charge now: no oil in it; or the oil volume in L (pressure from the precharge by p V^n, n = `gasExponent`); or oil and
 * the absolute pressure in MPa it stands at (filled slowly, used quickly).
 */
export type GasState = 'empty' | number | { readonly oil: number; readonly pressure: number };

export interface SteadyRequest {
  /** One per actuator, m or rad. */
  readonly positions: ArrayLike<number>;
  /** One per actuator; missing or undefined: no load. */
  readonly loads?: readonly (LoadState | undefined)[];
  /** Actuators held at v = 0. */
  readonly locked?: readonly boolean[];
  /** Actuators whose stops do not hold ("as if free to move both ways"). */
  readonly freeStops?: readonly boolean[];
  /** One per gas charge; missing: empty. */
  readonly gas?: readonly GasState[];
  /** Exponent of p V^n for charges given by volume; default 1.4. */
  readonly gasExponent?: number;
  /** At a position where a force table or cam jumps: take the side below (-1) or above (1, default), per actuator. */
  readonly side?: readonly (-1 | 1)[];
  /** Result of the same network nearby. */
  readonly start?: SteadyResult | undefined;
  /** Leakage floor across closable elements, L/s/MPa; default 1e-6. */
  readonly floor?: number;
}

/** `closed`: tags of closed elements around the group; `sources`: tags of what delivers into it or draws from it (pumps; actuators as `actuators`). */
export type EngineDiagnosis =
  | {
      readonly kind: 'OVERPRESSURE' | 'STARVED';
      readonly nodes: readonly NodeIndex[];
      /** L/s without an outlet, or missing. */
      readonly flow: number;
      readonly closed: readonly number[];
      readonly sources: readonly number[];
      /** Indices of actuators that press into it or draw from it. */
      readonly actuators: readonly number[];
    }
  | { readonly kind: 'CLOSED VOLUME'; readonly nodes: readonly NodeIndex[]; readonly closed: readonly number[] }
  | { readonly kind: 'NO EQUILIBRIUM'; readonly nodes: readonly NodeIndex[]; readonly why: string };

/** Which stage of the cascade found the answer. */
export type SteadyStage = 'newton' | 'smoothing' | 'pseudo-transient' | 'smoothed pseudo-transient' | 'backward Euler' | 'none';

export interface SteadyResult {
  readonly converged: boolean;
  readonly how: SteadyStage;
  readonly iterations: number;
  /** Largest residual: L/s at nodes, MPa in force balances. */
  readonly residual: number;
  /** MPa gauge, by node. */
  readonly pressures: Float64Array;
  /** Flow into each element at each of its terminals, L/s: `flows[elementStart[e] + terminal]`, terminals in the order of the spec. */
  readonly flows: Float64Array;
  readonly elementStart: Int32Array;
  /** Opening or stroke 0..1 of each element; 1 where it has none. */
  readonly openings: Float64Array;
  /** m/s or rad/s, by actuator. */
  readonly velocities: Float64Array;
  /** Pressure force, + outward, kN. */
  readonly pressureForces: Float64Array;
  /** Friction as it acts on the body (against motion), kN; held actuators: what friction takes of the net force, 0 when locked. */
  readonly frictionForces: Float64Array;
  /** Load in force (fixed + spring + resist), + outward, kN. */
  readonly loadForces: Float64Array;
  /** What a stop, or the lock, presses on the body, + outward, kN; 0 when it moves. */
  readonly stopForces: Float64Array;
  /** 'free', 'low', 'high' (stop holds) or 'locked'. */
  readonly contacts: readonly ActuatorContact[];
  /** Oil flow into each gas charge, L/s; 0 when empty. */
  readonly gasFlows: Float64Array;
  /** Flow from the fictitious supply (+) or into the fictitious outlet (-), by node, L/s; also what the floor takes from a part that stands alone. */
  readonly fictitious: Float64Array;
  readonly diagnosis: readonly EngineDiagnosis[];
  /** The unknowns as solved; start of a neighbouring solve. */
  readonly state: Float64Array;
}

export type ActuatorContact = 'free' | 'low' | 'high' | 'locked' | 'pinned';

/** What a run stops for: a sum of weighted pressures (of nodes), positions, oil volumes, flows out of a fixed node; crossing the threshold. */
export interface TransientWatch {
  readonly terms: readonly WatchTerm[];
  readonly threshold: number;
  readonly edge: 'rising' | 'falling';
}
export interface WatchTerm {
  readonly of: 'pressure' | 'position' | 'velocity' | 'oil' | 'flow';
  /** Node, actuator, gas charge; for 'flow' the index into `flows` (elementStart + terminal). */
  readonly index: number;
  readonly weight: number;
}

export interface TransientOptions {
  /** Inertia and tight pressures; default quasi-static. */
  readonly dynamics?: boolean;
  /** Relative error of positions and oil volumes in a step; default 1e-4. */
  readonly tolerance?: number;
  readonly maxStep?: number;
  /** Most steps in one `advance`; default 20,000. */
  readonly maxSteps?: number;
  readonly floor?: number;
}

export interface AdvanceReport {
  readonly time: number;
  /** Watches that fired; empty: `until` reached (or failed). */
  readonly fired: readonly number[];
  readonly happened: readonly { readonly time: number; readonly actuator: number; readonly what: 'stop reached' | 'stop left' | 'knot' }[];
  /** Why it could not go on. */
  readonly failed?: string;
}

export interface TransientStatistics {
  readonly steps: number;
  readonly rejected: number;
  readonly newton: number;
  readonly events: number;
}

/** What a sensitivity is taken with respect to: a parameter, or a numeric size of an element ("k", "qth", "needs", "kMin", ..). */
export type SensitivityOf = { readonly parameter: number } | { readonly element: number; readonly size: string };
export interface Sensitivity {
  readonly of: SensitivityOf;
  /** Value s at which it was taken. */
  readonly value: number;
  /** d/ds of pressures by node, velocities by actuator. */
  readonly pressures: Float64Array;
  readonly velocities: Float64Array;
}
