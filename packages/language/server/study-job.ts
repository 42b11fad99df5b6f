/** One study and what the rules say of it: the work of the study's thread. */
import { checkCircuit, computeStudy } from './engines.ts';
import type { StudyAnswer, StudyJob, WorkerReply, WorkerRequest } from './study-runner.ts';

/** Throws where the study itself breaks down; the caller says so. */
export function workJob(job: StudyJob): StudyAnswer {
  const { circuit, texts } = job;
  const study = computeStudy(circuit);
  return { study, ...checkCircuit({ circuit, study, text: (uri) => texts[uri] ?? '' }) };
}

export function answerJob({ id, job }: WorkerRequest): WorkerReply {
  try {
    return { id, answer: workJob(job) };
  } catch (error) {
    return { id, failed: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}
