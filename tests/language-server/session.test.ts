/** The session: what is shown after any edits is what a fresh start would show; figures come behind the text and say so. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Study } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';
import { languageAnalyser } from '../../packages/language/server/language-analyser.ts';
import { Session } from '../../packages/language/server/session.ts';
import type { Timers } from '../../packages/language/server/coalesce.ts';
import type { StudyAnswer, StudyJob, StudyRunner } from '../../packages/language/server/study-runner.ts';
import { BENCH, URI } from './support/check.ts';

/** Nothing waits: what is asked for is done when the test says so. */
class Idle implements Timers {
  #waiting: { readonly action: () => void; dropped: boolean }[] = [];
  set(action: () => void, ms: number): unknown {
    const one = { action, dropped: false };
    // Limits never pass here.
    if (ms < 10_000) this.#waiting.push(one);
    return one;
  }
  clear(handle: unknown): void {
    (handle as { dropped: boolean }).dropped = true;
  }
  now(): number {
    return 0;
  }
  flush(): void {
    while (this.#waiting.length > 0) {
      const all = this.#waiting;
      this.#waiting = [];
      for (const one of all) if (!one.dropped) one.action();
    }
  }
}

/** Answers when the test says so. */
class Runner implements StudyRunner {
  readonly jobs: StudyJob[] = [];
  #resolve: ((answer: StudyAnswer | undefined) => void) | undefined;
  run(job: StudyJob): Promise<StudyAnswer | undefined> {
    this.jobs.push(job);
    return new Promise((resolve, reject) => {
      this.#resolve = resolve;
      this.#reject = reject;
    });
  }
  #reject: ((reason: Error) => void) | undefined;
  cut = 0;
  cancel(): void {
    if (this.#resolve) this.cut += 1;
    this.#resolve?.(undefined);
    this.#resolve = undefined;
  }
  dispose(): void {
    this.cancel();
  }
  async fail(reason: string): Promise<void> {
    this.#reject?.(new Error(reason));
    for (let i = 0; i < 5; i += 1) await Promise.resolve();
  }
  async answer(findings: readonly Finding[]): Promise<void> {
    const study: Study = {
      uri: URI,
      states: [],
      steps: [],
      cycles: [],
      requirements: [],
      assumptions: [],
      heat: {},
      spent: 0,
      notComputed: {},
    };
    this.#resolve?.({ study, findings });
    this.#resolve = undefined;
    for (let i = 0; i < 5; i += 1) await Promise.resolve();
  }
}

interface Shown {
  readonly version: number | undefined;
  readonly findings: readonly Finding[];
}
function start(): { session: Session; timers: Idle; runner: Runner; shown: Shown[]; logged: string[]; studied: number[] } {
  const timers = new Idle();
  const runner = new Runner();
  const shown: Shown[] = [];
  const logged: string[] = [];
  const studied: number[] = [];
  const session = new Session({
    analyser: languageAnalyser(),
    runner,
    readFile: () => Promise.resolve(undefined),
    publish: (_, version, findings) => shown.push({ version, findings }),
    studied: (_, version) => studied.push(version),
    log: (message) => logged.push(message),
    timers,
  });
  return { session, timers, runner, shown, logged, studied };
}

const computed = (text: string, word: string): Finding => ({
  code: 'A09',
  severity: 'warning',
  what: 'P1 turns against pressure at rest',
  origin: { uri: URI, start: text.indexOf(word), end: text.indexOf(word) + word.length },
  related: [],
  place: 'P1',
  fixes: [],
  computed: true,
});
const told = (findings: readonly Finding[]): string[] =>
  findings.map((one) => `${one.code} ${one.origin.start}-${one.origin.end} ${one.what}`);

describe('session', () => {
  test('after any edits the state is that of a fresh start', () => {
    const words = [
      'C1',
      'V1.A',
      ' to ',
      '(',
      ')',
      '{',
      '}',
      ',',
      '\n',
      'bar',
      '12',
      'pump P9 ()',
      '// x\n',
      '"',
      'energise SOL1',
      'step Z',
      ' ',
      '',
    ];
    const edit = fc.record({ at: fc.nat(BENCH.length), gone: fc.nat(12), put: fc.constantFrom(...words) });
    fc.assert(
      fc.property(fc.array(edit, { minLength: 1, maxLength: 6 }), (edits) => {
        const one = start();
        let text = BENCH;
        one.session.update(URI, 1, text);
        one.timers.flush();
        edits.forEach(({ at, gone, put }, index) => {
          const from = Math.min(at, text.length);
          text = text.slice(0, from) + put + text.slice(from + gone);
          one.session.update(URI, index + 2, text);
          if (index % 2 === 0) one.timers.flush();
        });
        one.timers.flush();
        const other = start();
        other.session.update(URI, 1, text);
        other.timers.flush();
        const [a, b] = [one.session.analysis(URI), other.session.analysis(URI)];
        expect(told(a?.findings ?? [])).toEqual(told(b?.findings ?? []));
        expect(a?.circuit).toEqual(b?.circuit);
        expect(a?.occurrences).toEqual(b?.occurrences);
        expect([...one.logged, ...other.logged]).toEqual([]);
      }),
      { numRuns: 40 },
    );
  }, 120_000);

  test('the text speaks first, the figures join when they are ready', async () => {
    const { session, timers, runner, shown, studied } = start();
    session.update(URI, 1, BENCH);
    timers.flush();
    expect(shown.at(-1)?.version).toBe(1);
    expect(session.analysis(URI)?.studied).toBeUndefined();
    await runner.answer([computed(BENCH, 'P1')]);
    expect(studied).toEqual([1]);
    expect(shown.at(-1)?.findings.map((one) => one.code)).toContain('A09');
    expect(session.analysis(URI)?.studied?.older).toBe(false);
  });

  test('while one types on, computed findings keep to their characters and figures are told as older', async () => {
    const { session, timers, runner, shown } = start();
    session.update(URI, 1, BENCH);
    timers.flush();
    await runner.answer([computed(BENCH, 'cylinder  C1')]);
    const text = `// one more line\n${BENCH}`;
    session.update(URI, 2, text);
    timers.flush();
    const moved = shown.at(-1)?.findings.find((one) => one.code === 'A09');
    expect(moved && text.slice(moved.origin.start, moved.origin.end)).toBe('cylinder  C1');
    expect(session.analysis(URI)?.studied?.older).toBe(true);
    await runner.answer([]);
    expect(shown.at(-1)?.findings.some((one) => one.code === 'A09')).toBe(false);
    expect(session.analysis(URI)?.studied?.older).toBe(false);
  });

  test('a study of an older text never overwrites', async () => {
    const { session, timers, runner, studied } = start();
    session.update(URI, 1, BENCH);
    timers.flush();
    session.update(URI, 2, BENCH.replace('120 bar', '130 bar'));
    timers.flush();
    expect(runner.jobs).toHaveLength(2);
    await runner.answer([]);
    expect(studied).toEqual([2]);
  });

  test('a key cuts off the running study; the next one waits for the pause', () => {
    const { session, timers, runner } = start();
    session.update(URI, 1, BENCH);
    timers.flush();
    expect([runner.jobs.length, runner.cut]).toEqual([1, 0]);
    session.update(URI, 2, `\n${BENCH}`);
    expect([runner.jobs.length, runner.cut]).toEqual([1, 1]);
    timers.flush();
    expect([runner.jobs.length, runner.cut]).toEqual([2, 1]);
  });

  test('a study that breaks down is logged and told in the hover, never a finding', async () => {
    const { session, timers, runner, shown, logged } = start();
    session.update(URI, 1, BENCH);
    timers.flush();
    expect(session.analysis(URI)?.figures).toBe('coming');
    await runner.fail('a hole in the ground');
    expect(logged).toEqual([`the study of ${URI} broke down: a hole in the ground`]);
    expect(session.analysis(URI)?.figures).toBe('broken');
    expect(shown.flatMap((one) => one.findings).some((one) => one.what.includes('hole'))).toBe(false);
    session.update(URI, 2, `${BENCH}\n`);
    expect(session.analysis(URI)?.figures).toBe('coming');
    session.compute = false;
    expect(session.analysis(URI)?.figures).toBe('off');
  });

  test('a file without a circuit is read, and says that nothing runs in it', () => {
    const { session, timers, runner } = start();
    session.update(URI, 1, 'check CV1 (passes 40 L/min at 3 bar)');
    timers.flush();
    expect(session.analysis(URI)?.figures).toBe('shelf');
    expect(runner.jobs).toEqual([]);
  });

  test('computing switched off: findings of figures go, nothing runs; on again: it runs', async () => {
    const { session, timers, runner, shown } = start();
    session.update(URI, 1, BENCH);
    timers.flush();
    await runner.answer([computed(BENCH, 'P1')]);
    session.compute = false;
    expect(shown.at(-1)?.findings.some((one) => one.computed)).toBe(false);
    session.update(URI, 2, `${BENCH}\n`);
    timers.flush();
    expect(runner.jobs).toHaveLength(1);
    session.compute = true;
    expect(runner.jobs).toHaveLength(2);
  });

  test('a question is answered for the text as it stands, whatever waits', () => {
    const { session, timers } = start();
    session.update(URI, 1, BENCH);
    timers.flush();
    session.update(URI, 2, BENCH.replace('C1 (bore', 'C7 (bore'));
    expect(session.analysis(URI)?.circuit?.components.some((one) => one.id === 'C7')).toBe(true);
  });
});
