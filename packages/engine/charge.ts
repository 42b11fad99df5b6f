/** What a node stores over its pressure: constant storage, oil with air in lines and chambers, gas charges. */
import type { Network } from './compile.ts';
import { curvePressure, curveVolume } from './gas.ts';
import type { GasCurve, GasSpec, OilSpec } from './network.ts';
import { positive, positiveSlope } from './smooth.ts';
import { ATMOSPHERE, GAS_EDGE } from './tolerances.ts';

/** Absolute pressure below which the air law runs on as a straight line, MPa. */
const THIN_AIR = 0.02;

/**
 * Compression of oil with free air from atmosphere to gauge p, as ln(V0/V), and its slope 1/K_e:
 * V/V0 = a (p0/p)^(1/n) + (1 - a) exp(-(p - p0)/K), absolute pressures; 1/K_e = -V'/V.
 */
export function compression(oil: OilSpec, gauge: number): { value: number; slope: number } {
  const absolute = gauge + ATMOSPHERE;
  const at = Math.max(absolute, THIN_AIR);
  const air = oil.air > 0 ? oil.air * (ATMOSPHERE / at) ** (1 / oil.exponent) : 0;
  const liquid = (1 - oil.air) * Math.exp((ATMOSPHERE - at) / oil.bulk);
  const volume = air + liquid;
  const slope = (air / (oil.exponent * at) + liquid / oil.bulk) / volume;
  return { value: -Math.log(volume) + (absolute - at) * slope, slope };
}

/**
 * The same as a table over the root of absolute pressure, cubic between points (error below 1e-9): a run asks for it at every node
 * in every iteration.
 */
export class CompressionTable {
  readonly values: Float64Array;
  readonly slopes: Float64Array;
  private readonly oil: OilSpec;
  value = 0;
  slope = 0;

  constructor(oil: OilSpec) {
    this.oil = oil;
    const count = TABLE_POINTS + 1;
    this.values = new Float64Array(count);
    this.slopes = new Float64Array(count);
    for (let i = 0; i < count; i++) {
      const s = TABLE_FROM + i * TABLE_STEP;
      const at = compression(oil, s * s - ATMOSPHERE);
      this.values[i] = at.value;
      this.slopes[i] = at.slope * 2 * s * TABLE_STEP;
    }
  }

  /** Leaves value and slope for gauge pressure p. */
  at(gauge: number): void {
    const absolute = gauge + ATMOSPHERE;
    const s = absolute > 0 ? Math.sqrt(absolute) : 0;
    const place = (s - TABLE_FROM) / TABLE_STEP;
    if (!(place >= 0 && place < TABLE_POINTS)) {
      const exact = compression(this.oil, gauge);
      this.value = exact.value;
      this.slope = exact.slope;
      return;
    }
    const i = Math.floor(place);
    const t = place - i;
    const v0 = this.values[i]!;
    const rise = this.values[i + 1]! - v0;
    const m0 = this.slopes[i]!;
    const a = m0 + this.slopes[i + 1]! - 2 * rise;
    const b = rise - m0 - a;
    this.value = v0 + t * (m0 + t * (b + t * a));
    this.slope = (m0 + t * (2 * b + 3 * t * a)) / (2 * s * TABLE_STEP);
  }
}
/** From 0.2 bar to 1000 bar absolute. */
const TABLE_FROM = 0.1415;
const TABLE_STEP = 0.005;
const TABLE_POINTS = 1975;

/** A gas charge with the base point from which p V^n holds. */
export interface Charge {
  readonly spec: GasSpec;
  /** Absolute MPa and gas volume L of the base point. */
  pressure: number;
  volume: number;
  exponent: number;
  /** Real gas instead of p V^n. */
  curve?: GasCurve | undefined;
}

/** Oil (L) in a charge at node gauge pressure p and its slope. Zero up to where the gas fills its volume, rounded over a hundredth of that. */
export function chargeOil(charge: Charge, gauge: number): { value: number; slope: number } {
  const { spec } = charge;
  const absolute = gauge - (spec.head ?? 0) + ATMOSPHERE;
  const curve = charge.curve;
  const empty = curve ? curvePressure(curve, spec.volume) : charge.pressure * (charge.volume / spec.volume) ** charge.exponent;
  const width = GAS_EDGE * empty;
  const excess = positive(absolute - empty, width);
  if (excess <= 0) return { value: 0, slope: 0 };
  const at = empty + excess;
  const by = positiveSlope(absolute - empty, width);
  if (curve) {
    const { volume, slope } = curveVolume(curve, at);
    return { value: spec.volume - volume, slope: -slope * by };
  }
  const volume = spec.volume * (empty / at) ** (1 / charge.exponent);
  return { value: spec.volume - volume, slope: (by * volume) / (charge.exponent * at) };
}

const tables = new WeakMap<OilSpec, CompressionTable>();
function tableOf(oil: OilSpec): CompressionTable {
  let table = tables.get(oil);
  if (!table) {
    table = new CompressionTable(oil);
    tables.set(oil, table);
  }
  return table;
}

/** Storage of all free nodes. Volumes of chambers are set once a step (`setPositions`). */
export class Storage {
  private readonly net: Network;
  private readonly constant: Float64Array;
  private readonly dead: Float64Array;
  /** Oil volume at each unknown now, L. */
  private readonly volume: Float64Array;
  readonly charges: Charge[];
  private readonly chargesAt: (Charge[] | undefined)[];
  private readonly pressed: CompressionTable | undefined;
  value = 0;
  slope = 0;

  constructor(net: Network, charges: Charge[]) {
    this.net = net;
    this.constant = new Float64Array(net.free);
    this.dead = new Float64Array(net.free);
    this.volume = new Float64Array(net.free);
    this.charges = charges;
    this.pressed = net.spec.oil ? tableOf(net.spec.oil) : undefined;
    this.chargesAt = new Array<Charge[] | undefined>(net.free).fill(undefined);
    for (let i = 0; i < net.free; i++) {
      const node = net.spec.nodes[net.nodeOf[i]!]!;
      this.constant[i] = Math.max(node.storage, 1e-9);
      this.dead[i] = node.volume ?? 0;
    }
    for (const charge of charges) {
      const i = net.unknownOf[charge.spec.node]!;
      if (i >= 0) this.chargesAt[i] = [...(this.chargesAt[i] ?? []), charge];
    }
  }

  /** Chamber volumes at these positions (areas in force from `area`), L. */
  setPositions(x: Float64Array, area: Float64Array): void {
    const { net, volume } = this;
    if (!net.spec.oil) return;
    volume.set(this.dead);
    for (let a = 0; a < x.length; a++) {
      const { low, high } = net.spec.actuators[a]!;
      for (let c = net.chamberStart[a]!; c < net.chamberStart[a + 1]!; c++) {
        const i = net.unknownOf[net.chamberNodes[c]!]!;
        const size = area[c]!;
        const left = size > 0 ? x[a]! - low : high - x[a]!;
        // Motors (no stops) enclose no volume of their own here: the caller counts it as dead volume.
        if (i >= 0 && left > 0 && left < Number.POSITIVE_INFINITY) volume[i]! += Math.abs(size) * left;
      }
    }
  }

  /** Stored volume (L) of an unknown at gauge pressure p, left in `value`, its slope in `slope`. */
  at(i: number, p: number): void {
    let value = this.constant[i]! * p;
    let slope = this.constant[i]!;
    const pressed = this.pressed;
    if (pressed && this.volume[i]! > 0) {
      pressed.at(p);
      value += this.volume[i]! * pressed.value;
      slope += this.volume[i]! * pressed.slope;
    }
    const charges = this.chargesAt[i];
    if (charges) {
      for (const charge of charges) {
        const held = chargeOil(charge, p);
        value += held.value;
        slope += held.slope;
      }
    }
    this.value = value;
    this.slope = slope;
  }

  /** Stored volumes of all unknowns at pressures y. */
  all(y: Float64Array, into: Float64Array): void {
    for (let i = 0; i < this.constant.length; i++) {
      this.at(i, y[i]!);
      into[i] = this.value;
    }
  }

  /** Takes the change of storage against `base`, times `over` (1/s), off the balances r, its slope off the Jacobian; returns the sum of squares. */
  stamp(y: Float64Array, base: Float64Array, over: number, r: Float64Array, j: Float64Array): number {
    const { constant, volume, chargesAt } = this;
    const { diagonal } = this.net;
    const pressed = this.pressed;
    const values = pressed?.values ?? NONE;
    const slopes = pressed?.slopes ?? NONE;
    let sum = 0;
    for (let i = 0; i < constant.length; i++) {
      const p = y[i]!;
      let value = constant[i]! * p;
      let slope = constant[i]!;
      const size = volume[i]!;
      if (size > 0 && pressed) {
        // The table's cubic, as in CompressionTable.at.
        const absolute = p + ATMOSPHERE;
        const s = absolute > 0 ? Math.sqrt(absolute) : 0;
        const place = (s - TABLE_FROM) / TABLE_STEP;
        if (place >= 0 && place < TABLE_POINTS) {
          const n = Math.floor(place);
          const t = place - n;
          const v0 = values[n]!;
          const rise = values[n + 1]! - v0;
          const m0 = slopes[n]!;
          const a = m0 + slopes[n + 1]! - 2 * rise;
          const b = rise - m0 - a;
          value += size * (v0 + t * (m0 + t * (b + t * a)));
          slope += (size * (m0 + t * (2 * b + 3 * t * a))) / (2 * s * TABLE_STEP);
        } else {
          pressed.at(p);
          value += size * pressed.value;
          slope += size * pressed.slope;
        }
      }
      const charges = chargesAt[i];
      if (charges !== undefined) {
        for (let c = 0; c < charges.length; c++) {
          const held = chargeOil(charges[c]!, p);
          value += held.value;
          slope += held.slope;
        }
      }
      const left = r[i]! - (value - base[i]!) * over;
      r[i] = left;
      j[diagonal[i]!]! -= slope * over;
      sum += left * left;
    }
    return sum;
  }
}

const NONE = new Float64Array(0);
