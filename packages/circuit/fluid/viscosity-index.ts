/** Viscosity index by ASTM D2270 / ISO 2909, and its inverse: the viscosity at 100 degC of an oil of known grade and index. All viscosities in mm2/s. */
import { FIRST_Y, H, L, STEP_Y } from './viscosity-index-table.ts';

/**
 * Above the table L and H are quadratics in Y, by ranges of Y. The last range is printed in the standard; the others are the standard's
 * equation form from memory, checked by their joints: they meet the table at 20 mm2/s, each other, and the printed range at 70 mm2/s within 0.1 %.
 */
const ABOVE: readonly {
  readonly upTo: number;
  readonly l: readonly [number, number, number];
  readonly h: readonly [number, number, number];
}[] = [
  { upTo: 22, l: [0.97256, 5.25, -0.98], h: [0.24504, 7.416, -16.73] },
  { upTo: 28, l: [0.91413, 7.4759, -21.82], h: [0.20323, 9.1267, -34.23] },
  { upTo: 40, l: [0.87031, 9.7157, -50.77], h: [0.18411, 10.1015, -46.75] },
  { upTo: 55, l: [0.84703, 12.6752, -133.31], h: [0.17029, 11.4866, -80.62] },
  { upTo: 70, l: [0.85921, 11.1009, -83.19], h: [0.1713, 11.368, -76.94] },
  { upTo: Number.POSITIVE_INFINITY, l: [0.8353, 14.67, -216], h: [0.1684, 11.85, -97] },
];
/** Below 2 mm2/s the index is not defined; the first range of the equation form is carried on, so that thin grades still get a viscosity. */
const BELOW = { l: [1.14673, 1.7576, -0.109], h: [0.84155, 1.5521, -0.077] } as const;

const quadratic = (c: readonly [number, number, number], y: number): number => (c[0] * y + c[1]) * y + c[2];

function table(values: readonly number[], y: number): number {
  const at = (y - FIRST_Y) / STEP_Y;
  const i = Math.min(Math.floor(at + 1e-9), values.length - 2);
  const low = values[i] ?? 0;
  const high = values[i + 1] ?? low;
  return low + (high - low) * (at - i);
}

/** L and H, mm2/s at 40 degC, for the viscosity y, mm2/s, at 100 degC. */
export function referenceOils(y: number): { readonly l: number; readonly h: number } {
  if (y < FIRST_Y) return { l: quadratic(BELOW.l, y), h: quadratic(BELOW.h, y) };
  if (y <= FIRST_Y + STEP_Y * (L.length - 1)) return { l: table(L, y), h: table(H, y) };
  const r = ABOVE.find((x) => y <= x.upTo) ?? ABOVE[ABOVE.length - 1];
  return r === undefined ? { l: 0, h: 0 } : { l: quadratic(r.l, y), h: quadratic(r.h, y) };
}

/** Viscosity index, not rounded; undefined below 2 mm2/s at 100 degC. Procedure A up to 100, B above. */
export function viscosityIndex(nu40: number, nu100: number): number | undefined {
  if (!(nu100 >= FIRST_Y) || !(nu40 > nu100)) return undefined;
  const { l, h } = referenceOils(nu100);
  if (nu40 >= h) return (100 * (l - nu40)) / (l - h);
  const n = Math.log10(h / nu40) / Math.log10(nu100);
  return (10 ** n - 1) / 0.00715 + 100;
}

/** Viscosity at 100 degC, mm2/s, of an oil with nu40 mm2/s at 40 degC and this viscosity index. Bisection on a function that rises with y. */
export function viscosityAt100(nu40: number, index: number): number {
  const n = index > 100 ? Math.log10(1 + 0.00715 * (index - 100)) : 0;
  const excess = (y: number): number => {
    const { l, h } = referenceOils(y);
    if (index <= 100) return l - ((l - h) * index) / 100 - nu40;
    return Math.log(Math.max(h, 1e-9) / nu40) - n * Math.log(y);
  };
  let low = 0.3;
  let high = 1000;
  for (let i = 0; i < 100; i++) {
    const middle = Math.sqrt(low * high);
    if (excess(middle) < 0) low = middle;
    else high = middle;
  }
  return Math.sqrt(low * high);
}
