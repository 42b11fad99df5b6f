/** One study and what the rules say of it: the work of the study's thread. */
import { engines } from './engines.ts';
import type { StudyAnswer, StudyJob, WorkerReply, WorkerRequest } from './study-runner.ts';

/** Throws where the study or a rule breaks down; the caller says so. */
export function workJob(job: StudyJob): StudyAnswer | undefined {
  const { circuit, texts } = job;
  const study = engines.study?.(circuit);
  if (!study) return undefined;
  return { study, findings: engines.rules?.({ circuit, study, text: (uri) => texts[uri] ?? '' }) ?? [] };
}

export function answerJob({ id, job }: WorkerRequest): WorkerReply {
  try {
    const answer = workJob(job);
    return answer ? { id, answer } : { id, failed: 'there is nothing that computes' };
  } catch (error) {
    return { id, failed: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}
