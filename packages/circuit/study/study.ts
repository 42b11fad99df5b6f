/** What the study returns: plain data (it crosses a worker boundary), SI inside, every figure traceable. */
import type { Dimension } from '@oilway/quantity';
import type { Origin } from '../model/origin.ts';

/** A figure with its way of being computed. */
export interface Figure {
  /** SI of `dimension`. */
  readonly value: number;
  readonly dimension: Dimension;
  readonly working?: Working;
}
export interface Working {
  /** `F = p cap x A cap - p rod x A rod - seal friction` */
  readonly formula: string;
  readonly inputs: readonly {
    readonly symbol: string;
    readonly value: number;
    readonly dimension: Dimension;
    /** "C1 bore, line 12", "solved", "default: 3 bar (common practice, no source)" */
    readonly source: string;
    readonly origin?: Origin;
  }[];
  readonly result: number;
  readonly dimension: Dimension;
  /** Published source of the formula, or "common practice, no source". */
  readonly source: string;
}

/** A datum that was not declared: default, figure from memory (M), derived, or a loss not counted. */
export interface Assumption {
  readonly component: string;
  readonly property: string;
  /** As shown: "92 % at rated pressure". */
  readonly value: string;
  readonly source: 'default' | 'memory' | 'derived' | 'not counted';
  readonly note: string;
}

export type Diagnosis =
  | {
      readonly kind: 'OVERPRESSURE' | 'STARVED';
      readonly nets: readonly string[];
      /** Flow without an outlet / missing, m3/s. */
      readonly flow: number;
      readonly sources: readonly string[];
      /** Closed elements around the group, in words: "V1 P to A (centre)". */
      readonly closed: readonly string[];
    }
  | { readonly kind: 'CLOSED VOLUME'; readonly nets: readonly string[]; readonly low: number; readonly high: number }
  | { readonly kind: 'NO EQUILIBRIUM'; readonly nets: readonly string[]; readonly why: string };

export interface Limiter {
  /** Component (or step command, interlock) that limits. */
  readonly of: string;
  /** "FC1 set", "pump flow P1", "relief RV1 lifts", "end stop", "no path: V1 P to A is closed". */
  readonly words: string;
  /** d ln v / d ln s, where it was computed. */
  readonly share?: number;
}

export interface ActuatorPoint {
  readonly id: string;
  /** m from retracted, or rad. */
  readonly position: number;
  /** m/s or rad/s, + = extending / forward. */
  readonly velocity: number;
  /** Wanted direction at this point: +1, -1, 0 none. */
  readonly direction: -1 | 0 | 1;
  /** N or N.m pressed on the load in the direction pushed (stop force and seal friction taken off), + = outward/forward. */
  readonly force: number;
  /** What it would press with held at v = 0; absent where not asked for. */
  readonly available?: number;
  /** Loads against the motion + friction. */
  readonly needed: number;
  readonly limitedBy: readonly Limiter[];
  /** Short by this force (N), when stalled. */
  readonly shortBy?: number;
  readonly atStop?: 'retracted' | 'extended';
  readonly stopForce?: number;
}

/** One solution of the network. */
export interface Point {
  /** "entry", "just before 250 mm (DV1 begins to close)", "end". */
  readonly label: string;
  /** s, in the run, where known. */
  readonly time?: number;
  readonly solved: boolean;
  /** Net id -> Pa gauge. */
  readonly pressures: Readonly<Record<string, number>>;
  /** Net id -> bounds, for nets whose pressure the solution does not determine. */
  readonly undetermined: Readonly<Record<string, { readonly low: number; readonly high: number }>>;
  /** `component.port` -> m3/s INTO the component from the net (+ into, - out of). */
  readonly flows: Readonly<Record<string, number>>;
  /** Component id -> opening 0..1 where the kind has one. */
  readonly openings: Readonly<Record<string, number>>;
  /** Relief-like valves passing more than 1 % of their `passes` flow. */
  readonly lifting: readonly string[];
  readonly actuators: readonly ActuatorPoint[];
  /** Pump id -> shaft power W; drive id -> W. */
  readonly power: Readonly<Record<string, number>>;
  /** Position each valve stands in: 'a', 'b', 'centre', 'open', 'closed'. */
  readonly positions: Readonly<Record<string, string>>;
  /** Accumulator id -> oil m3. */
  readonly oil: Readonly<Record<string, number>>;
  readonly diagnosis: readonly Diagnosis[];
  /** Things to say: "V1 cannot shift: 2.1 of 5 bar". */
  readonly remarks: readonly { readonly of: string; readonly words: string }[];
  /** Net or component ids whose figures depend on something unknown, with the reason. */
  readonly notComputed: Readonly<Record<string, string>>;
}

export type StateName = 'REST' | 'OFF' | 'IDLE' | 'STOP';

/** One variant of a machine state. */
export interface Variant {
  /** "V1 as a, accumulators charged, C1 greatest load inward at 200 mm". */
  readonly label: string;
  readonly detents: Readonly<Record<string, string>>;
  readonly accumulators: 'charged' | 'empty' | 'none';
  readonly drivesOn: readonly string[];
  readonly point: Point;
  /** Actuators that move (semantics: more than 0.05 mm/s and 0.005 L/min) and why. */
  readonly moving: readonly {
    readonly id: string;
    readonly velocity: number;
    readonly cause: 'load' | 'pressure';
    /** Path of components the oil takes, in words. */
    readonly path: string;
    /** Way (m) until a relaxing table load is gone; set = relaxing, no motion. */
    readonly relaxes?: number;
  }[];
}
export interface StateResult {
  /** REST, OFF, IDLE, `STOP from Drill.Out`, `STOP`, `coil SOL1`, `manual Table.Raise`. */
  readonly id: string;
  readonly state: StateName | 'COIL' | 'MANUAL';
  /** Step the STOP is from, coil, or manual function. */
  readonly of?: string;
  readonly variants: readonly Variant[];
  /** Variants studied of those possible. */
  readonly studied: { readonly of: number; readonly all: number };
}

export interface StepResult {
  /** `Drill.Out` */
  readonly id: string;
  readonly cycle: string;
  readonly points: readonly Point[];
  /** s, from the run; absent where the run did not reach its end. */
  readonly time?: number;
  readonly entered?: number;
  /** Per actuator that moves in the step: lowest, highest over the steady points, mean from the run; m/s or rad/s. */
  readonly speeds: Readonly<
    Record<string, { readonly low: number; readonly high: number; readonly mean?: number; readonly direction: -1 | 1 }>
  >;
  /** Net id -> highest, Pa. */
  readonly peaks: Readonly<Record<string, number>>;
  /** Net id -> lowest, Pa. */
  readonly lows: Readonly<Record<string, number>>;
  readonly faults: readonly Fault[];
}

export interface Fault {
  readonly kind:
    | 'time limit'
    | 'waits for ever'
    | 'chatters'
    | 'cycle without time'
    | 'two voices'
    | 'no equilibrium'
    | 'does not settle'
    | 'first run short of oil'
    | 'interlock';
  readonly words: string;
  readonly step?: string;
  readonly time?: number;
  readonly origin: Origin;
}

/** Samples of a run over time; arrays of equal length. */
export interface Run {
  readonly cycle: string;
  readonly times: readonly number[];
  readonly positions: Readonly<Record<string, readonly number[]>>;
  readonly velocities: Readonly<Record<string, readonly number[]>>;
  readonly pressures: Readonly<Record<string, readonly number[]>>;
  /** `component.port` of pumps, reliefs, actuators, accumulators -> m3/s into the component. */
  readonly flows: Readonly<Record<string, readonly number[]>>;
  /** Drive id -> W. */
  readonly power: Readonly<Record<string, readonly number[]>>;
  readonly oil: Readonly<Record<string, readonly number[]>>;
  readonly events: readonly { readonly time: number; readonly words: string; readonly of: string }[];
  /** Steps with their spans. */
  readonly steps: readonly { readonly id: string; readonly from: number; readonly to: number }[];
  /** Coil and switch states over time: spans in which they are live / on. */
  readonly live: Readonly<Record<string, readonly { readonly from: number; readonly to: number; readonly value: number }[]>>;
  readonly statistics: { readonly steps: number; readonly rejected: number; readonly newton: number; readonly events: number };
}

export interface CycleResult {
  readonly id: string;
  readonly mode: 'cycle' | 'manual';
  /** The settled run. */
  readonly run?: Run;
  /** s */
  readonly time?: number;
  readonly firstTime?: number;
  readonly runs: number;
  readonly settled: boolean;
  readonly completed: boolean;
  readonly faults: readonly Fault[];
  /** Drive id -> rms and highest over the run, W. */
  readonly duty: Readonly<Record<string, { readonly rms: number; readonly highest: number; readonly mean: number }>>;
  /** Mean W into the oil; mean W of work given to loads. */
  readonly heat?: number;
  readonly work?: number;
}

export interface RequirementResult {
  readonly id: string;
  readonly verdict: 'met' | 'missed' | 'undecidable';
  /** Worst value, SI of the measure; absent for never/still. */
  readonly worst?: Figure;
  /** (bound - value) / bound as a ratio, + = on the good side. */
  readonly margin?: number;
  /** Where and when the worst stands: "Out, 315 mm, 4.2 s". */
  readonly at: string;
  /** "cannot be decided: V2 has no `passes`", "just met", "C1.cap 183.2 of at most 180 bar in Out at 315 mm". */
  readonly words: string;
  readonly origin: Origin;
}

export interface Study {
  readonly uri: string;
  readonly states: readonly StateResult[];
  readonly steps: readonly StepResult[];
  readonly cycles: readonly CycleResult[];
  readonly requirements: readonly RequirementResult[];
  readonly assumptions: readonly Assumption[];
  /** Oil temperature balance by cycle or state id: K absolute, heat W, area m2, with working. */
  readonly heat: Readonly<Record<string, { readonly temperature: Figure; readonly heat: number }>>;
  /** ms spent, for benchmarks and progress only. */
  readonly spent: number;
  /** Component or net -> why its figures are not computed. */
  readonly notComputed: Readonly<Record<string, string>>;
}
