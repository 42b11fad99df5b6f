/** Compressibility factors of nitrogen, Z = p / (rho R T), by absolute pressure and temperature: data only. */
import type { Published } from './published-values.ts';

const SOURCE =
  'computed from the reference equation of Span, Lemmon, Jacobsen, Wagner, Yokozeki, J. Phys. Chem. Ref. Data 29 (2000) 1361 by an independent script that meets its published anchor state, 5.2555376 MPa at 138.8112 K and 10065.511 mol/m3';

/** degC */
export const TEMPERATURES = [20, 30, 40, 50] as const;
/** bar absolute: Z at each of TEMPERATURES */
export const COMPRESSIBILITY = {
  1: [0.9998, 0.9998, 0.9999, 1.0],
  25: [0.9954, 0.9975, 0.9992, 1.0007],
  50: [0.994, 0.9977, 1.001, 1.0038],
  75: [0.9957, 1.001, 1.0054, 1.0093],
  100: [1.0008, 1.0071, 1.0125, 1.0172],
  150: [1.0205, 1.0279, 1.0343, 1.0398],
  200: [1.0518, 1.059, 1.0652, 1.0705],
  250: [1.0924, 1.0984, 1.1036, 1.108],
  300: [1.1401, 1.1442, 1.1478, 1.1508],
  350: [1.1927, 1.1947, 1.1963, 1.1976],
  400: [1.2489, 1.2485, 1.248, 1.2473],
} as const;

export type NitrogenId = `n2z-${keyof typeof COMPRESSIBILITY}-${(typeof TEMPERATURES)[number]}`;

export const NITROGEN = Object.fromEntries(
  Object.entries(COMPRESSIBILITY).flatMap(([pressure, row]) =>
    row.map((value, i): [string, Published] => [
      `n2z-${pressure}-${TEMPERATURES[i]}`,
      {
        what: `compressibility factor of nitrogen at ${pressure} bar absolute and ${TEMPERATURES[i]} degC`,
        value,
        unit: '',
        within: 0.0003,
        kind: 'derived',
        source: SOURCE,
      },
    ]),
  ),
) as Record<NitrogenId, Published>;
