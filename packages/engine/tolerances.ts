/** Every tolerance and constant of the core, each with its reason. Units as in network.ts. */

/** Laminar blend of a path, MPa: q = K d/(d^2 + DELTA^2)^(1/4). 0.1 bar: below it a real passage is laminar; small against any declared drop. */
export const DELTA = 0.01;
/** Width in which a one-sided law (check, relief) leaves zero, MPa. 0.01 bar: below what a gauge shows, wide enough for Newton. */
export const EPS = 1e-3;
/** Share of a band in which an opening rounds into 0 and into 1. */
export const BAND_EDGE = 0.05;
/** Share of its setting in which a compensated control rounds from orifice to setting. */
export const REGULATOR_EDGE = 0.01;
/** Relative width in which the smaller of two flows is rounded. */
export const MIN_EDGE = 0.02;
/** Least band of a relief, MPa (0.5 bar). */
export const LEAST_RELIEF_BAND = 0.05;

/** Speed at which friction has risen to 0.7 of its value, m/s or rad/s. A stalled rod then creeps 10 um/s, which is still. */
export const CREEP = 1e-5;
/** Viscous share of a body that has neither friction nor load, kN s/m per 1e-3 m2 of chamber: keeps an unloaded body determined. */
export const LEAST_DAMPING = 1e-6;

/** Pressure lost in the ports of a body at 1 m/s (1000 rad/s), MPa, growing with the square: 0.0001 bar, nothing in a machine; keeps a runaway finite. */
export const RUNAWAY = 1e-5;

/** Leakage floor across closable elements, L/s/MPa: 0.0006 L/min at 100 bar, a tenth of "still"; keeps closed volumes determined. */
export const FLOOR_STEADY = 1e-6;
/** The same in runs, where storage keeps volumes determined and the floor adds up over time. */
export const FLOOR_TIME = 1e-7;

/** Default pressure above which the fictitious outlet opens, MPa: above any rating of the trade. */
export const CEILING = 60;
/** Gauge pressure below which the fictitious supply opens, MPa: 0.3 bar absolute, where pumps no longer fill. */
export const FLOOR_PRESSURE = -0.07;
/** Conductance of both, L/s/MPa: an outlet of 10 L/s shows as 1 MPa. */
export const FICTITIOUS = 10;
export const CEILING_ONSET = 1;
export const SUPPLY_ONSET = 0.02;
/** Missing flow below which starvation is noise, L/s. */
export const STARVED_NOISE = 0.002;
/** Conductance above which two terminals count as joined, L/s/MPa: ten times the floor. */
export const OPEN_CONDUCTANCE = 1e-5;

/** Atmosphere, MPa absolute (101,325 Pa). */
export const ATMOSPHERE = 0.101325;
/** Share of the precharge over which a gas charge begins to take oil. */
export const GAS_EDGE = 0.01;

/** Newton: iterations, line search (Armijo), halvings, largest pressure change in one step (MPa). */
export const NEWTON_ITERATIONS = 25;
export const ARMIJO = 1e-4;
export const HALVINGS = 12;
export const PRESSURE_CAP = 20;
/** Converged: full step and largest change relative to 1 + |y| below TIGHT; or below LOOSE with residual below RESIDUAL. */
export const TIGHT = 1e-8;
export const LOOSE = 1e-5;
export const RESIDUAL = 1e-9;
/** Widening of all blends in the continuation, one stage each. */
export const SMOOTHING = [100, 10, 1] as const;
/** Pseudo-transient: iterations, first and largest pseudo time step (s), its growth bound. */
export const PSEUDO_ITERATIONS = 400;
export const PSEUDO_FIRST = 1e-3;
export const PSEUDO_LARGEST = 1e12;
/** Most Newton iterations in one steady solve over all stages: some milliseconds; beyond it there is no stable equilibrium. */
export const STEADY_BUDGET = 6000;

/** Sparse factors: a diagonal is a pivot when at least this share of its column; frozen pivots are renewed below the other. */
export const PIVOT_SHARE = 0.05;
export const PIVOT_STALE = 1e-3;

/** Location of events: position (m, rad) and pressure (MPa), and others in their unit. */
export const EVENT_POSITION = 1e-7;
export const EVENT_PRESSURE = 1e-6;
export const EVENT_OTHER = 1e-7;
