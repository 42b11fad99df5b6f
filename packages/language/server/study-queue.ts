/** Which document's study runs: the one edited last comes first, an edit cuts off the study of the same text, another document's is put back. */
import type { Timers } from './coalesce.ts';
import type { StudyAnswer, StudyJob, StudyRunner } from './study-runner.ts';

/** A study that takes longer is given up, ms: figures that never come are worse than none. */
const LONGEST = 120_000;

export interface QueuedStudy {
  readonly uri: string;
  /** Made when its turn comes: the text may be newer then. Undefined = nothing to compute any more. */
  job(): StudyJob | undefined;
  done(answer: StudyAnswer, ms: number): void;
  failed(reason: string): void;
}

export class StudyQueue {
  readonly #runner: StudyRunner;
  readonly #timers: Timers;
  /** Next is last. */
  #waiting: QueuedStudy[] = [];
  #running: QueuedStudy | undefined;
  #disposed = false;

  constructor(runner: StudyRunner, timers: Timers) {
    this.#runner = runner;
    this.#timers = timers;
  }

  /** Asks for a study. `urgent`: its text is being edited, so it goes before all others. */
  ask(study: QueuedStudy, urgent: boolean): void {
    if (this.#disposed) return;
    this.#waiting = this.#waiting.filter((one) => one.uri !== study.uri);
    const running = this.#running;
    if (running && (running.uri === study.uri || urgent)) {
      if (running.uri !== study.uri && !this.#waiting.some((one) => one.uri === running.uri)) this.#waiting.push(running);
      this.#running = undefined;
      this.#runner.cancel();
    }
    if (urgent || running?.uri === study.uri) this.#waiting.push(study);
    else this.#waiting.unshift(study);
    this.#next();
  }

  /** Forgets a document. */
  drop(uri: string): void {
    this.#waiting = this.#waiting.filter((one) => one.uri !== uri);
    if (this.#running?.uri !== uri) return;
    this.#running = undefined;
    this.#runner.cancel();
    this.#next();
  }

  get idle(): boolean {
    return this.#running === undefined && this.#waiting.length === 0;
  }

  dispose(): void {
    this.#disposed = true;
    this.#waiting = [];
    this.#running = undefined;
    this.#runner.dispose();
  }

  #next(): void {
    if (this.#running) return;
    const study = this.#waiting.pop();
    if (!study) return;
    const job = study.job();
    if (!job) {
      this.#next();
      return;
    }
    this.#running = study;
    const began = this.#timers.now();
    const limit = this.#timers.set(() => {
      if (this.#running !== study) return;
      this.#running = undefined;
      this.#runner.cancel();
      study.failed(`not over after ${LONGEST / 1000} s`);
      this.#next();
    }, LONGEST);
    this.#runner.run(job).then(
      (answer) => {
        this.#timers.clear(limit);
        if (this.#running !== study) return;
        this.#running = undefined;
        if (answer) study.done(answer, this.#timers.now() - began);
        this.#next();
      },
      (reason: unknown) => {
        this.#timers.clear(limit);
        if (this.#running !== study) return;
        this.#running = undefined;
        study.failed(reason instanceof Error ? reason.message : String(reason));
        this.#next();
      },
    );
  }
}
