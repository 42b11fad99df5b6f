/** Preferred numbers of the trade, as data with where they come from, and the next one up. */

export interface Series {
  readonly title: string;
  /** Unit of the values (a symbol of the unit table); empty: plain numbers. */
  readonly unit: string;
  /** Ascending. */
  readonly values: readonly number[];
  /** Members that the standard gives in brackets: valid, but not first choice. */
  readonly second?: readonly number[];
  readonly standard: string;
  /** How sure the list is. */
  readonly status: 'standard' | 'published table' | 'from memory' | 'common practice';
  readonly note?: string;
}

const R10 = [1, 1.25, 1.6, 2, 2.5, 3.15, 4, 5, 6.3, 8] as const;

export const SERIES = {
  bore: {
    title: 'cylinder bores',
    unit: 'mm',
    values: [8, 10, 12, 16, 20, 25, 32, 40, 50, 63, 80, 90, 100, 110, 125, 140, 160, 180, 200, 220, 250, 280, 320, 360, 400, 450, 500],
    second: [90, 110, 140, 180, 220, 280, 360, 450],
    standard: 'ISO 3320',
    status: 'from memory',
    note: '25 mm to 200 mm agree with a published summary of ISO 6020',
  },
  rod: {
    title: 'piston rod diameters',
    unit: 'mm',
    values: [
      4, 5, 6, 8, 10, 12, 14, 16, 18, 20, 22, 25, 28, 32, 36, 40, 45, 50, 56, 63, 70, 80, 90, 100, 110, 125, 140, 160, 180, 200, 220, 250,
      280, 320, 360, 400, 450,
    ],
    standard: 'ISO 3320',
    status: 'from memory',
  },
  stroke: {
    title: 'cylinder strokes',
    unit: 'mm',
    values: [25, 50, 80, 100, 125, 160, 200, 250, 320, 400, 500, 630, 800, 1000, 1250, 1600, 2000, 2500],
    standard: 'ISO 4393',
    status: 'from memory',
    note: 'above 500 mm continued by R10',
  },
  pressure: {
    title: 'nominal pressures',
    unit: 'bar',
    values: [2.5, 4, 6.3, 8, 10, 12.5, 16, 20, 25, 31.5, 40, 50, 63, 80, 100, 125, 160, 200, 250, 315, 350, 400, 420, 500, 630, 800, 1000],
    second: [8, 12.5, 20, 31.5, 50, 80, 125, 200, 315, 350, 420, 500, 800],
    standard: 'ISO 2944',
    status: 'from memory',
    note: '350 bar and 420 bar are usual ratings of the trade outside the R10 series',
  },
  motorMetric: {
    title: 'electric motor ratings',
    unit: 'kW',
    values: [
      0.06, 0.09, 0.12, 0.18, 0.25, 0.37, 0.55, 0.75, 1.1, 1.5, 2.2, 3, 3.7, 4, 5.5, 7.5, 11, 15, 18.5, 22, 30, 37, 45, 55, 75, 90, 110,
      132, 150, 160, 185, 200, 220, 250, 280, 300, 315,
    ],
    second: [3.7],
    standard: 'IEC 60072-1',
    status: 'from memory',
    note: '0.37 kW to 90 kW agree with a published motor table',
  },
  motorUs: {
    title: 'electric motor ratings',
    unit: 'hp',
    values: [1, 1.5, 2, 3, 5, 7.5, 10, 15, 20, 25, 30, 40, 50, 60, 75, 100, 125, 150, 200, 250, 300],
    standard: 'NEMA MG 1',
    status: 'published table',
  },
  motorSpeed: {
    title: 'loaded speeds of four-pole motors',
    unit: 'rpm',
    values: [1450, 1750],
    standard: '50 Hz and 60 Hz mains',
    status: 'common practice',
  },
  hose: {
    title: 'hose bores',
    unit: 'mm',
    values: [6.3, 8, 10, 12.5, 16, 19, 25, 31.5, 38, 51],
    standard: 'ISO 4397',
    status: 'from memory',
  },
  r5: { title: 'R5', unit: '', values: [1, 1.6, 2.5, 4, 6.3], standard: 'ISO 3', status: 'standard' },
  r10: { title: 'R10', unit: '', values: [...R10], standard: 'ISO 3', status: 'standard' },
} as const satisfies Record<string, Series>;
export type SeriesName = keyof typeof SERIES;

/** Steel tube, outside diameter x wall, mm (EN 10305-4, ISO 10763; from memory). */
export const TUBES: readonly { readonly outside: number; readonly wall: number }[] = [
  [6, 1],
  [6, 1.5],
  [8, 1],
  [8, 1.5],
  [8, 2],
  [10, 1],
  [10, 1.5],
  [10, 2],
  [12, 1],
  [12, 1.5],
  [12, 2],
  [15, 1.5],
  [15, 2],
  [16, 1.5],
  [16, 2],
  [16, 2.5],
  [18, 1.5],
  [20, 2],
  [20, 2.5],
  [20, 3],
  [22, 1.5],
  [22, 2],
  [25, 2.5],
  [25, 3],
  [28, 2],
  [30, 3],
  [30, 4],
  [35, 2],
  [35, 3],
  [38, 4],
  [38, 5],
  [42, 2],
  [42, 3],
].map(([outside = 0, wall = 0]) => ({ outside, wall }));

/** Rods usually made for a bore, smallest and largest, mm (160 bar series; from memory). */
export const RODS_OF_BORE: Readonly<Record<number, readonly [least: number, greatest: number]>> = {
  25: [12, 18],
  32: [14, 22],
  40: [18, 28],
  50: [22, 36],
  63: [28, 45],
  80: [36, 56],
  100: [45, 70],
  125: [56, 90],
  160: [70, 110],
  200: [90, 140],
};

/** Values a hair below a preferred one still take it. */
const HAIR = 1e-9;

export interface PreferredOptions {
  /** Leave out the members a standard gives in brackets. */
  readonly firstChoiceOnly?: boolean;
}

/** The values of a series, second choices left out if asked. */
export function preferredValues(name: SeriesName, options: PreferredOptions = {}): readonly number[] {
  const series: Series = SERIES[name];
  return options.firstChoiceOnly === true ? series.values.filter((value) => !(series.second ?? []).includes(value)) : series.values;
}

/**
 * The smallest preferred value that is at least `value` (both in the series' own unit). R5 and R10 go on through all decades.
 * Nothing above the end of a list.
 */
export function nextPreferred(name: SeriesName, value: number, options: PreferredOptions = {}): number | undefined {
  if (!Number.isFinite(value)) return undefined;
  const values = preferredValues(name, options);
  if (name !== 'r5' && name !== 'r10') return values.find((candidate) => candidate >= value * (1 - HAIR));
  if (value <= 0) return undefined;
  const decade = Math.floor(Math.log10(value) + 1e-12);
  for (const step of [decade, decade + 1]) {
    for (const candidate of values) {
      const scaled = Number(`${candidate}e${step}`);
      if (scaled >= value * (1 - HAIR)) return scaled;
    }
  }
  return undefined;
}
