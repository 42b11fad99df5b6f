/** Keystrokes are gathered: one piece of work a burst, never later than the longest wait. */
import { describe, expect, test } from 'vitest';
import { Coalescer, type Timers } from '../../packages/language/server/coalesce.ts';

/** A clock that a test turns by hand. */
class Clock implements Timers {
  time = 0;
  #next = 1;
  readonly #waiting = new Map<number, { readonly at: number; readonly action: () => void }>();
  set(action: () => void, ms: number): unknown {
    this.#next += 1;
    this.#waiting.set(this.#next, { at: this.time + ms, action });
    return this.#next;
  }
  clear(handle: unknown): void {
    this.#waiting.delete(handle as number);
  }
  now(): number {
    return this.time;
  }
  advance(ms: number): void {
    const end = this.time + ms;
    for (;;) {
      const due = [...this.#waiting].filter(([, one]) => one.at <= end).sort((a, b) => a[1].at - b[1].at)[0];
      if (!due) break;
      this.#waiting.delete(due[0]);
      this.time = Math.max(this.time, due[1].at);
      due[1].action();
    }
    this.time = end;
  }
}

function watched(cost: number, longest = 250): { clock: Clock; done: number[]; work: Coalescer } {
  const clock = new Clock();
  const done: number[] = [];
  const work = new Coalescer(
    () => {
      clock.time += cost;
      done.push(clock.time);
    },
    { timers: clock, longest },
  );
  return { clock, done, work };
}

describe('coalescing', () => {
  test('the first request is served at once', () => {
    const { clock, done, work } = watched(100);
    work.ask('a');
    clock.advance(0);
    expect(done).toEqual([100]);
  });

  test('a burst of keys is one piece of work', () => {
    const { clock, done, work } = watched(100);
    work.ask('a');
    clock.advance(0);
    for (let key = 0; key < 10; key += 1) {
      work.ask('a');
      clock.advance(10);
    }
    clock.advance(500);
    expect(done).toHaveLength(2);
  });

  test('steady typing does not put work off for ever', () => {
    const { clock, done, work } = watched(200, 250);
    work.ask('a');
    clock.advance(0);
    for (let key = 0; key < 30; key += 1) {
      work.ask('a');
      clock.advance(50);
    }
    expect(done.length).toBeGreaterThan(2);
  });

  test('a question about the text does the waiting work at once, and only once', () => {
    const { clock, done, work } = watched(10);
    work.ask('a');
    work.now('a');
    expect(done).toHaveLength(1);
    clock.advance(1000);
    expect(done).toHaveLength(1);
  });

  test('documents do not wait for one another', () => {
    const { clock, done, work } = watched(1);
    work.ask('a');
    work.ask('b');
    clock.advance(0);
    expect(done).toHaveLength(2);
  });

  test('what is dropped is not done', () => {
    const { clock, done, work } = watched(1);
    work.ask('a');
    work.drop('a');
    clock.advance(1000);
    expect(done).toEqual([]);
  });
});
