/** The unit table: every unit the notation knows, with its exact definition. Data only; a row is one unit. */
import type { Dimension } from './dimension.ts';

export interface Unit {
  /** As the notation writes it; unique. */
  readonly symbol: string;
  /** Other spellings that mean the same (generated spellings such as superscripts come on top, see spelling.ts). */
  readonly aliases: readonly string[];
  readonly dimension: Dimension;
  /** SI value of one unit: si = value * factor + offset. */
  readonly factor: number;
  /** SI value at zero of this unit (temperature points, absolute pressures); 0 for all others. */
  readonly offset: number;
  readonly system: 'metric' | 'us' | 'both';
  /** One line: what it is and how it is defined. */
  readonly about: string;
  /** As shown to people, where it differs from the symbol. */
  readonly label?: string;
}

/** Standard atmosphere, Pa (ISO 2533): absolute pressure = gauge pressure + this. */
export const ATMOSPHERE = 101325;
/** Standard acceleration of free fall, m/s2 (ISO 80000-3, exact). */
export const GRAVITY = 9.80665;

// International yard and pound agreement of 1959: both exact.
const INCH = 0.0254;
const POUND = 0.45359237;
const FOOT = 12 * INCH;
const POUND_FORCE = POUND * GRAVITY;
const PSI = POUND_FORCE / (INCH * INCH);
const CUBIC_INCH = INCH ** 3;
const GALLON = 231 * CUBIC_INCH;
const UK_GALLON = 4.54609e-3;
const HORSEPOWER = 550 * FOOT * POUND_FORCE;
const REVOLUTION = 2 * Math.PI;
const DEGREE = Math.PI / 180;
/** One rankine (one degree Fahrenheit of difference), K. */
const RANKINE = 5 / 9;
/** International Table British thermal unit, J. */
const BTU = 1055.05585262;

type Row = readonly [
  symbol: string,
  aliases: string,
  dimension: Dimension,
  factor: number,
  system: Unit['system'],
  about: string,
  offset?: number,
  label?: string,
];

const ROWS: readonly Row[] = [
  ['%', 'percent', 'ratio', 0.01, 'both', 'per cent'],

  ['um', 'micron', 'length', 1e-6, 'metric', 'micrometre', 0, 'µm'],
  ['mm', '', 'length', 1e-3, 'metric', 'millimetre'],
  ['cm', '', 'length', 1e-2, 'metric', 'centimetre'],
  ['m', '', 'length', 1, 'metric', 'metre'],
  ['in', '', 'length', INCH, 'us', 'inch, 25.4 mm exactly'],
  ['ft', '', 'length', FOOT, 'us', 'foot, 12 in'],

  ['mm2', '', 'area', 1e-6, 'metric', 'square millimetre'],
  ['cm2', '', 'area', 1e-4, 'metric', 'square centimetre'],
  ['m2', '', 'area', 1, 'metric', 'square metre'],
  ['in2', 'sqin', 'area', INCH * INCH, 'us', 'square inch'],
  ['ft2', 'sqft', 'area', FOOT * FOOT, 'us', 'square foot'],

  ['mm3', '', 'volume', 1e-9, 'metric', 'cubic millimetre'],
  ['cm3', 'cc ccm', 'volume', 1e-6, 'metric', 'cubic centimetre'],
  ['mL', 'ml', 'volume', 1e-6, 'metric', 'millilitre, 1 cm3'],
  ['L', 'l dm3', 'volume', 1e-3, 'metric', 'litre, 1 dm3'],
  ['m3', '', 'volume', 1, 'metric', 'cubic metre'],
  ['in3', 'cuin', 'volume', CUBIC_INCH, 'us', 'cubic inch'],
  ['ft3', 'cuft', 'volume', FOOT ** 3, 'us', 'cubic foot'],
  ['gal', 'USgal', 'volume', GALLON, 'us', 'US gallon, 231 in3 (the imperial gallon is UKgal)'],
  ['qt', 'USqt', 'volume', GALLON / 4, 'us', 'US liquid quart, a quarter of a US gallon'],
  ['UKgal', 'impgal', 'volume', UK_GALLON, 'us', 'imperial gallon, 4.54609 L'],

  ['deg', '°', 'angle', DEGREE, 'both', 'degree of arc', 0, '°'],
  ['rad', '', 'angle', 1, 'both', 'radian'],
  ['rev', '', 'angle', REVOLUTION, 'both', 'revolution, 360 deg'],

  ['us', '', 'time', 1e-6, 'both', 'microsecond', 0, 'µs'],
  ['ms', '', 'time', 1e-3, 'both', 'millisecond'],
  ['s', 'sec', 'time', 1, 'both', 'second'],
  ['min', '', 'time', 60, 'both', 'minute'],
  ['h', '', 'time', 3600, 'both', 'hour'],

  ['mm/s', '', 'velocity', 1e-3, 'metric', 'millimetre per second'],
  ['cm/s', '', 'velocity', 1e-2, 'metric', 'centimetre per second'],
  ['m/s', '', 'velocity', 1, 'metric', 'metre per second'],
  ['mm/min', '', 'velocity', 1e-3 / 60, 'metric', 'millimetre per minute'],
  ['m/min', '', 'velocity', 1 / 60, 'metric', 'metre per minute'],
  ['km/h', '', 'velocity', 1 / 3.6, 'metric', 'kilometre per hour'],
  ['in/s', '', 'velocity', INCH, 'us', 'inch per second'],
  ['in/min', 'ipm', 'velocity', INCH / 60, 'us', 'inch per minute'],
  ['ft/s', 'fps', 'velocity', FOOT, 'us', 'foot per second'],
  ['ft/min', 'fpm', 'velocity', FOOT / 60, 'us', 'foot per minute'],

  ['mm/s2', '', 'acceleration', 1e-3, 'metric', 'millimetre per second squared'],
  ['m/s2', '', 'acceleration', 1, 'metric', 'metre per second squared'],
  ['in/s2', '', 'acceleration', INCH, 'us', 'inch per second squared'],
  ['ft/s2', '', 'acceleration', FOOT, 'us', 'foot per second squared'],

  ['rpm', 'rev/min r/min', 'rotation', REVOLUTION / 60, 'both', 'revolution per minute'],
  ['rev/s', 'rps', 'rotation', REVOLUTION, 'both', 'revolution per second'],
  ['rad/s', '', 'rotation', 1, 'both', 'radian per second'],
  ['deg/s', '°/s', 'rotation', DEGREE, 'both', 'degree per second', 0, '°/s'],

  ['cm3/rev', 'cc/rev ccm/rev', 'displacement', 1e-6 / REVOLUTION, 'metric', 'cubic centimetre per revolution'],
  ['mL/rev', 'ml/rev', 'displacement', 1e-6 / REVOLUTION, 'metric', 'millilitre per revolution'],
  ['L/rev', 'l/rev', 'displacement', 1e-3 / REVOLUTION, 'metric', 'litre per revolution'],
  ['in3/rev', '', 'displacement', CUBIC_INCH / REVOLUTION, 'us', 'cubic inch per revolution'],
  ['cm3/rad', 'cc/rad', 'displacement', 1e-6, 'metric', 'cubic centimetre per radian'],
  ['L/rad', 'l/rad', 'displacement', 1e-3, 'metric', 'litre per radian'],
  ['m3/rad', '', 'displacement', 1, 'metric', 'cubic metre per radian'],
  ['in3/rad', '', 'displacement', CUBIC_INCH, 'us', 'cubic inch per radian'],

  ['L/min', 'l/min lpm LPM dm3/min', 'flow', 1e-3 / 60, 'metric', 'litre per minute'],
  ['L/s', 'l/s', 'flow', 1e-3, 'metric', 'litre per second'],
  ['L/h', 'l/h', 'flow', 1e-3 / 3600, 'metric', 'litre per hour'],
  ['cm3/min', 'cc/min', 'flow', 1e-6 / 60, 'metric', 'cubic centimetre per minute'],
  ['cm3/s', 'cc/s', 'flow', 1e-6, 'metric', 'cubic centimetre per second'],
  ['mL/min', 'ml/min', 'flow', 1e-6 / 60, 'metric', 'millilitre per minute'],
  ['m3/h', '', 'flow', 1 / 3600, 'metric', 'cubic metre per hour'],
  ['m3/min', '', 'flow', 1 / 60, 'metric', 'cubic metre per minute'],
  ['m3/s', '', 'flow', 1, 'metric', 'cubic metre per second'],
  ['gpm', 'gal/min USgpm GPM', 'flow', GALLON / 60, 'us', 'US gallon per minute (the imperial one is UKgpm)'],
  ['gal/h', 'gph', 'flow', GALLON / 3600, 'us', 'US gallon per hour'],
  ['UKgpm', 'UKgal/min impgpm', 'flow', UK_GALLON / 60, 'us', 'imperial gallon per minute'],
  ['in3/min', 'cuin/min', 'flow', CUBIC_INCH / 60, 'us', 'cubic inch per minute'],
  ['in3/s', 'cuin/s', 'flow', CUBIC_INCH, 'us', 'cubic inch per second'],
  ['ft3/min', 'cfm', 'flow', FOOT ** 3 / 60, 'us', 'cubic foot per minute'],
  ['ft3/s', 'cfs', 'flow', FOOT ** 3, 'us', 'cubic foot per second'],

  ['bar', 'barg', 'pressure', 1e5, 'metric', 'bar, gauge; 100 kPa'],
  ['mbar', '', 'pressure', 100, 'metric', 'millibar, gauge'],
  ['bara', '', 'pressure', 1e5, 'metric', 'bar, absolute: gauge + 1.01325 bar', -ATMOSPHERE],
  ['Pa', '', 'pressure', 1, 'metric', 'pascal, gauge; N/m2'],
  ['kPa', '', 'pressure', 1e3, 'metric', 'kilopascal, gauge'],
  ['MPa', '', 'pressure', 1e6, 'metric', 'megapascal, gauge; 10 bar'],
  ['GPa', '', 'pressure', 1e9, 'metric', 'gigapascal; 10 000 bar'],
  ['N/mm2', '', 'pressure', 1e6, 'metric', 'newton per square millimetre, gauge; 10 bar'],
  ['kgf/cm2', '', 'pressure', GRAVITY * 1e4, 'metric', 'technical atmosphere, gauge; 0.980665 bar'],
  ['psi', 'psig lbf/in2', 'pressure', PSI, 'us', 'pound-force per square inch, gauge'],
  ['psia', '', 'pressure', PSI, 'us', 'pound-force per square inch, absolute: gauge + 1.01325 bar', -ATMOSPHERE],
  ['ksi', '', 'pressure', 1000 * PSI, 'us', 'thousand psi, gauge'],
  ['inHg', '', 'pressure', 3386.389, 'us', 'conventional inch of mercury, gauge (a vacuum is negative)'],

  ['N', '', 'force', 1, 'metric', 'newton'],
  ['daN', '', 'force', 10, 'metric', 'decanewton'],
  ['kN', '', 'force', 1e3, 'metric', 'kilonewton'],
  ['MN', '', 'force', 1e6, 'metric', 'meganewton'],
  ['kgf', 'kp', 'force', GRAVITY, 'metric', 'kilogram-force, 9.80665 N'],
  ['lbf', '', 'force', POUND_FORCE, 'us', 'pound-force: one pound under 9.80665 m/s2'],
  ['klbf', 'kip', 'force', 1000 * POUND_FORCE, 'us', 'thousand pounds-force'],
  ['tonf', '', 'force', 2000 * POUND_FORCE, 'us', 'US (short) ton-force, 2000 lbf'],

  ['N.m', 'Nm', 'torque', 1, 'metric', 'newton metre'],
  ['kN.m', 'kNm', 'torque', 1e3, 'metric', 'kilonewton metre'],
  ['N.mm', 'Nmm', 'torque', 1e-3, 'metric', 'newton millimetre'],
  ['kgf.m', 'kpm', 'torque', GRAVITY, 'metric', 'kilogram-force metre'],
  ['lbf.in', 'in.lbf', 'torque', POUND_FORCE * INCH, 'us', 'pound-force inch'],
  ['lbf.ft', 'ft.lbf', 'torque', POUND_FORCE * FOOT, 'us', 'pound-force foot'],

  ['J', '', 'energy', 1, 'metric', 'joule'],
  ['kJ', '', 'energy', 1e3, 'metric', 'kilojoule'],
  ['MJ', '', 'energy', 1e6, 'metric', 'megajoule'],
  ['Wh', '', 'energy', 3600, 'metric', 'watt hour'],
  ['kWh', '', 'energy', 3.6e6, 'metric', 'kilowatt hour'],
  ['Btu', 'BTU', 'energy', BTU, 'us', 'International Table British thermal unit, 1055.05585262 J'],

  ['W', '', 'power', 1, 'metric', 'watt'],
  ['kW', '', 'power', 1e3, 'metric', 'kilowatt'],
  ['MW', '', 'power', 1e6, 'metric', 'megawatt'],
  ['hp', 'HP', 'power', HORSEPOWER, 'us', 'mechanical horsepower, 550 ft.lbf/s (the metric one is PS)'],
  ['PS', '', 'power', 75 * GRAVITY, 'metric', 'metric horsepower, 75 kgf.m/s'],
  ['Btu/h', 'BTU/h', 'power', BTU / 3600, 'us', 'International Table British thermal unit per hour'],

  ['g', '', 'mass', 1e-3, 'metric', 'gram'],
  ['kg', '', 'mass', 1, 'metric', 'kilogram'],
  ['t', '', 'mass', 1e3, 'metric', 'tonne, 1000 kg'],
  ['lb', 'lbm', 'mass', POUND, 'us', 'pound, 0.45359237 kg exactly'],
  ['oz', '', 'mass', POUND / 16, 'us', 'ounce, a sixteenth of a pound'],
  ['ton', '', 'mass', 2000 * POUND, 'us', 'US (short) ton, 2000 lb (the tonne is t)'],
  ['slug', '', 'mass', POUND_FORCE / FOOT, 'us', 'slug, 1 lbf.s2/ft'],

  ['kg.m2', '', 'inertia', 1, 'metric', 'kilogram metre squared'],
  ['kg.cm2', '', 'inertia', 1e-4, 'metric', 'kilogram centimetre squared'],
  ['lb.in2', 'lbm.in2', 'inertia', POUND * INCH * INCH, 'us', 'pound inch squared'],
  ['lb.ft2', 'lbm.ft2', 'inertia', POUND * FOOT * FOOT, 'us', 'pound foot squared'],
  ['slug.ft2', 'lbf.ft.s2', 'inertia', POUND_FORCE * FOOT, 'us', 'slug foot squared'],

  ['kg/m3', '', 'density', 1, 'metric', 'kilogram per cubic metre'],
  ['kg/L', 'kg/l kg/dm3', 'density', 1e3, 'metric', 'kilogram per litre'],
  ['g/cm3', 'g/mL', 'density', 1e3, 'metric', 'gram per cubic centimetre'],
  ['lb/ft3', 'lbm/ft3', 'density', POUND / FOOT ** 3, 'us', 'pound per cubic foot'],
  ['lb/in3', 'lbm/in3', 'density', POUND / CUBIC_INCH, 'us', 'pound per cubic inch'],
  ['lb/gal', 'lbm/gal', 'density', POUND / GALLON, 'us', 'pound per US gallon'],

  ['mm2/s', '', 'viscosity', 1e-6, 'metric', 'square millimetre per second'],
  ['cSt', '', 'viscosity', 1e-6, 'both', 'centistokes, 1 mm2/s'],
  ['St', 'cm2/s', 'viscosity', 1e-4, 'metric', 'stokes, 1 cm2/s'],
  ['m2/s', '', 'viscosity', 1, 'metric', 'square metre per second'],
  ['in2/s', '', 'viscosity', INCH * INCH, 'us', 'square inch per second'],
  ['ft2/s', '', 'viscosity', FOOT * FOOT, 'us', 'square foot per second'],

  ['degC', '℃', 'temperature', 1, 'metric', 'degree Celsius, a point on the scale (a difference is K)', 273.15, '°C'],
  ['degF', '℉', 'temperature', RANKINE, 'us', 'degree Fahrenheit, a point on the scale (a difference is R)', 459.67 * RANKINE, '°F'],
  ['K', '', 'temperature difference', 1, 'metric', 'kelvin, a difference of temperature'],
  ['R', 'degR', 'temperature difference', RANKINE, 'us', 'rankine, a difference of one degree Fahrenheit'],

  ['W/K', '', 'power/temperature', 1, 'metric', 'watt per kelvin'],
  ['kW/K', '', 'power/temperature', 1e3, 'metric', 'kilowatt per kelvin'],
  ['hp/R', '', 'power/temperature', HORSEPOWER / RANKINE, 'us', 'horsepower per rankine'],
  ['Btu/h/R', 'BTU/h/R', 'power/temperature', BTU / 3600 / RANKINE, 'us', 'British thermal unit per hour and rankine'],

  ['N/m', '', 'stiffness', 1, 'metric', 'newton per metre'],
  ['N/mm', 'kN/m', 'stiffness', 1e3, 'metric', 'newton per millimetre'],
  ['kN/mm', '', 'stiffness', 1e6, 'metric', 'kilonewton per millimetre'],
  ['lbf/in', '', 'stiffness', POUND_FORCE / INCH, 'us', 'pound-force per inch'],
  ['lbf/ft', '', 'stiffness', POUND_FORCE / FOOT, 'us', 'pound-force per foot'],

  ['mV', '', 'voltage', 1e-3, 'both', 'millivolt'],
  ['V', '', 'voltage', 1, 'both', 'volt'],
  ['mA', '', 'current', 1e-3, 'both', 'milliampere'],
  ['A', '', 'current', 1, 'both', 'ampere'],
];

export const UNITS: readonly Unit[] = ROWS.map(([symbol, aliases, dimension, factor, system, about, offset = 0, label]) => ({
  symbol,
  aliases: aliases === '' ? [] : aliases.split(' '),
  dimension,
  factor,
  offset,
  system,
  about,
  ...(label === undefined ? {} : { label }),
}));

/** The SI unit of each dimension, for exports: value `si` carries this unit. */
export const SI_UNIT: Readonly<Record<Dimension, string>> = {
  ratio: '1',
  length: 'm',
  area: 'm2',
  volume: 'm3',
  angle: 'rad',
  time: 's',
  velocity: 'm/s',
  acceleration: 'm/s2',
  rotation: 'rad/s',
  displacement: 'm3/rad',
  flow: 'm3/s',
  pressure: 'Pa',
  force: 'N',
  torque: 'N.m',
  energy: 'J',
  power: 'W',
  mass: 'kg',
  inertia: 'kg.m2',
  density: 'kg/m3',
  viscosity: 'm2/s',
  temperature: 'K',
  'temperature difference': 'K',
  'power/temperature': 'W/K',
  stiffness: 'N/m',
  voltage: 'V',
  current: 'A',
};
