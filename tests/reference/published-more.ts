/** Published values of oils, orifices, pipes, heat and charges: data only, joined to the rest in published-values.ts. */
import type { Published } from './published-values.ts';

/** Mid-points of the classes of kinematic viscosity at 40 degC, mm2/s, by grade. */
export const MIDPOINTS = {
  2: 2.2,
  3: 3.2,
  5: 4.6,
  7: 6.8,
  10: 10,
  15: 15,
  22: 22,
  32: 32,
  46: 46,
  68: 68,
  100: 100,
  150: 150,
  220: 220,
  320: 320,
  460: 460,
  680: 680,
  1000: 1000,
  1500: 1500,
} as const;

export type GradeId = `vg-${keyof typeof MIDPOINTS}`;

export const GRADES = Object.fromEntries(
  Object.entries(MIDPOINTS).map(([grade, value]): [string, Published] => [
    `vg-${grade}`,
    {
      what: `mid-point of ISO VG ${grade} at 40 degC`,
      value,
      unit: 'mm2/s',
      within: 0,
      kind: 'source',
      source: 'ISO 3448 table (as reproduced on a public lubricants page)',
    },
  ]),
) as Record<GradeId, Published>;

export const MORE = {
  'cyl-17': {
    what: 'large-piston area to raise 800 lbf with 40 lbf on 4 in2',
    value: 80,
    unit: 'in2',
    within: 0.0001,
    kind: 'source',
    source: 'US Army TM 1-1500-204-23-2, p. 2-3 (public domain)',
  },
  'cyl-18': {
    what: 'small-piston stroke for 10 in at 20:1',
    value: 200,
    unit: 'in',
    within: 0.0001,
    kind: 'source',
    source: 'US Army TM 1-1500-204-23-2, p. 2-3 (public domain)',
  },
  'pow-03': {
    what: 'constant 1714 (231 in3/gal, 550 ft lb/s/hp)',
    value: 1714.2857,
    unit: 'psi*gpm/hp',
    within: 1e-6,
    kind: 'derived',
    source: 'derived',
  },
  'pow-04': {
    what: '1 bar x 600 L/min',
    value: 1.0,
    unit: 'kW',
    within: 1e-9,
    kind: 'derived',
    source: 'derived',
  },
  'fri-04': {
    what: 'laminar f at Re 1548',
    value: 0.042,
    unit: '',
    within: 0.02,
    kind: 'source-steps',
    source:
      "Esposito, 'Fluid Power with Applications' (edition not recorded), Example 4-5; problem data and solution steps in a public textbook-companion repository; value = result of those steps, evaluated here",
  },
  'fri-06': {
    what: 'explicit (Swamee-Jain) f at Re 60000, rr 0.0023',
    value: 0.027,
    unit: '',
    within: 0.02,
    kind: 'source',
    source: 'README of a public package',
  },
  'fri-07': {
    what: 'Colebrook f, water in 2 in pipe',
    value: 0.0174,
    unit: '',
    within: 0.005,
    kind: 'source',
    source: "Cengel & Cimbala, 'Fluid Mechanics', Example 8-3 (public companion)",
  },
  'fri-09': {
    what: 'head loss, oil in cast iron',
    value: 117,
    unit: 'm of oil',
    within: 0.02,
    kind: 'source',
    source: "White, 'Fluid Mechanics', Example 6.7 (f=0.0225, 117 m) [from memory]",
  },
  'fri-col-1e+06-0.01': {
    what: 'Colebrook Darcy f',
    value: 0.0379,
    unit: '',
    within: 0.006,
    kind: 'source',
    source: "public R package test, values attributed there to an engineering reference site's Colebrook table",
  },
  'ori-01': {
    what: 'orifice flow Q=38.1 C A sqrt(dp/SG)',
    value: 252,
    unit: 'gpm',
    within: 0.005,
    kind: 'source-steps',
    source:
      "Esposito, 'Fluid Power with Applications' (edition not recorded), Example 8-4; problem data and solution steps in a public textbook-companion repository; value = result of those steps, evaluated here",
  },
  'ori-02': {
    what: 'flow-control Cv',
    value: 2.37,
    unit: 'gpm/sqrt(psi)',
    within: 0.003,
    kind: 'source-steps',
    source:
      "Esposito, 'Fluid Power with Applications' (edition not recorded), Example 8-5; problem data and solution steps in a public textbook-companion repository; value = result of those steps, evaluated here",
  },
  'ori-03': {
    what: 'flow-control Kv (L/min per sqrt kPa)',
    value: 3.43,
    unit: 'L/min/sqrt(kPa)',
    within: 0.003,
    kind: 'source-steps',
    source:
      "Esposito, 'Fluid Power with Applications' (edition not recorded), Example 8-5; problem data and solution steps in a public textbook-companion repository; value = result of those steps, evaluated here",
  },
  'hea-01': {
    what: 'heat over 4 h',
    value: 30528,
    unit: 'Btu',
    within: 1e-5,
    kind: 'source',
    source:
      "Sullivan, 'Fluid Power: Theory and Applications', 4th ed., Example 12.1 (p. 290); data and printed answer in a public textbook-companion repository",
  },
  'hea-05': {
    what: 'heat-exchanger rating',
    value: 21566,
    unit: 'Btu/h',
    within: 0.002,
    kind: 'source-steps',
    source:
      "Esposito, 'Fluid Power with Applications' (edition not recorded), Example 11-4 (computed from solution steps; the book rounds to a standard rating); problem data and solution steps in a public textbook-companion repository; value = result of those steps, evaluated here",
  },
  'vis-04': {
    what: 'viscosity index, procedure A',
    value: 92,
    unit: '',
    within: 0,
    kind: 'source',
    source: 'ASTM D2270 / ISO 2909 worked example (clause 5.1.4: L=119.94, H=69.48 -> 92.43 -> 92)',
  },
  'vis-05': {
    what: 'viscosity index, procedure B',
    value: 156,
    unit: '',
    within: 0,
    kind: 'source',
    source: 'ASTM D2270 / ISO 2909 worked example (clause 6.1.4(1): H=28.97, N=0.14708 -> 156.37 -> 156)',
  },
  'vis-06': {
    what: 'viscosity index, procedure B',
    value: 111,
    unit: '',
    within: 0,
    kind: 'source',
    source: 'ASTM D2270 / ISO 2909 worked example (clause 6.1.4(2)) [from memory] (nu100 and answer)',
  },
  'vis-07': {
    what: 'D2270 table L, H at Y=8.86 by interpolation: L',
    value: 119.94,
    unit: 'mm2/s',
    within: 0.0005,
    kind: 'source',
    source: 'ASTM D2270 / ISO 2909 worked example (clause 5.1.4)',
  },
  'vis-08': {
    what: 'D2270 H at Y=8.86',
    value: 69.48,
    unit: 'mm2/s',
    within: 0.0005,
    kind: 'source',
    source: 'ASTM D2270 / ISO 2909 worked example (clause 5.1.4)',
  },
  'acc-08': {
    what: 'real-gas isothermal yield at 20 C',
    value: 4.26,
    unit: 'L',
    within: 0.001,
    kind: 'derived',
    source:
      'derived from the reference equation of state for nitrogen (Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361; the one used by the NIST WebBook)',
  },
  'acc-09': {
    what: 'real-gas isentropic discharge after isothermal charge to 200 bar g',
    value: 2.189,
    unit: 'L',
    within: 0.001,
    kind: 'derived',
    source: 'derived, same equation of state; the gas ends at -33.4 degC, an ideal one of n = 1.4 would give 2.874 L',
  },
  'acc-11': {
    what: 'same, real nitrogen',
    value: 101.27,
    unit: 'bar',
    within: 0.0005,
    kind: 'derived',
    source: 'derived, reference equation of state',
  },
} as const satisfies Record<string, Published>;
