/** Dimensions by trade name. SI unit of each in the comment. */
export const DIMENSIONS = [
  'ratio', // 1
  'length', // m
  'area', // m2
  'volume', // m3
  'angle', // rad
  'time', // s
  'velocity', // m/s
  'acceleration', // m/s2
  'rotation', // rad/s
  'displacement', // m3/rad (cm3/rev, in3/rev, cm3/rad)
  'flow', // m3/s
  'pressure', // Pa gauge
  'force', // N
  'torque', // N.m
  'energy', // J
  'power', // W
  'mass', // kg
  'inertia', // kg.m2
  'density', // kg/m3
  'viscosity', // m2/s
  'temperature', // K, a point
  'temperature difference', // K
  'power/temperature', // W/K
  'stiffness', // N/m
  'voltage', // V
  'current', // A
] as const;
export type Dimension = (typeof DIMENSIONS)[number];
