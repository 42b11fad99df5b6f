/** Rows of the table of measurements, and how a part hands them on: one JSON object a line of standard output. */

/** A figure with its spread (tenth to ninetieth part in a hundred) and what was asked of it. */
interface Measured {
  readonly what: string;
  readonly median: number;
  readonly low: number;
  readonly high: number;
  readonly count: number;
  readonly unit: 'ms' | 'x' | 'MB';
  readonly target?: number;
  /** The target is a least value (a ratio of speeds), not a greatest. */
  readonly atLeast?: boolean;
  readonly note?: string;
}
/** A measurement that could not be made here. */
interface Absent {
  readonly what: string;
  readonly why: string;
}
export type Row = Measured | Absent;

const quantile = (sorted: readonly number[], share: number): number =>
  sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? Number.NaN;
export const median = (values: readonly number[]): number =>
  quantile(
    [...values].sort((a, b) => a - b),
    0.5,
  );

export function row(
  what: string,
  values: readonly number[],
  unit: Measured['unit'],
  asked: { readonly target?: number; readonly atLeast?: boolean; readonly note?: string } = {},
): Row {
  const sorted = [...values].sort((a, b) => a - b);
  return {
    what,
    median: quantile(sorted, 0.5),
    low: quantile(sorted, 0.1),
    high: quantile(sorted, 0.9),
    count: values.length,
    unit,
    ...asked,
  };
}

export function emit(one: Row): void {
  console.log(JSON.stringify(one));
}

/** Processor time of this thread so far, ms: what others do on the machine does not count. */
export function spent(): number {
  const used = process.threadCpuUsage();
  return (used.user + used.system) / 1000;
}
