/** The server as a web worker. The study runs in a second worker; where the browser refuses one, in this one in a quiet moment. */
import { BrowserMessageReader, BrowserMessageWriter, createConnection } from 'vscode-languageserver/browser';
import type { Host } from './host.ts';
import { languageAnalyser } from './language-analyser.ts';
import type { InitializationOptions } from './protocol.ts';
import { startServer } from './server.ts';
import { workJob } from './study-job.ts';
import {
  InlineRunner,
  WorkerRunner,
  type StudyAnswer,
  type StudyJob,
  type StudyRunner,
  type WorkerLike,
  type WorkerReply,
  type WorkerRequest,
} from './study-runner.ts';

interface WebWorker {
  onmessage: ((event: { readonly data: WorkerReply }) => void) | null;
  onerror: ((event: { readonly message?: string }) => void) | null;
  postMessage(message: WorkerRequest): void;
  terminate(): void;
}
declare const Worker: (new (address: string) => WebWorker) | undefined;

/** A worker inside a worker must come from the same origin: the script is fetched and handed over as a blob. */
async function startWorker(address: string): Promise<WorkerLike> {
  if (typeof Worker === 'undefined') throw new Error('this browser starts no worker from a worker');
  const answer = await fetch(address);
  if (!answer.ok) throw new Error(`${address}: ${answer.status}`);
  const blob = URL.createObjectURL(new Blob([await answer.text()], { type: 'text/javascript' }));
  const worker = new Worker(blob);
  URL.revokeObjectURL(blob);
  return {
    post: (message) => worker.postMessage(message),
    onMessage: (listener) => {
      worker.onmessage = (event) => listener(event.data);
    },
    onError: (listener) => {
      worker.onerror = (event) => listener(event.message ?? 'the worker ended');
    },
    terminate: () => worker.terminate(),
  };
}

/** Tries the worker; where it cannot be started, or ends before it ever answered, the study moves into this thread for good. */
class WebRunner implements StudyRunner {
  readonly #inline = new InlineRunner(workJob);
  readonly #worker: WorkerRunner | undefined;
  #refused = false;
  #proved = false;

  constructor(address: string | undefined) {
    if (address === undefined) this.#refused = true;
    else this.#worker = new WorkerRunner(() => startWorker(address));
  }

  async run(job: StudyJob): Promise<StudyAnswer | undefined> {
    if (this.#refused || !this.#worker) return this.#inline.run(job);
    try {
      const answer = await this.#worker.run(job);
      if (answer) this.#proved = true;
      return answer;
    } catch (reason) {
      // A study that breaks down in a worker that works would break down here too.
      if (this.#proved) throw reason;
      this.#refused = true;
      return this.#inline.run(job);
    }
  }

  cancel(): void {
    this.#worker?.cancel();
    this.#inline.cancel();
  }

  dispose(): void {
    this.#worker?.dispose();
    this.#inline.dispose();
  }
}

const host: Host = { study: (options: InitializationOptions) => new WebRunner(options.studyWorker) };

const scope = globalThis as unknown as ConstructorParameters<typeof BrowserMessageReader>[0];
startServer(createConnection(new BrowserMessageReader(scope), new BrowserMessageWriter(scope)), host, languageAnalyser());
