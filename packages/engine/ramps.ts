/** Parameters over time: straight ramps; their ends are breakpoints of the run. */

interface Ramp {
  readonly parameter: number;
  readonly from: number;
  readonly to: number;
  readonly start: number;
  readonly end: number;
}

export class Ramps {
  private active: Ramp[] = [];

  /** A new ramp of a parameter takes the place of what is left of earlier ones from its start on. */
  add(parameter: number, from: number, to: number, start: number, end: number): void {
    this.active = this.active.filter((ramp) => ramp.parameter !== parameter || ramp.end <= start);
    this.active.push({ parameter, from, to, start, end: Math.max(start, end) });
  }

  /** Ends all ramps of a parameter. */
  clear(parameter: number): void {
    this.active = this.active.filter((ramp) => ramp.parameter !== parameter);
  }

  get pending(): boolean {
    return this.active.length > 0;
  }

  /** Writes the values at a time to `parameters`; a ramp that starts just then only when `starting` (a step up to it ends before its jump). */
  apply(time: number, parameters: Float64Array, starting: boolean): void {
    for (const ramp of this.active) {
      if (time < ramp.start || (time === ramp.start && !starting)) continue;
      const share = ramp.end > ramp.start ? Math.min(1, (time - ramp.start) / (ramp.end - ramp.start)) : 1;
      parameters[ramp.parameter] = ramp.from + share * (ramp.to - ramp.from);
    }
  }

  /** Next start or end after a time; Infinity when there is none. */
  next(time: number): number {
    let next = Number.POSITIVE_INFINITY;
    for (const ramp of this.active) {
      if (ramp.start > time && ramp.start < next) next = ramp.start;
      if (ramp.end > time && ramp.end < next) next = ramp.end;
    }
    return next;
  }

  /** Forgets ramps that are over. */
  trim(time: number): void {
    if (this.active.length > 0) this.active = this.active.filter((ramp) => ramp.end > time);
  }
}
