export interface Value {
  /** SI. Equal where the value is determined. */
  readonly low: number;
  readonly high: number;
  /** "Drill.Out at 315 mm, 4.20 s". */
  readonly at: string;
  /** s after the entry of the place, where known. */
  readonly since?: number;
  /** Which passage or variant it belongs to: a series in time is one. */
  readonly series: number;
  /** From the run over time (else a steady point). */
  readonly run?: boolean;
  /** s, in the run. */
  readonly time?: number;
}

export interface Observed {
  readonly place: string;
  readonly values: readonly Value[];
  /** Why something could not be decided there. */
  readonly problems: readonly string[];
  /** Things to say beside the verdict: "24 of 96 variants". */
  readonly notes?: readonly string[];
}

export const value = (
  at: string,
  amount: number,
  more: { readonly since?: number; readonly series?: number; readonly run?: boolean; readonly time?: number } = {},
): Value => ({
  low: amount,
  high: amount,
  at,
  series: more.series ?? 0,
  ...(more.since === undefined ? {} : { since: more.since }),
  ...(more.run === undefined ? {} : { run: more.run }),
  ...(more.time === undefined ? {} : { time: more.time }),
});
