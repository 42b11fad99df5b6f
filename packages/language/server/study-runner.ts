/** Runs the study beside the server: one worker, the newest job wins, a running one is cut off by the next. Knows neither Node nor the web. */
import type { Circuit, Study } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';

export interface StudyJob {
  readonly circuit: Circuit;
  /** Texts of the documents the circuit comes from, for fixes. */
  readonly texts: Readonly<Record<string, string>>;
}
export interface StudyAnswer {
  readonly study: Study;
  /** What the rules find with the study at hand, fixes included. */
  readonly findings: readonly Finding[];
  /** Rules that broke down, for the log. */
  readonly failed?: string;
}

export interface StudyRunner {
  /** Resolves with the answer, or undefined where a newer job or `cancel` came first. Rejects only where the study itself broke down. */
  run(job: StudyJob): Promise<StudyAnswer | undefined>;
  /** Gives up what is running. */
  cancel(): void;
  dispose(): void;
}

/** What a worker of Node and one of the web have in common. */
export interface WorkerLike {
  post(message: WorkerRequest): void;
  onMessage(listener: (message: WorkerReply) => void): void;
  onError(listener: (reason: string) => void): void;
  terminate(): void;
}
export interface WorkerRequest {
  readonly id: number;
  readonly job: StudyJob;
}
export type WorkerReply = { readonly id: number; readonly answer: StudyAnswer } | { readonly id: number; readonly failed: string };

interface Running {
  readonly id: number;
  resolve(answer: StudyAnswer | undefined): void;
  reject(reason: Error): void;
}

/** A worker that is started at the first job and kept warm; a job that is overtaken costs its worker. */
export class WorkerRunner implements StudyRunner {
  readonly #start: () => WorkerLike | Promise<WorkerLike>;
  #worker: Promise<WorkerLike> | undefined;
  #running: Running | undefined;
  #next = 1;
  #disposed = false;

  constructor(start: () => WorkerLike | Promise<WorkerLike>) {
    this.#start = start;
  }

  async run(job: StudyJob): Promise<StudyAnswer | undefined> {
    if (this.#disposed) return undefined;
    this.cancel();
    const id = this.#next;
    this.#next += 1;
    const answer = new Promise<StudyAnswer | undefined>((resolve, reject) => {
      this.#running = { id, resolve, reject };
    });
    const worker = this.#warm();
    worker.then(
      (one) => {
        if (this.#running?.id === id) one.post({ id, job });
      },
      (reason: unknown) => this.#break(reason instanceof Error ? reason.message : String(reason), worker),
    );
    return answer;
  }

  cancel(): void {
    const running = this.#running;
    if (!running) return;
    this.#running = undefined;
    const worker = this.#worker;
    this.#worker = undefined;
    void worker?.then((one) => one.terminate()).catch(() => undefined);
    running.resolve(undefined);
  }

  dispose(): void {
    this.cancel();
    this.#disposed = true;
    const worker = this.#worker;
    this.#worker = undefined;
    void worker?.then((one) => one.terminate()).catch(() => undefined);
  }

  #warm(): Promise<WorkerLike> {
    if (this.#worker) return this.#worker;
    const worker: Promise<WorkerLike> = Promise.resolve()
      .then(() => this.#start())
      .then((one) => {
        one.onMessage((message) => this.#finish(message));
        one.onError((reason) => this.#break(reason, worker));
        return one;
      });
    this.#worker = worker;
    return worker;
  }

  #finish(message: WorkerReply): void {
    const running = this.#running;
    if (!running || running.id !== message.id) return;
    this.#running = undefined;
    if ('answer' in message) running.resolve(message.answer);
    else running.reject(new Error(message.failed));
  }

  /** The worker itself died: the next job gets a new one. */
  #break(reason: string, worker: Promise<WorkerLike>): void {
    if (this.#worker !== worker) return;
    this.#worker = undefined;
    void worker.then((one) => one.terminate()).catch(() => undefined);
    const running = this.#running;
    this.#running = undefined;
    running?.reject(new Error(reason));
  }
}

/** In the server's own thread: for clients that allow no worker. It blocks for as long as the study takes, so it waits for a quiet moment. */
export class InlineRunner implements StudyRunner {
  readonly #work: (job: StudyJob) => StudyAnswer;
  readonly #quiet: number;
  #cancel: (() => void) | undefined;

  /** @param quiet ms without a new job before it begins. */
  constructor(work: (job: StudyJob) => StudyAnswer, quiet = 400) {
    this.#work = work;
    this.#quiet = quiet;
  }

  run(job: StudyJob): Promise<StudyAnswer | undefined> {
    this.cancel();
    return new Promise((resolve, reject) => {
      const timer = setTimeout(() => {
        this.#cancel = undefined;
        try {
          resolve(this.#work(job));
        } catch (reason) {
          reject(reason instanceof Error ? reason : new Error(String(reason)));
        }
      }, this.#quiet);
      this.#cancel = () => {
        clearTimeout(timer);
        resolve(undefined);
      };
    });
  }

  cancel(): void {
    this.#cancel?.();
    this.#cancel = undefined;
  }

  dispose(): void {
    this.cancel();
  }
}
