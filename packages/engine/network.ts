/**
 * What the engine is told: nodes, elements, actuators, gas charges. It knows no names and no text, only indices.
 * Units, mutually consistent: MPa (gauge unless said), L/s, 1e-3 m2, kN, m, s, L, t, kW; motors: rad, L/rad, kN.m.
 *
 * Parameters that change between or during solves live in one Float64Array (`Network.parameters`): an element
 * names them by index. A parameter may be ramped linearly over time in a run (`Transient.ramp`).
 *
 * Added since the first version, all optional: `NodeSpec.volume`, `NetworkSpec.oil` (chambers then store oil by position),
 * `ActuatorSpec.creep`, `ActuatorSpec.force`, `BypassRegulatorSpec.kBypass`, element type `custom`, `GasSpec.curve`. No breaking change.
 */

/** Index into the parameter array. */
export type Param = number;
/** Index of a node; node 0 is atmosphere at oil level (0 MPa, fixed). */
export type NodeIndex = number;

export interface NodeSpec {
  /** Constant storage, L/MPa (volume over stiffness, walls of hoses); at least 1e-9. Added to what `volume` and the chambers store. */
  readonly storage: number;
  /** Oil enclosed besides the chambers (lines, dead volumes), L; counts when `NetworkSpec.oil` is given: storage volume/K_e(p). */
  readonly volume?: number;
  /** Fixed pressure (reservoir level, atmosphere), MPa. */
  readonly fixed?: number;
  /** Rating above which the fictitious outlet opens; default 60 MPa. */
  readonly ceiling?: number;
}

/** Terminal head: pressure at the terminal = node pressure - head (rho g z), MPa; default 0. Given per element as `heads`, in the order of its terminals. */
interface Base {
  readonly heads?: readonly number[];
  /** Caller's tag, returned in diagnoses (closed elements, sources). */
  readonly tag: number;
}

/** q = y K d/(d2+delta2)^(1/4), both ways; y = parameter 0..1 (absent: 1). */
export interface PathSpec extends Base {
  readonly type: 'path';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly k: number;
  readonly opening?: Param;
}
/** a to b only: path on (d - crack) when positive; `opening` 0..1 as a factor (cushions, partly blocked). */
export interface CheckSpec extends Base {
  readonly type: 'check';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly k: number;
  readonly crack: number;
  readonly opening?: Param;
}
/** q = g d. g may be a parameter. */
export interface LaminarSpec extends Base {
  readonly type: 'laminar';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly g: number;
  readonly factor?: Param;
}
/**
 * Pressure-opened path: y = clamp((sum w_i p_i - set)/band) smoothed, q = y path(d).
 * Unloading, sequence, counterbalance, pilot check, reducing (set - p_A), relieving. With `oneWay` only a to b.
 * `bit`: when the parameter is > 0.5 the set `setWhenOn` replaces `set` (unloading lifted).
 */
export interface PilotedSpec extends Base {
  readonly type: 'piloted';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly k: number;
  readonly pilots: readonly { readonly node: NodeIndex; readonly weight: number; readonly head?: number }[];
  readonly set: Param;
  readonly band: Param;
  readonly bit?: Param;
  readonly setWhenOn?: Param;
  readonly oneWay: boolean;
}
/**
 * Relief: p_o = min(set + p_ref, p_x + vented) (no x: set + p_ref), p_e = min(set, p_x + vented); q_s = qN (p_P - p_o)/max(override p_e, 0.05 MPa);
 * q = smooth min(q_s, path(p_P - p_T)) when positive.
 */
export interface ReliefSpec extends Base {
  readonly type: 'relief';
  readonly p: NodeIndex;
  readonly t: NodeIndex;
  readonly ref: NodeIndex;
  readonly x?: NodeIndex;
  readonly set: Param;
  readonly vented: number;
  readonly override: number;
  readonly qN: number;
  readonly k: number;
}
/** Compensated flow control a to b: min(set, set sqrt(d/needs)) blended over 1 % of the set; b to a: path with the same set at needs. */
export interface RegulatorSpec extends Base {
  readonly type: 'regulator';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly set: Param;
  readonly needs: number;
}
/** Three-port (bypass) flow control: a to b as an orifice of `set` at needs; a to t opens so that p_a = p_b + needs. */
export interface BypassRegulatorSpec extends Base {
  readonly type: 'bypassRegulator';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly t: NodeIndex;
  readonly set: Param;
  readonly needs: number;
  /** K of the fully open path a to t, L/s at 1 MPa; default 20. */
  readonly kBypass?: number;
}
/** Metering edge with a compensator: q = min(command qN sqrt(k/dpN), path) from a to b. */
export interface CompensatedEdgeSpec extends Base {
  readonly type: 'compensatedEdge';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly k: number;
  readonly opening: Param;
  readonly limit: number;
}
/** Path whose opening is piecewise linear in an actuator's position (cam valves, cushions); knots must be breakpoints of the actuator. */
export interface CamPathSpec extends Base {
  readonly type: 'camPath';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly k: number;
  readonly actuator: number;
  readonly at: readonly number[];
  readonly opening: readonly number[];
  readonly factor?: Param;
  readonly oneWay?: boolean;
}
/** Cushion: oil leaving (a to b) passes an orifice K = kMin + 19 kMin (s/L)2 within L of a stop, free otherwise and when entering. */
export interface CushionSpec extends Base {
  readonly type: 'cushion';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly actuator: number;
  readonly end: 'retracted' | 'extended';
  readonly length: number;
  readonly kMin: number;
  readonly kFree: number;
}
/**
 * Pump s to p. Out of p: qth running stroke - g (p_P - p_S); leak to `l` if given, else back to s.
 * stroke = 1, or clamp((comp - (p_P - p_ref))/compBand) not below `smallest`, and with `sensing` also clamp((p_LS + sensing - p_P)/0.2 MPa).
 */
export interface PumpSpec extends Base {
  readonly type: 'pump';
  readonly s: NodeIndex;
  readonly p: NodeIndex;
  readonly l?: NodeIndex;
  readonly qth: number;
  readonly leak: number;
  /** 0 standing, 1 turning (or a speed ratio). */
  readonly running: Param;
  readonly compensator?: {
    readonly set: Param;
    readonly band: Param;
    readonly smallest: number;
    readonly x?: NodeIndex;
    readonly xAdds?: number;
  };
  readonly sensing?: { readonly ls: NodeIndex; readonly margin: number };
}
/** Tube or hose with loss: Churchill in all regimes + minor losses; flow is an unknown. nu in m2/s, rho kg/m3, lengths in m. */
export interface LineSpec extends Base {
  readonly type: 'line';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly bore: number;
  readonly length: number;
  readonly roughness: number;
  readonly minor: number;
  readonly nu: number;
  readonly rho: number;
}
/** Gear divider: q_i = n V_i + g_i (p_P - p_i), torque balance p_P = sum share_i p_i + friction (Q/QN)2. */
export interface GearDividerSpec extends Base {
  readonly type: 'gearDivider';
  readonly p: NodeIndex;
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly share: readonly [number, number];
  readonly g: readonly [number, number];
  readonly friction: number;
  readonly qN: number;
}
export interface SpoolDividerSpec extends Base {
  readonly type: 'spoolDivider';
  readonly p: NodeIndex;
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly share: readonly [number, number];
  readonly error: number;
  readonly drop: number;
  readonly qN: number;
  readonly combines: boolean;
}
export interface IntensifierSpec extends Base {
  readonly type: 'intensifier';
  readonly p: NodeIndex;
  readonly a: NodeIndex;
  readonly t: NodeIndex;
  readonly ratio: number;
}
/** The higher of a, b is joined to c; in proportion within 0.01 MPa. */
export interface ShuttleSpec extends Base {
  readonly type: 'shuttle';
  readonly a: NodeIndex;
  readonly b: NodeIndex;
  readonly c: NodeIndex;
  readonly k: number;
}

/**
 * An element with a law of its own, for tests and for kinds still to come. `evaluate` gets the pressures of `nodes` (terminals first, then
 * sensed nodes), then the position of `actuator` if given; it writes the flow INTO the element at each terminal (L/s) and the derivatives,
 * row by row over all inputs. The one element that cannot be structured-cloned.
 */
export interface CustomSpec extends Base {
  readonly type: 'custom';
  readonly nodes: readonly NodeIndex[];
  readonly terminals: number;
  readonly actuator?: number;
  readonly evaluate: (inputs: Float64Array, parameters: Float64Array, flows: Float64Array, gradient: Float64Array) => void;
}

export type ElementSpec =
  | PathSpec
  | CheckSpec
  | LaminarSpec
  | PilotedSpec
  | ReliefSpec
  | RegulatorSpec
  | BypassRegulatorSpec
  | CompensatedEdgeSpec
  | CamPathSpec
  | CushionSpec
  | PumpSpec
  | LineSpec
  | GearDividerSpec
  | SpoolDividerSpec
  | IntensifierSpec
  | ShuttleSpec
  | CustomSpec;

/** Force over position: piecewise linear, end values hold; a jump is two knots at one position. Set per solve or per step. */
export interface ForceTable {
  readonly at: readonly number[];
  readonly force: readonly number[];
}

/** A body with one degree of freedom: a cylinder rod, several rigidly joined, a motor shaft, a semi-rotary actuator. */
export interface ActuatorSpec {
  readonly tag: number;
  /** Chambers pressing on it: + area pushes outward (forward). Area 1e-3 m2 or L/rad. `areaSteps`: telescopic, from position at[i] on area[i]. */
  readonly chambers: readonly {
    readonly node: NodeIndex;
    readonly area: number;
    readonly head?: number;
    readonly areaSteps?: { readonly at: readonly number[]; readonly area: readonly number[] };
  }[];
  /** Stops; -Infinity/Infinity for a motor. m or rad. */
  readonly low: number;
  readonly high: number;
  /** t or t.m2; used in full dynamics only. */
  readonly mass: number;
  /** Spring or other fixed force over position, + outward, kN. */
  readonly spring?: ForceTable;
  /** Friction that depends on pressure: coefficient times |pA - pB| (motor mechanical loss), kN per MPa. */
  readonly pressureFriction?: number;
  /** Spring-applied brake: friction torque (1 - p/opens), nothing from `opens` on, p at a chamber of area 0 that only senses. kN, MPa. */
  readonly brake?: { readonly chamber: number; readonly torque: number; readonly opens: number };
  /** Speed within which friction rises to its full value, m/s or rad/s; default 1e-5. */
  readonly creep?: number;
  /** A force of its own, kN, + outward, as a function of position and speed: writes [force, d/dx, d/dv]. For tests and kinds to come. */
  readonly force?: (position: number, velocity: number, out: Float64Array) => void;
}

/** Oil as a spring: stiffness of the air-free oil, MPa; free air by volume at 1 atm, 0..1; polytropic exponent of that air. */
export interface OilSpec {
  readonly bulk: number;
  readonly air: number;
  readonly exponent: number;
}

/** Gas charge at a node: p V^n = const, absolute. */
export interface GasSpec {
  readonly tag: number;
  readonly node: NodeIndex;
  readonly head?: number;
  /** Gas volume without oil, L. */
  readonly volume: number;
  /** MPa absolute at the fluid's temperature. */
  readonly precharge: number;
  /** Real gas: absolute pressure over gas volume; replaces p V^n (see `nitrogenCurve`). */
  readonly curve?: GasCurve;
}
/** Points of a monotone gas law: absolute MPa rising, L falling. */
export interface GasCurve {
  readonly pressure: readonly number[];
  readonly volume: readonly number[];
}

export interface NetworkSpec {
  readonly nodes: readonly NodeSpec[];
  readonly elements: readonly ElementSpec[];
  readonly actuators: readonly ActuatorSpec[];
  readonly gas: readonly GasSpec[];
  readonly parameters: number;
  /** When given, oil volumes and chambers store by K_e(p) with air; without it only `NodeSpec.storage` counts. */
  readonly oil?: OilSpec;
}

/** Loads on one actuator as in force now; replaced between solves and at events. */
export interface LoadState {
  /** Fixed on the rod, + outward, kN over m; added up. */
  readonly fixed: readonly ForceTable[];
  /** Opposes motion outward / inward, >= 0, kN over m. */
  readonly resistOut: readonly ForceTable[];
  readonly resistIn: readonly ForceTable[];
  /** Coulomb, both ways, kN. */
  readonly friction: number;
}
