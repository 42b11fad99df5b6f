/** How figures are shown: three significant digits and the trade's exceptions, in the units of the circuit. */
import type { Dimension } from './dimension.ts';
import { fromSi } from './convert.ts';
import { unitOf } from './spelling.ts';
import type { Unit } from './units.ts';

export type Display = 'as written' | 'metric' | 'us';

export interface FormatOptions {
  readonly display?: Display;
  /** Units met most often in the text, for `as written`. */
  readonly units?: Readonly<Partial<Record<Dimension, string>>>;
  /** Unit of the one setting the value comes from; `as written` prefers it. */
  readonly unit?: string;
  /** The value is a place on a stroke: shown to 1 mm below 10 m. */
  readonly position?: boolean;
  /** Absolute pressure: shown in `bara` or `psia`; the value given is gauge. */
  readonly absolute?: boolean;
  /** More significant digits than the usual three. */
  readonly digits?: number;
}

const METRIC: Readonly<Record<Dimension, string>> = {
  ratio: '%',
  length: 'mm',
  area: 'cm2',
  volume: 'L',
  angle: 'deg',
  time: 's',
  velocity: 'mm/s',
  acceleration: 'm/s2',
  rotation: 'rpm',
  displacement: 'cm3/rev',
  flow: 'L/min',
  pressure: 'bar',
  force: 'kN',
  torque: 'N.m',
  energy: 'kJ',
  power: 'kW',
  mass: 'kg',
  inertia: 'kg.m2',
  density: 'kg/m3',
  viscosity: 'mm2/s',
  temperature: 'degC',
  'temperature difference': 'K',
  'power/temperature': 'kW/K',
  stiffness: 'N/mm',
  voltage: 'V',
  current: 'A',
};
const US: Readonly<Record<Dimension, string>> = {
  ratio: '%',
  length: 'in',
  area: 'in2',
  volume: 'gal',
  angle: 'deg',
  time: 's',
  velocity: 'in/s',
  acceleration: 'ft/s2',
  rotation: 'rpm',
  displacement: 'in3/rev',
  flow: 'gpm',
  pressure: 'psi',
  force: 'lbf',
  torque: 'lbf.in',
  energy: 'Btu',
  power: 'hp',
  mass: 'lb',
  inertia: 'lb.in2',
  density: 'lb/ft3',
  viscosity: 'cSt',
  temperature: 'degF',
  'temperature difference': 'R',
  'power/temperature': 'hp/R',
  stiffness: 'lbf/in',
  voltage: 'V',
  current: 'A',
};

/** The unit a figure of this dimension is shown in. */
export function displayUnit(dimension: Dimension, options: FormatOptions = {}): Unit {
  const { display = 'as written', units = {}, unit, absolute } = options;
  let symbol: string | undefined;
  if (display === 'metric') symbol = METRIC[dimension];
  else if (display === 'us') symbol = US[dimension];
  else {
    for (const candidate of [unit, units[dimension]]) {
      if (symbol === undefined && candidate !== undefined && unitOf(candidate)?.dimension === dimension) symbol = candidate;
    }
    symbol ??= (writtenInUs(units) ? US : METRIC)[dimension];
  }
  let chosen = unitOf(symbol) as Unit;
  if (dimension === 'pressure') {
    if (absolute === true) chosen = unitOf(chosen.system === 'us' ? 'psia' : 'bara') as Unit;
    else if (chosen.offset !== 0) chosen = unitOf(chosen.system === 'us' ? 'psi' : 'bar') as Unit;
  }
  return chosen;
}

/** A text whose units are mostly of the US system is answered in it where it says nothing of a dimension. */
function writtenInUs(units: Readonly<Partial<Record<Dimension, string>>>): boolean {
  let us = 0;
  let metric = 0;
  for (const symbol of Object.values(units)) {
    const system = unitOf(symbol)?.system;
    if (system === 'us') us++;
    if (system === 'metric') metric++;
  }
  return us > metric;
}

/** Rounds half away from zero to `decimals` (negative: tens, hundreds), free of binary artefacts such as 1.005. */
export function roundHalfAway(value: number, decimals: number): number {
  const size = Math.abs(value);
  const shifted = Number(shift(size, decimals));
  if (!Number.isFinite(shifted)) return value;
  // A value this close below a half is a half that binary could not hold.
  const rounded = Math.floor(shifted + 0.5 + shifted * 4 * Number.EPSILON);
  return Math.sign(value) * Number(shift(rounded, -decimals));
}

/** Decimal shift by exponent text, exact where a multiplication is not. */
function shift(value: number, by: number): string {
  const [digits = '0', exponent = '0'] = value.toExponential().split('e');
  return `${digits}e${Number(exponent) + by}`;
}

/** Decimals that show `digits` significant digits of a value. */
function decimalsFor(value: number, digits: number): number {
  if (value === 0) return 0;
  let magnitude = Math.floor(Math.log10(Math.abs(value)));
  // 9.996 rounds up to 10.0: one decimal fewer.
  if (Math.abs(roundHalfAway(value, digits - 1 - magnitude)) >= 10 ** (magnitude + 1)) magnitude++;
  return digits - 1 - magnitude;
}

/** Pressures below 10 bar are shown to 0.1 bar, Pa. */
const SMALL_PRESSURE = 1e6;
const PRESSURE_STEP = 1e4;

function usualDecimals(value: number, si: number, unit: Unit, options: FormatOptions): number {
  const digits = options.digits ?? 3;
  const usual = decimalsFor(value, digits);
  if (options.digits !== undefined) return usual;
  if (unit.dimension === 'time' && unit.symbol === 's' && Math.abs(roundHalfAway(value, 2)) < 10) return 2;
  if (options.position === true && unit.dimension === 'length' && Math.abs(si) < 10)
    return Math.max(0, Math.ceil(-Math.log10(1e-3 / unit.factor) - 1e-9));
  // Finer units than a kilopascal are chosen for small pressures and show them in full.
  if (unit.dimension === 'pressure' && Math.abs(value) < SMALL_PRESSURE / unit.factor && unit.factor >= 1000) {
    // A whole psi would be too coarse for a suction line: one decimal there, as long as three figures have one.
    if (unit.system === 'us') return Math.min(usual, Math.max(0, Math.ceil(-Math.log10(PRESSURE_STEP / unit.factor) - 1e-9) + 1));
    return Math.max(0, Math.ceil(-Math.log10(PRESSURE_STEP / unit.factor) - 1e-9));
  }
  return usual;
}

/** Digits beyond these are noise of the computation. */
const MOST_DECIMALS = 6;

function write(value: number, decimals: number, digits = 3): string {
  const shown = Math.min(Math.max(MOST_DECIMALS, digits), decimals);
  const rounded = roundHalfAway(value, shown);
  if (rounded === 0 && shown === Math.max(MOST_DECIMALS, digits)) return '0';
  return (rounded === 0 ? 0 : rounded).toFixed(Math.max(0, shown));
}

/** The unit's sign behind a number; percent and degrees of arc included. */
function suffix(unit: Unit): string {
  return ` ${unit.label ?? unit.symbol}`;
}

/** From here on an area is that of a reservoir, not of a piston: shown in m2 or ft2 where the text asks for no unit. m2 */
const LARGE_AREA = 0.1;

function largeArea(si: number, unit: Unit, options: FormatOptions): Unit {
  const { display = 'as written', units = {} } = options;
  const asked = display === 'as written' && (options.unit === unit.symbol || units.area === unit.symbol);
  if (unit.dimension !== 'area' || Math.abs(si) < LARGE_AREA || asked) return unit;
  return unitOf(unit.system === 'us' ? 'ft2' : 'm2') as Unit;
}

/** A time of seconds in a text that counts in minutes or hours reads in seconds: `1.75 s`, not `0.0292 min`. */
function shortTime(si: number, unit: Unit, options: FormatOptions): Unit {
  if (unit.dimension !== 'time' || unit.factor < 60 || Math.abs(si) >= unit.factor || options.unit === unit.symbol) return unit;
  return unitOf('s') as Unit;
}

/** A figure with its unit as people read it: `183 bar`, `4.23 s`, `-0.2 bar`. `si` is in the SI unit of `dimension` (pressure gauge). */
export function format(si: number, dimension: Dimension, options: FormatOptions = {}): string {
  const unit = shortTime(si, largeArea(si, displayUnit(dimension, options), options), options);
  if (Number.isNaN(si)) return 'not computed';
  if (!Number.isFinite(si)) return si > 0 ? 'unlimited' : '-unlimited';
  const value = fromSi(si, unit);
  return write(value, usualDecimals(value, si, unit, options), options.digits) + suffix(unit);
}

/** The number alone, as `format` shows it, and the unit it is in: for tables whose head names the unit. */
export function formatNumber(si: number, dimension: Dimension, options: FormatOptions = {}): string {
  const unit = displayUnit(dimension, options);
  if (!Number.isFinite(si)) return format(si, dimension, options);
  const value = fromSi(si, unit);
  return write(value, usualDecimals(value, si, unit, options), options.digits);
}

/** A value beside its bound, with as many digits as it takes to tell them apart: `9.996 bar` of `10 bar` is never shown as 10.0 of 10.0. */
export function formatAgainst(
  si: number,
  bound: number,
  dimension: Dimension,
  options: FormatOptions = {},
): { readonly value: string; readonly bound: string } {
  const shown = { value: format(si, dimension, options), bound: format(bound, dimension, options) };
  if (si === bound || !Number.isFinite(si) || !Number.isFinite(bound)) return shown;
  const told = (value: string, limit: string) => Math.sign(parseFloat(value) - parseFloat(limit)) === Math.sign(si - bound);
  if (told(shown.value, shown.bound)) return shown;
  for (let digits = 3; digits <= 15; digits++) {
    const value = format(si, dimension, { ...options, digits });
    const limit = format(bound, dimension, { ...options, digits })
      .replace(/(\.\d*?)0+(?= )/, '$1')
      .replace(/\.(?= )/, '');
    if (told(value, limit)) return { value, bound: limit };
  }
  return shown;
}
