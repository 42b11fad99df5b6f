/** Gathers keystrokes: work is done once after a pause that grows with what the work costs, never later than `longest`. */

export interface Timers {
  set(action: () => void, ms: number): unknown;
  clear(handle: unknown): void;
  /** ms, monotone. */
  now(): number;
}

export const realTimers: Timers = {
  set: (action, ms) => setTimeout(action, ms),
  clear: (handle) => clearTimeout(handle as ReturnType<typeof setTimeout>),
  now: () => performance.now(),
};

export interface CoalesceOptions {
  /** Longest wait, ms. */
  readonly longest?: number;
  /** Share of the last run's cost to wait. */
  readonly share?: number;
  readonly timers?: Timers;
}

export class Coalescer {
  readonly #work: (key: string) => void;
  readonly #longest: number;
  readonly #share: number;
  readonly #timers: Timers;
  readonly #waiting = new Map<string, { readonly first: number; handle: unknown }>();
  #cost = 0;

  constructor(work: (key: string) => void, options: CoalesceOptions = {}) {
    this.#work = work;
    this.#longest = options.longest ?? 250;
    this.#share = options.share ?? 0.75;
    this.#timers = options.timers ?? realTimers;
  }

  /** Asks for work; a request that is already waiting is put off, but not beyond the longest wait since the first. */
  ask(key: string): void {
    const waiting = this.#waiting.get(key);
    const now = this.#timers.now();
    const first = waiting?.first ?? now;
    if (waiting) this.#timers.clear(waiting.handle);
    const pause = Math.min(this.#longest, this.#share * this.#cost);
    const left = Math.max(0, Math.min(pause, first + this.#longest - now));
    this.#waiting.set(key, { first, handle: this.#timers.set(() => this.now(key), left) });
  }

  /** True where work is waiting. */
  waits(key: string): boolean {
    return this.#waiting.has(key);
  }

  /** Does the waiting work at once (a hover or completion asks for the present text). */
  now(key: string): void {
    const waiting = this.#waiting.get(key);
    if (!waiting) return;
    this.#timers.clear(waiting.handle);
    this.#waiting.delete(key);
    const began = this.#timers.now();
    this.#work(key);
    this.#cost = this.#timers.now() - began;
  }

  drop(key: string): void {
    const waiting = this.#waiting.get(key);
    if (waiting) this.#timers.clear(waiting.handle);
    this.#waiting.delete(key);
  }

  dispose(): void {
    for (const key of [...this.#waiting.keys()]) this.drop(key);
  }
}
