/** The study's own thread in Node. */
import { parentPort } from 'node:worker_threads';
import { answerJob } from './study-job.ts';
import type { WorkerRequest } from './study-runner.ts';

parentPort?.on('message', (request: WorkerRequest) => parentPort?.postMessage(answerJob(request)));
