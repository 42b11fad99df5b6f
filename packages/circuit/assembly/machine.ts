/**
 * The assembled circuit as a machine that can be set, solved and run. The study says what is set (states, steps, loads);
 * the machine knows how each setting reaches the network. SI at this edge.
 */
import type { Circuit } from '../model/circuit.ts';
import type { Assumption, Diagnosis } from '../study/study.ts';

/** Where a directional valve stands: a position, or between two while it shifts. */
export interface Stand {
  readonly position: 'a' | 'b' | 'centre';
  /** Proportional: opening of that side's paths, 0..1; absent = fully. */
  readonly opening?: number;
}

/** Piecewise linear force over position, N (N.m) over m (rad); a jump is two knots at one position; end values hold outside. */
export interface ForceOverPosition {
  readonly at: readonly number[];
  readonly force: readonly number[];
}
/** Loads in force on one body. */
export interface BodyLoad {
  /** + outward / forward, added up (weight included). */
  readonly fixed: readonly ForceOverPosition[];
  /** >= 0, against outward motion. */
  readonly resistOut: readonly ForceOverPosition[];
  readonly resistIn: readonly ForceOverPosition[];
  /** Coulomb, N: load friction (without seal friction). */
  readonly friction: number;
}

/** Everything that is set from outside. Missing entries: drives on, valves sprung (detent: a), commands dead, bits off, positions at `begins`, no load, accumulators empty. */
export interface Setting {
  readonly drives: Readonly<Record<string, boolean>>;
  readonly valves: Readonly<Record<string, Stand>>;
  /** Coils on settings (relief, reducing, throttle): setting in SI of that setting (a throttle with `passes`: share of its opening); absent = dead. */
  readonly commands: Readonly<Record<string, number>>;
  /** Memory bits: unloading lifted, burst shut, pilot-operated check held shut from standstill. Absent: as `near` has them in `solve`, else off. */
  readonly bits: Readonly<Record<string, boolean>>;
  /** Actuator id -> m or rad. Bodies joined by `with` move as one. */
  readonly positions: Readonly<Record<string, number>>;
  /** Accumulator id -> oil m3, or 'empty' (no oil, gas at precharge). */
  readonly oil: Readonly<Record<string, number | 'empty'>>;
  /** Accumulator id -> absolute gas pressure Pa with that oil in; absent: as after filling slowly (isothermal). */
  readonly gasPressures?: Readonly<Record<string, number>>;
  readonly loads: Readonly<Record<string, BodyLoad>>;
  /** Actuators held at v = 0 (force available). */
  readonly locked?: readonly string[];
  /** Directions in which stops do not hold ("as if free to move both ways"). */
  readonly free?: readonly string[];
  /** Count leakage (drift studies); otherwise only pump and motor leakage and the solver's floor. */
  readonly leakage?: boolean;
  /** Seal friction counted: always, or only against a motion that no declared load pushes (states). */
  readonly sealFriction?: 'always' | 'not with load';
  /** Shut-offs taken as the contrary of what is declared, couplings parted (rules E01, E02). */
  readonly contrary?: readonly string[];
  /** Gas exponent of a run from here; default 1.4. */
  readonly gasExponent?: number;
}

/** One body with one degree of freedom. */
export interface Body {
  /** First actuator's id names the body. */
  readonly id: string;
  readonly actuators: readonly string[];
  readonly type: 'linear' | 'rotating';
  /** m or rad; Infinity for motors. */
  readonly stroke: number;
  readonly begins: number;
  /** Seal friction, N. */
  readonly sealFriction: number;
  /** Positions at which something changes by itself: cams, cushions, stages; with words ("DV1 begins to close"). */
  readonly knots: readonly { readonly at: number; readonly words: string }[];
}

export interface Solution {
  readonly solved: boolean;
  /** Net id -> Pa gauge. */
  readonly pressures: Readonly<Record<string, number>>;
  readonly undetermined: Readonly<Record<string, { readonly low: number; readonly high: number }>>;
  /** `component.port` -> m3/s into the component; id of a piece with a loss of its own -> m3/s from its first side to its second. */
  readonly flows: Readonly<Record<string, number>>;
  readonly openings: Readonly<Record<string, number>>;
  readonly lifting: readonly string[];
  /** Body id -> m/s or rad/s. */
  readonly velocities: Readonly<Record<string, number>>;
  readonly positions: Readonly<Record<string, number>>;
  /** Body id -> N or N.m on the load, + outward: pressure force less seal friction and stop force. Locked: what it would press with against a stop. */
  readonly forces: Readonly<Record<string, number>>;
  readonly stopForces: Readonly<Record<string, number>>;
  readonly shaft: Readonly<Record<string, number>>;
  readonly oil: Readonly<Record<string, number>>;
  /** Accumulator id -> absolute gas pressure, Pa. */
  readonly gasPressures?: Readonly<Record<string, number>>;
  readonly stands: Readonly<Record<string, Stand>>;
  readonly bits: Readonly<Record<string, boolean>>;
  readonly diagnosis: readonly Diagnosis[];
  readonly remarks: readonly { readonly of: string; readonly words: string }[];
  readonly iterations: number;
}

/** What a run is stopped for. Rising: value goes above the threshold. */
export type Watch =
  | {
      readonly what: 'pressure';
      readonly net: string;
      readonly minus?: string;
      readonly threshold: number;
      readonly edge: 'rising' | 'falling';
    }
  | { readonly what: 'position'; readonly body: string; readonly threshold: number; readonly edge: 'rising' | 'falling' }
  | { readonly what: 'oil'; readonly accumulator: string; readonly threshold: number; readonly edge: 'rising' | 'falling' }
  /** Volume in the reservoir. */
  | { readonly what: 'level'; readonly reservoir: string; readonly threshold: number; readonly edge: 'rising' | 'falling' };

export interface RunReport {
  readonly time: number;
  /** Indices of the watches that fired; empty = `until` reached. */
  readonly fired: readonly number[];
  /** Bits, stops, shifts that happened on the way, in words. */
  readonly happened: readonly { readonly time: number; readonly of: string; readonly words: string }[];
  readonly failed?: string;
}

export interface MachineRun {
  readonly time: number;
  /** Solution at the present time (parameters as set now). */
  now(): Solution;
  /** The valve begins to shift now (closed crossover over `takes`; pilot pressure heeded). Proportional: opening follows a ramp. */
  shift(valve: string, to: Stand, ramp?: { readonly over: number; readonly from?: number }): void;
  /** Setting by coil, SI, ramped. Undefined = dead. */
  command(coil: string, to: number | undefined, ramp?: { readonly over: number; readonly from?: number }): void;
  drive(id: string, on: boolean): void;
  load(body: string, load: BodyLoad): void;
  gasExponent(n: number): void;
  /** Integrates to `until` or to the first watch, whichever comes first; memory bits, cams, load knots, stops and releases are located inside. */
  advance(until: number, watches: readonly Watch[], onStep?: (time: number, solution: Solution) => void): RunReport;
  readonly statistics: { readonly steps: number; readonly rejected: number; readonly newton: number; readonly events: number };
}

export interface Machine {
  readonly circuit: Circuit;
  readonly bodies: readonly Body[];
  readonly assumptions: readonly Assumption[];
  /** Component id -> rho g z, Pa: to be taken off the net's pressure (which is at oil level) at this component's ports; absent = 0. */
  readonly heads: Readonly<Record<string, number>>;
  /** Components (unknown or not computed) taken out, and nets that touch them, each with the reason. */
  readonly notComputed: Readonly<Record<string, string>>;
  /** One solve with everything as set. */
  solve(setting: Setting, near?: Solution): Solution;
  /** Solve with memory logic: unloading lifted, burst shut, piloted valves that cannot shift; remarks say what was found ("hunts between 38 and 45 bar"). */
  settle(setting: Setting, near?: Solution): Solution;
  /** d ln v / d ln s of a body's speed for each setting or size that can limit it. */
  sensitivities(
    setting: Setting,
    at: Solution,
    body: string,
  ): readonly { readonly of: string; readonly words: string; readonly share: number }[];
  /** A run in time from this setting. */
  start(setting: Setting, at: Solution): MachineRun;
  /** The same machine at another oil temperature (K). */
  readonly temperature: number;
}

export interface MachineOptions {
  /** Oil temperature, K; default the declared one. */
  readonly temperature?: number;
  /** Full dynamics: inertia and tight pressures. */
  readonly dynamics?: boolean;
}
