/** The study's own thread in the web. */
import { answerJob } from './study-job.ts';
import type { WorkerReply, WorkerRequest } from './study-runner.ts';

interface Scope {
  onmessage: ((event: { readonly data: WorkerRequest }) => void) | null;
  postMessage(message: WorkerReply): void;
}
const scope = globalThis as unknown as Scope;
scope.onmessage = (event) => scope.postMessage(answerJob(event.data));
